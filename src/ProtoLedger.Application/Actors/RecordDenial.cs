using ProtoLedger.Application.Commanding;

namespace ProtoLedger.Application.Actors;

/// <summary>Writes into the audit trail that a known actor was refused before any use case began.</summary>
/// <param name="commands">Writes the audit trail.</param>
public sealed class RecordDenial(Commands commands)
{
    /// <summary>Runs it; does nothing for strangers, who would fill the trail.</summary>
    /// <param name="caller">Who was refused.</param>
    /// <param name="subject">What was asked for.</param>
    /// <param name="rule">Name of the rule that refused.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task RunAsync(Caller caller, string subject, string rule, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(caller);
        return caller.Actor.Credential == Credential.None
            ? Task.CompletedTask
            : commands.RecordAsync(caller, "request", subject, "denied", rule, cancellationToken);
    }
}
