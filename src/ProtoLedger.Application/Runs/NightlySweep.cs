using System.Globalization;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;

namespace ProtoLedger.Application.Runs;

/// <summary>
/// Queues one run a night, whatever the number of workers: the date is the idempotency key. The first night after a start
/// is the first one that counts.
/// </summary>
public sealed class NightlySweep
{
    /// <summary>Hour of the day, UTC, from which the night's run is queued.</summary>
    public const int Hour = 2;

    private readonly EnqueueRun enqueue;
    private readonly TimeProvider clock;
    private DateTime last;

    /// <summary>Sweeps from tomorrow on.</summary>
    /// <param name="enqueue">Queues runs.</param>
    /// <param name="clock">Clock.</param>
    public NightlySweep(EnqueueRun enqueue, TimeProvider clock)
    {
        (this.enqueue, this.clock) = (enqueue, clock);
        last = clock.Now().Date;
    }

    /// <summary>Queues the night's run when it is due.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    /// <returns>True when a run of this night is queued by now and was not known here before.</returns>
    public async Task<bool> RunWhenDueAsync(CancellationToken cancellationToken)
    {
        var now = clock.Now();
        if (now.Date <= last || now.Hour < Hour)
            return false;
        var night = Caller.System with { IdempotencyKey = "nightly-" + now.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture) };
        var outcome = await enqueue.RunAsync(night, RunCause.Nightly, cancellationToken);
        if (outcome.Succeeded)
            last = now.Date;
        return outcome.Succeeded;
    }
}
