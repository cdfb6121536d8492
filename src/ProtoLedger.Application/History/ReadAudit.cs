using System.Globalization;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.History;

/// <summary>Reads the audit trail. Reading it is itself an event.</summary>
/// <param name="commands">Runs it.</param>
public sealed class ReadAudit(Commands commands)
{
    private static readonly CommandKind Kind = new("read-audit", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.ReadAudit;

    /// <summary>Events, newest first.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="filter">Which.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<Outcome<IReadOnlyList<AuditEvent>>> ListAsync(Caller caller, AuditFilter filter, CancellationToken cancellationToken)
    {
        var outcome = await commands.ReadAsync(
            caller,
            Kind,
            "audit",
            async stores => filter.Limit is < 1 or > 1000
                ? Invalid.Field("/limit", filter.Limit.ToString(CultureInfo.InvariantCulture), "1 to 1000", "A page has at most 1,000 entries.")
                : Outcome.Done(await stores.Audit.ListAsync(filter, cancellationToken)),
            cancellationToken);
        if (outcome.Succeeded)
            await commands.RecordAsync(caller, Kind.Action, "audit", "read", "", cancellationToken);
        return outcome;
    }
}
