using System.Globalization;
using NpgsqlTypes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class RunStore(Session session) : IRunStore
{
    private const int MostAttempts = 3;
    private static readonly SqlFolder Sql = new("Runs");

    public async Task<long> EnqueueAsync(
        RunCause cause, long? changeRequestId, int priority, DateTime queuedAt, CancellationToken cancellationToken)
    {
        var run = await session.ValueAsync<long>(
            Sql["Add"],
            new { cause = cause.ToString().ToLowerInvariant(), changeRequestId, priority = (short)priority, queuedAt },
            cancellationToken);
        await AddJobsAsync(run, RunStages.Plan, [""], cancellationToken);
        return run;
    }

    public async Task<RunRow?> FindAsync(long id, CancellationToken cancellationToken) =>
        (await session.FindAsync<Row>(Sql["Find"], new { id }, cancellationToken))?.ToRun();

    public async Task<IReadOnlyList<RunRow>> ListAsync(long? before, int limit, CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<Row>(Sql["List"], new { before, limit }, cancellationToken)).Select(row => row.ToRun())];

    public async Task<RunRow?> PreviousCompletedAsync(long before, CancellationToken cancellationToken) =>
        (await session.FindAsync<Row>(Sql["PreviousCompleted"], new { before }, cancellationToken))?.ToRun();

    public Task<RunJob?> ClaimAsync(string worker, TimeSpan lease, CancellationToken cancellationToken) =>
        session.FindAsync<RunJob>(Sql["Claim"], new { worker, leaseSeconds = lease.TotalSeconds }, cancellationToken);

    public async Task<bool> RenewAsync(RunJob job, TimeSpan lease, CancellationToken cancellationToken) =>
        await session.ExecuteAsync(Sql["Renew"], new { job.Id, job.Epoch, leaseSeconds = lease.TotalSeconds }, cancellationToken) == 1;

    public async Task<bool> FinishJobAsync(RunJob job, string? failure, int sharedComputations, CancellationToken cancellationToken)
    {
        // The run's row is locked, so that of the last two shards exactly one sees that it was the last.
        await session.ExecuteAsync(Sql["LockRun"], new { run = job.Run }, cancellationToken);
        var finished = await session.ExecuteAsync(
            Sql["FinishJob"],
            new { job.Id, job.Epoch, state = failure is null ? "done" : "failed", failure, shared = sharedComputations },
            cancellationToken);
        if (finished == 0)
            return false;
        if (job.Stage == RunStages.Shard)
            await QueueFinishWhenLastAsync(job.Run, cancellationToken);
        else if (failure is not null)
            await session.ExecuteAsync(Sql["Fail"], new { run = job.Run }, cancellationToken);
        return true;
    }

    public async Task GiveBackAsync(RunJob job, string failure, CancellationToken cancellationToken)
    {
        if (job.Attempts >= MostAttempts)
            await FinishJobAsync(job, failure, 0, cancellationToken);
        else
            await session.ExecuteAsync(
                Sql["GiveBack"], new { job.Id, job.Epoch, failure, delaySeconds = (double)job.Attempts }, cancellationToken);
    }

    public async Task<bool> PlanAsync(
        RunJob job, string modelId, byte[] inputs, IReadOnlyList<string> shards, DateTime startedAt, CancellationToken cancellationToken)
    {
        if (!await FinishJobAsync(job, null, 0, cancellationToken))
            return false;
        var inputsSha256 = await new LedgerStore(session).AddBlobAsync(inputs, cancellationToken);
        await session.ExecuteAsync(Sql["Plan"], new { run = job.Run, modelId, inputsSha256, startedAt }, cancellationToken);
        await session.ExecuteAsync(Sql["EnsurePartition"], new { run = job.Run }, cancellationToken);
        await AddJobsAsync(job.Run, RunStages.Shard, shards, cancellationToken);
        await QueueFinishWhenLastAsync(job.Run, cancellationToken);
        return true;
    }

    public async Task AddResultsAsync(IReadOnlyList<ResultRow> rows, CancellationToken cancellationToken)
    {
        await using var writer = await session.Connection.BeginBinaryImportAsync(Sql["CopyResults"], cancellationToken);
        foreach (var row in rows)
        {
            await writer.StartRowAsync(cancellationToken);
            await writer.WriteAsync(row.Run, NpgsqlDbType.Bigint, cancellationToken);
            await writer.WriteAsync(row.Protocol, NpgsqlDbType.Text, cancellationToken);
            await writer.WriteAsync(row.Version, NpgsqlDbType.Integer, cancellationToken);
            await writer.WriteAsync(row.ChangeRequestId, NpgsqlDbType.Bigint, cancellationToken);
            await writer.WriteAsync(row.Scanner, NpgsqlDbType.Text, cancellationToken);
            await writer.WriteAsync(row.DocumentSha256, NpgsqlDbType.Bytea, cancellationToken);
            await writer.WriteAsync(row.InputSha256, NpgsqlDbType.Bytea, cancellationToken);
            await writer.WriteAsync(row.ObservablesSha256, NpgsqlDbType.Bytea, cancellationToken);
            await writer.WriteAsync(row.Nominal, NpgsqlDbType.Array | NpgsqlDbType.Double, cancellationToken);
            await writer.WriteAsync(row.Low, NpgsqlDbType.Array | NpgsqlDbType.Double, cancellationToken);
            await writer.WriteAsync(row.High, NpgsqlDbType.Array | NpgsqlDbType.Double, cancellationToken);
            await writer.WriteAsync(row.Probability, NpgsqlDbType.Array | NpgsqlDbType.Double, cancellationToken);
            await writer.WriteAsync(row.Verdict, NpgsqlDbType.Array | NpgsqlDbType.Smallint, cancellationToken);
            await writer.WriteAsync(row.NominalVerdict, NpgsqlDbType.Array | NpgsqlDbType.Smallint, cancellationToken);
            await writer.WriteAsync(row.PackedSha256, NpgsqlDbType.Bytea, cancellationToken);
        }

        await writer.CompleteAsync(cancellationToken);
    }

    public async Task<IReadOnlyList<ResultRow>> ResultsAsync(long run, string? protocol, CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<PackedRow>(Sql["Results"], new { run, protocol }, cancellationToken)).Select(row => row.ToResult())];

    public async Task CompleteAsync(RunRow run, CancellationToken cancellationToken) =>
        await session.ExecuteAsync(
            Sql["Complete"],
            new
            {
                run.Id,
                state = run.State.ToString().ToLowerInvariant(),
                run.FinishedAt,
                run.Versions,
                run.Proposals,
                run.Results,
                run.Shared,
                run.Moved,
                run.NewlyFailing,
                run.NewlyHolding,
                run.FailedShards,
                run.FindingsSha256,
            },
            cancellationToken);

    public Task<RunProgress> ProgressAsync(long run, CancellationToken cancellationToken) =>
        session.ValueAsync<RunProgress>(Sql["Progress"], new { run }, cancellationToken);

    private async Task AddJobsAsync(long run, string stage, IReadOnlyList<string> payloads, CancellationToken cancellationToken)
    {
        await session.ExecuteAsync(Sql["AddJobs"], new { run, stage, payloads = payloads.ToArray() }, cancellationToken);
        await session.ExecuteAsync(Sql["Notify"], null, cancellationToken);
    }

    private async Task QueueFinishWhenLastAsync(long run, CancellationToken cancellationToken)
    {
        if (await session.ValueAsync<long>(Sql["OpenShards"], new { run }, cancellationToken) == 0)
            await AddJobsAsync(run, RunStages.Finish, [""], cancellationToken);
    }

    private sealed class Row
    {
        public long Id { get; init; }

        public string Cause { get; init; } = "";

        public long? ChangeRequestId { get; init; }

        public string State { get; init; } = "";

        public string? ModelId { get; init; }

        public byte[]? InputsSha256 { get; init; }

        public DateTime QueuedAt { get; init; }

        public DateTime? StartedAt { get; init; }

        public DateTime? FinishedAt { get; init; }

        public int Versions { get; init; }

        public int Proposals { get; init; }

        public int Results { get; init; }

        public int Shared { get; init; }

        public int Moved { get; init; }

        public int NewlyFailing { get; init; }

        public int NewlyHolding { get; init; }

        public int FailedShards { get; init; }

        public byte[]? FindingsSha256 { get; init; }

        public RunRow ToRun() => new(
            Id, Enum.Parse<RunCause>(Word(Cause)), ChangeRequestId, Enum.Parse<RunState>(Word(State)), ModelId, InputsSha256, QueuedAt,
            StartedAt, FinishedAt, Versions, Proposals, Results, Shared, Moved, NewlyFailing, NewlyHolding, FailedShards, FindingsSha256);

        private static string Word(string word) => CultureInfo.InvariantCulture.TextInfo.ToTitleCase(word);
    }

    private sealed class PackedRow
    {
        public long Run { get; init; }

        public string Protocol { get; init; } = "";

        public int Version { get; init; }

        public long ChangeRequestId { get; init; }

        public string Scanner { get; init; } = "";

        public byte[] DocumentSha256 { get; init; } = [];

        public byte[] InputSha256 { get; init; } = [];

        public byte[] ObservablesSha256 { get; init; } = [];

        public double[] Nominal { get; init; } = [];

        public double[] Low { get; init; } = [];

        public double[] High { get; init; } = [];

        public double[] Probability { get; init; } = [];

        public short[] Verdict { get; init; } = [];

        public short[] NominalVerdict { get; init; } = [];

        public byte[] PackedSha256 { get; init; } = [];

        public ResultRow ToResult() => new(
            Run, Protocol, Version, ChangeRequestId, Scanner, DocumentSha256, InputSha256, ObservablesSha256, Nominal, Low, High,
            Probability, Verdict, NominalVerdict, PackedSha256);
    }
}
