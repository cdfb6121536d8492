using ProtoLedger.Application.Runs;

namespace ProtoLedger.Application.Stores;

/// <summary>Regression runs, the queue of their jobs, and packed results.</summary>
public interface IRunStore
{
    /// <summary>Queues a run with its first job and wakes the workers at commit.</summary>
    /// <param name="cause">What asked for it.</param>
    /// <param name="changeRequestId">Request it is for, or null.</param>
    /// <param name="priority">Smaller first.</param>
    /// <param name="queuedAt">UTC.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<long> EnqueueAsync(RunCause cause, long? changeRequestId, int priority, DateTime queuedAt, CancellationToken cancellationToken);

    /// <summary>The run, or null.</summary>
    /// <param name="id">Number.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<RunRow?> FindAsync(long id, CancellationToken cancellationToken);

    /// <summary>Runs, newest first, before a number.</summary>
    /// <param name="before">Number to start below, or null.</param>
    /// <param name="limit">Most rows.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<RunRow>> ListAsync(long? before, int limit, CancellationToken cancellationToken);

    /// <summary>Newest completed run before a number whose baseline is that of record (not one with a proposed document in it), or null.</summary>
    /// <param name="before">Number.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<RunRow?> PreviousCompletedAsync(long before, CancellationToken cancellationToken);

    /// <summary>Takes the most urgent job whose lease is free, for the lease time on the database's clock; null when there is none.</summary>
    /// <param name="worker">Name of the worker.</param>
    /// <param name="lease">How long.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<RunJob?> ClaimAsync(string worker, TimeSpan lease, CancellationToken cancellationToken);

    /// <summary>Extends a lease; false when the epoch is not this one any more.</summary>
    /// <param name="job">The job as claimed.</param>
    /// <param name="lease">How long from now.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<bool> RenewAsync(RunJob job, TimeSpan lease, CancellationToken cancellationToken);

    /// <summary>Ends a job and, when it was the last of its stage, queues the next stage; false when the epoch is not this one any more.</summary>
    /// <param name="job">The job as claimed.</param>
    /// <param name="failure">Why it failed, or null when it is done.</param>
    /// <param name="sharedComputations">How many results were shared instead of computed again.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<bool> FinishJobAsync(RunJob job, string? failure, int sharedComputations, CancellationToken cancellationToken);

    /// <summary>Gives a job back after a fault, with a delay; after the attempts are used up it is failed for good.</summary>
    /// <param name="job">The job as claimed.</param>
    /// <param name="failure">What happened.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task GiveBackAsync(RunJob job, string failure, CancellationToken cancellationToken);

    /// <summary>Fixes the inputs of a run and queues one job a shard.</summary>
    /// <param name="job">The planning job.</param>
    /// <param name="modelId">Model that predicts.</param>
    /// <param name="inputs">Canonical JSON that names every input document.</param>
    /// <param name="shards">Payload of each shard.</param>
    /// <param name="startedAt">UTC.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<bool> PlanAsync(RunJob job, string modelId, byte[] inputs, IReadOnlyList<string> shards, DateTime startedAt, CancellationToken cancellationToken);

    /// <summary>Writes result rows by binary copy; their lists of observables are blobs stored before.</summary>
    /// <param name="rows">Rows of one run.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddResultsAsync(IReadOnlyList<ResultRow> rows, CancellationToken cancellationToken);

    /// <summary>Results of a run, of one protocol or all, in order of protocol, version, proposal, scanner.</summary>
    /// <param name="run">Run.</param>
    /// <param name="protocol">Protocol, or null for all.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<ResultRow>> ResultsAsync(long run, string? protocol, CancellationToken cancellationToken);

    /// <summary>Stores the findings and the summary and completes the run.</summary>
    /// <param name="run">Run with its final values.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task CompleteAsync(RunRow run, CancellationToken cancellationToken);

    /// <summary>Jobs of a run by state.</summary>
    /// <param name="run">Run.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<RunProgress> ProgressAsync(long run, CancellationToken cancellationToken);
}

/// <summary>Wakes a waiting worker. A wake-up can be lost: whoever waits asks again after the time limit.</summary>
public interface IRunSignal
{
    /// <summary>Returns when a job was queued, or after the time limit.</summary>
    /// <param name="limit">Longest wait.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task WaitAsync(TimeSpan limit, CancellationToken cancellationToken);
}

/// <summary>A job as claimed.</summary>
/// <param name="Id">Number.</param>
/// <param name="Run">Run.</param>
/// <param name="Stage">plan, shard or finish.</param>
/// <param name="Payload">What a shard computes: a protocol's identifier; empty for the other stages.</param>
/// <param name="Epoch">Counts claims; a late result of an earlier claim is refused.</param>
/// <param name="Attempts">Claims so far.</param>
public sealed record RunJob(long Id, long Run, string Stage, string Payload, int Epoch, int Attempts);

/// <summary>A run as stored.</summary>
/// <param name="Id">Number, from 1.</param>
/// <param name="Cause">What asked for it.</param>
/// <param name="ChangeRequestId">Request it is for, or null.</param>
/// <param name="State">State.</param>
/// <param name="ModelId">Model, once planned.</param>
/// <param name="InputsSha256">Blob that names every input document, once planned.</param>
/// <param name="QueuedAt">UTC.</param>
/// <param name="StartedAt">UTC, or null.</param>
/// <param name="FinishedAt">UTC, or null.</param>
/// <param name="Versions">Stored protocol versions evaluated.</param>
/// <param name="Proposals">Protocol proposals evaluated.</param>
/// <param name="Results">Result rows.</param>
/// <param name="Shared">Rows that took their numbers from an identical input of the same run.</param>
/// <param name="Moved">Versions whose prediction moved although their document did not.</param>
/// <param name="NewlyFailing">Expectations that newly fail against the previous run, or the proposal against its base.</param>
/// <param name="NewlyHolding">Expectations that newly hold.</param>
/// <param name="FailedShards">Shards that could not be computed.</param>
/// <param name="FindingsSha256">Blob with the findings, or null.</param>
public sealed record RunRow(
    long Id,
    RunCause Cause,
    long? ChangeRequestId,
    RunState State,
    string? ModelId,
    byte[]? InputsSha256,
    DateTime QueuedAt,
    DateTime? StartedAt,
    DateTime? FinishedAt,
    int Versions,
    int Proposals,
    int Results,
    int Shared,
    int Moved,
    int NewlyFailing,
    int NewlyHolding,
    int FailedShards,
    byte[]? FindingsSha256);

/// <summary>One packed result: a version or a proposal on one scanner.</summary>
/// <param name="Run">Run.</param>
/// <param name="Protocol">Protocol identifier.</param>
/// <param name="Version">Stored version, or 0 for a proposal.</param>
/// <param name="ChangeRequestId">Proposal's request, or 0 for a stored version.</param>
/// <param name="Scanner">Scanner identifier.</param>
/// <param name="DocumentSha256">Protocol document.</param>
/// <param name="InputSha256">Over every input document, the sampling and the model.</param>
/// <param name="ObservablesSha256">Stored list of observables (n) and expectations (m) to which the arrays refer.</param>
/// <param name="Nominal">n nominal values, NaN where not predictable.</param>
/// <param name="Low">n 5 % quantiles.</param>
/// <param name="High">n 95 % quantiles.</param>
/// <param name="Probability">m probabilities that the expectation holds, NaN where not predictable.</param>
/// <param name="Verdict">m verdicts over the draws, numbers of the enumeration.</param>
/// <param name="NominalVerdict">m verdicts at the means.</param>
/// <param name="PackedSha256">SHA-256 over the packed numbers as computed; a row that was changed in the table differs from it.</param>
public sealed record ResultRow(
    long Run,
    string Protocol,
    int Version,
    long ChangeRequestId,
    string Scanner,
    byte[] DocumentSha256,
    byte[] InputSha256,
    byte[] ObservablesSha256,
    double[] Nominal,
    double[] Low,
    double[] High,
    double[] Probability,
    short[] Verdict,
    short[] NominalVerdict,
    byte[] PackedSha256);

/// <summary>Jobs of a run.</summary>
/// <param name="Total">Shards.</param>
/// <param name="Done">Shards finished, failed ones included.</param>
/// <param name="Failed">Shards failed for good.</param>
/// <param name="Shared">Rows shared so far.</param>
public sealed record RunProgress(int Total, int Done, int Failed, int Shared);
