namespace ProtoLedger.Application.Runs;

/// <summary>Stages of a run, in order; each is one or more jobs.</summary>
public static class RunStages
{
    /// <summary>Fix the inputs and cut the work into shards.</summary>
    public const string Plan = "plan";

    /// <summary>Predict every version and proposal of one protocol.</summary>
    public const string Shard = "shard";

    /// <summary>Compare with the run before and write the report.</summary>
    public const string Finish = "finish";
}
