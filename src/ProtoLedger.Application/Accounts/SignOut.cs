using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Application.Accounts;

/// <summary>Ends the session of a secret.</summary>
/// <param name="commands">Runs it.</param>
public sealed class SignOut(Commands commands)
{
    private static readonly CommandKind Kind = new("sign-out", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Own;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who signs out.</param>
    /// <param name="secret">Secret of the session.</param>
    /// <param name="cancellationToken">Stops it.</param>
    /// <returns>How many ended: 1, or 0 when it was ended already.</returns>
    public Task<Outcome<int>> RunAsync(Caller caller, string secret, CancellationToken cancellationToken) =>
        commands.WriteAsync<int>(
            caller,
            Kind,
            caller.Actor.Name,
            new { },
            async command => await command.Stores.Accounts.EndTokensAsync(command.Actor.Name, Secrets.Hash(secret), command.Now, command.Cancellation),
            cancellationToken);
}
