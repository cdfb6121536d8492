using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Application.Runs;

/// <summary>Queues a regression run.</summary>
/// <param name="commands">Runs it.</param>
public sealed class EnqueueRun(Commands commands)
{
    private static readonly CommandKind Kind = new("enqueue-run", Rule, NeedsKey: true);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.StartRun;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="cause">Manual for people; nightly for the clock.</param>
    /// <param name="cancellationToken">Stops it.</param>
    /// <returns>Number of the run.</returns>
    public Task<Outcome<long>> RunAsync(Caller caller, RunCause cause, CancellationToken cancellationToken) =>
        commands.WriteAsync<long>(
            caller,
            Kind,
            "runs",
            new { cause },
            async command => await command.Stores.Runs.EnqueueAsync(cause, null, RunPriority.Sweep, command.Now, command.Cancellation),
            cancellationToken);
}
