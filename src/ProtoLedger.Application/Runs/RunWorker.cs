using Microsoft.Extensions.Logging;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Reporting;
using ProtoLedger.Application.Stores;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Application.Runs;

/// <summary>
/// Works on regression runs. Any number of workers on any number of machines may run: a job is claimed under a lease on the
/// database's clock, and its results and its end are one transaction that demands the epoch of the claim.
/// </summary>
public sealed class RunWorker
{
    private static readonly TimeSpan Lease = TimeSpan.FromSeconds(30);
    private static readonly TimeSpan Heartbeat = TimeSpan.FromSeconds(8);
    private static readonly TimeSpan Poll = TimeSpan.FromSeconds(2);
    private readonly ITransactions transactions;
    private readonly IRunSignal signal;
    private readonly DocumentShelf shelf;
    private readonly ChangeReports reports;
    private readonly NightlySweep sweep;
    private readonly TimeProvider clock;
    private readonly ILogger<RunWorker> log;
    private readonly string name = $"{Environment.MachineName}:{Environment.ProcessId}:{Guid.NewGuid():N}";

    /// <summary>A worker of this process.</summary>
    /// <param name="transactions">Transactions.</param>
    /// <param name="signal">Wakes it.</param>
    /// <param name="shelf">Documents.</param>
    /// <param name="reports">Makes the report of a proposal.</param>
    /// <param name="sweep">Queues the night's run.</param>
    /// <param name="clock">Clock.</param>
    /// <param name="log">Log.</param>
    public RunWorker(
        ITransactions transactions, IRunSignal signal, DocumentShelf shelf, ChangeReports reports, NightlySweep sweep, TimeProvider clock, ILogger<RunWorker> log) =>
        (this.transactions, this.signal, this.shelf, this.reports, this.sweep, this.clock, this.log) = (transactions, signal, shelf, reports, sweep, clock, log);

    /// <summary>Works until stopped.</summary>
    /// <param name="parallel">Jobs at a time; one for each core.</param>
    /// <param name="cancellationToken">Stops it; a job in hand is given back by its lease.</param>
    public Task RunAsync(int parallel, CancellationToken cancellationToken) =>
        Task.WhenAll(Enumerable.Range(0, Math.Max(1, parallel)).Select(_ => Task.Run(() => LoopAsync(cancellationToken), CancellationToken.None)));

    /// <summary>Works until nothing is queued that could be claimed now.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    /// <returns>Jobs done.</returns>
    public async Task<int> DrainAsync(CancellationToken cancellationToken)
    {
        var done = 0;
        while (await RunOneAsync(cancellationToken))
            done++;
        return done;
    }

    /// <summary>Does one job; false when there was none.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<bool> RunOneAsync(CancellationToken cancellationToken)
    {
        var claimed = await transactions.WriteAsync<RunJob?>(
            async stores => Outcome.Done(await stores.Runs.ClaimAsync(name, Lease, cancellationToken)), cancellationToken);
        if (claimed.Value is not { } job)
            return false;
        using var work = CancellationTokenSource.CreateLinkedTokenSource(cancellationToken);
        var heart = HeartbeatAsync(job, work);
        try
        {
            if (!await DoAsync(job, work.Token))
                log.LogWarning("Run {Run}, {Stage} {Payload}: another worker took over.", job.Run, job.Stage, job.Payload);
        }
        catch (OperationCanceledException) when (work.IsCancellationRequested)
        {
            cancellationToken.ThrowIfCancellationRequested();
        }
        catch (Exception exception) when (exception is not OperationCanceledException)
        {
            log.LogError(exception, "Run {Run}, {Stage} {Payload} failed.", job.Run, job.Stage, job.Payload);
            await GiveBackAsync(job, exception.Message, cancellationToken);
        }
        finally
        {
            await work.CancelAsync();
            await heart;
        }

        return true;
    }

    private async Task LoopAsync(CancellationToken cancellationToken)
    {
        while (!cancellationToken.IsCancellationRequested)
        {
            try
            {
                if (!await RunOneAsync(cancellationToken) && !await sweep.RunWhenDueAsync(cancellationToken))
                    await signal.WaitAsync(Poll, cancellationToken);
            }
            catch (StoreUnavailableException exception)
            {
                log.LogWarning("The database is away: {Reason}", exception.Message);
                await Task.Delay(Poll, cancellationToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
            }
            catch (OperationCanceledException) when (cancellationToken.IsCancellationRequested)
            {
                return;
            }
        }
    }

    private async Task HeartbeatAsync(RunJob job, CancellationTokenSource work)
    {
        while (true)
        {
            await Task.Delay(Heartbeat, work.Token).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
            if (work.IsCancellationRequested)
                return;
            try
            {
                var renewed = await transactions.WriteAsync<bool>(async stores => await stores.Runs.RenewAsync(job, Lease, work.Token), work.Token);
                if (!renewed.Value)
                    await work.CancelAsync();
            }
            catch (Exception exception) when (exception is StoreUnavailableException or OperationCanceledException)
            {
                // The lease runs on; the end of the job will tell.
            }
        }
    }

    private Task<bool> DoAsync(RunJob job, CancellationToken cancellationToken) => job.Stage switch
    {
        RunStages.Plan => PlanAsync(job, cancellationToken),
        RunStages.Shard => ShardAsync(job, cancellationToken),
        _ => FinishAsync(job, cancellationToken),
    };

    private async Task<bool> PlanAsync(RunJob job, CancellationToken cancellationToken)
    {
        var now = clock.Now();
        var planned = await transactions.WriteAsync<bool>(
            async stores =>
            {
                var run = (await stores.Runs.FindAsync(job.Run, cancellationToken))!;
                var plan = await RunPlanner.PlanAsync(stores, run.ChangeRequestId, now, cancellationToken);
                var shards = plan.Subjects.Select(subject => subject.Protocol).Distinct().ToList();
                return await stores.Runs.PlanAsync(job, ModelIdentity.Current, plan.ToBytes(), shards, now, cancellationToken);
            },
            cancellationToken);
        return planned.Value;
    }

    private async Task<bool> ShardAsync(RunJob job, CancellationToken cancellationToken)
    {
        var (plan, documents) = await transactions.ReadAsync(
            async stores =>
            {
                var (_, found) = await LoadPlanAsync(stores, job.Run, cancellationToken);
                return (found, await ShardWork.LoadAsync(stores, shelf, found, job.Payload, cancellationToken));
            },
            cancellationToken);
        var (rows, lists, shared) = ShardWork.Compute(job.Run, plan, job.Payload, documents, cancellationToken);
        return await WriteAsync(
            job,
            shared,
            async stores =>
            {
                foreach (var list in lists)
                    await stores.Ledger.AddBlobAsync(list, cancellationToken);
                await stores.Runs.AddResultsAsync(rows, cancellationToken);
            },
            cancellationToken);
    }

    private async Task<bool> FinishAsync(RunJob job, CancellationToken cancellationToken)
    {
        var (run, findings, plan) = await transactions.ReadAsync(
            async stores =>
            {
                var (row, found) = await LoadPlanAsync(stores, job.Run, cancellationToken);
                var progress = await stores.Runs.ProgressAsync(job.Run, cancellationToken);
                var (compared, counted) = await RunFinisher.FindAsync(stores, row, found, progress, cancellationToken);
                return (counted, compared, found);
            },
            cancellationToken);
        var failed = run.FailedShards > 0;
        var now = clock.Now();
        run = run with { State = failed ? RunState.Failed : RunState.Completed, FinishedAt = now };
        var report = failed ? null : await reports.MakeAsync(run, plan, findings, now, cancellationToken);
        return await WriteAsync(
            job,
            0,
            async stores =>
            {
                var hash = await stores.Ledger.AddBlobAsync(findings.ToBytes(), cancellationToken);
                await stores.Runs.CompleteAsync(run with { FindingsSha256 = hash }, cancellationToken);
                if (report is not null)
                    await report.StoreAsync(stores, cancellationToken);
            },
            cancellationToken);
    }

    /// <summary>Writes what a job made together with its end; nothing when another worker holds the job by now.</summary>
    private async Task<bool> WriteAsync(RunJob job, int shared, Func<IStores, Task> write, CancellationToken cancellationToken)
    {
        var outcome = await transactions.WriteAsync<bool>(
            async stores =>
            {
                if (!await stores.Runs.FinishJobAsync(job, null, shared, cancellationToken))
                    return new Conflict("The job was claimed again.");
                await write(stores);
                return true;
            },
            cancellationToken);
        return outcome.Succeeded;
    }

    private static async Task<(RunRow Run, RunPlan Plan)> LoadPlanAsync(IStores stores, long id, CancellationToken cancellationToken)
    {
        var run = (await stores.Runs.FindAsync(id, cancellationToken))!;
        var bytes = await stores.Ledger.FindBlobAsync(run.InputsSha256!, cancellationToken);
        return (run, RunPlan.Parse(bytes!));
    }

    private async Task GiveBackAsync(RunJob job, string failure, CancellationToken cancellationToken) =>
        await transactions.WriteAsync<bool>(
            async stores =>
            {
                await stores.Runs.GiveBackAsync(job, failure, cancellationToken);
                return true;
            },
            cancellationToken);
}
