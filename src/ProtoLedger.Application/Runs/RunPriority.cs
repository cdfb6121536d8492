namespace ProtoLedger.Application.Runs;

/// <summary>What comes first in the queue: smaller numbers.</summary>
internal static class RunPriority
{
    /// <summary>Somebody waits for it.</summary>
    public const int Edit = 0;

    /// <summary>After a decision.</summary>
    public const int Decision = 5;

    /// <summary>Sweeps.</summary>
    public const int Sweep = 9;
}
