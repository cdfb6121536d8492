namespace ProtoLedger.Cli;

/// <summary>What the commands return to the shell.</summary>
internal static class ExitCodes
{
    public const int Good = 0;

    /// <summary>The answer is no: a deviation, a fault found, a file that does not verify.</summary>
    public const int Bad = 1;

    /// <summary>The question cannot be put: wrong usage, an unreadable file, a family that is not built.</summary>
    public const int Usage = 2;
}
