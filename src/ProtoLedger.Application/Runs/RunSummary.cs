namespace ProtoLedger.Application.Runs;

/// <summary>What asked for a run.</summary>
public enum RunCause
{
    /// <summary>History was imported.</summary>
    Import,

    /// <summary>A proposal was submitted, changed or rebased.</summary>
    Submit,

    /// <summary>A version was approved.</summary>
    Approve,

    /// <summary>A version became effective.</summary>
    Effective,

    /// <summary>The regular sweep.</summary>
    Nightly,

    /// <summary>Somebody asked.</summary>
    Manual,
}

/// <summary>States of a run.</summary>
public enum RunState
{
    /// <summary>Waits for a worker.</summary>
    Queued,

    /// <summary>Being computed.</summary>
    Running,

    /// <summary>Every shard is computed.</summary>
    Completed,

    /// <summary>At least one shard could not be computed; the others are stored.</summary>
    Failed,
}

/// <summary>The counts of a run.</summary>
/// <param name="State">queued, running, completed or failed.</param>
/// <param name="ModelId">Model that predicted; null before it started.</param>
/// <param name="Versions">Stored protocol versions evaluated.</param>
/// <param name="Proposals">Proposals under review evaluated.</param>
/// <param name="Results">Result rows: subject × scanner.</param>
/// <param name="Shared">Rows that share the computation of an identical input of the same run.</param>
/// <param name="Moved">Stored versions whose nominal prediction differs from the previous completed run by more than 10⁻⁹ absolute plus 10⁻⁹ relative.</param>
/// <param name="NewlyFailing">Expectations that newly fail.</param>
/// <param name="NewlyHolding">Expectations that newly hold.</param>
/// <param name="FailedShards">Shards that could not be computed.</param>
/// <param name="DurationMs">From start to end; 0 before the end.</param>
public sealed record RunSummary(
    string State,
    string? ModelId,
    int Versions,
    int Proposals,
    int Results,
    int Shared,
    int Moved,
    int NewlyFailing,
    int NewlyHolding,
    int FailedShards,
    long DurationMs);

/// <summary>A run in a list.</summary>
/// <param name="Id">Number.</param>
/// <param name="Cause">What asked for it.</param>
/// <param name="ChangeRequestId">Request it is for, or null.</param>
/// <param name="QueuedAt">UTC.</param>
/// <param name="FinishedAt">UTC, or null.</param>
/// <param name="Summary">Its counts.</param>
public sealed record RunView(long Id, RunCause Cause, long? ChangeRequestId, DateTime QueuedAt, DateTime? FinishedAt, RunSummary Summary);
