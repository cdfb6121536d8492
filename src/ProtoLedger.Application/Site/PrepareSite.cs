using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Application.Site;

/// <summary>Makes the site's keys at the very first start; later it only checks that they open.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="keys">The keys.</param>
public sealed class PrepareSite(Commands commands, SiteKeys keys)
{
    private static readonly CommandKind Kind = new("prepare-site", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.SystemOnly;

    /// <summary>Runs it; before anything else is done with the database.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    /// <exception cref="InvalidOperationException">The sealing key is not the one of this database.</exception>
    public Task<Outcome<bool>> RunAsync(CancellationToken cancellationToken) =>
        commands.WriteAsync<bool>(
            Caller.System,
            Kind,
            "site",
            new { },
            async command =>
            {
                await keys.OpenAsync(command.Stores, cancellationToken);
                return true;
            },
            cancellationToken);
}
