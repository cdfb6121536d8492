using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Accounts;

/// <summary>Turns the secret of a session or API token into an actor. Roles are read anew each time, so that a removed role ends at once.</summary>
/// <param name="transactions">Transactions.</param>
/// <param name="options">Limits.</param>
/// <param name="clock">Clock.</param>
public sealed class Authenticate(ITransactions transactions, AccountOptions options, TimeProvider clock)
{
    private static readonly TimeSpan TouchEvery = TimeSpan.FromSeconds(20);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Anyone;

    /// <summary>The actor, or null when the secret is unknown, ended, expired or idle too long, or the account is disabled.</summary>
    /// <param name="secret">As the client sent it.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<Actor?> RunAsync(string secret, CancellationToken cancellationToken)
    {
        if (!Secrets.LooksRight(secret))
            return null;
        var hash = Secrets.Hash(secret);
        var now = clock.Now();
        var (token, account) = await transactions.ReadAsync(
            async stores =>
            {
                var found = await stores.Accounts.FindTokenAsync(hash, cancellationToken);
                return (found, found is null ? null : await stores.Accounts.FindAsync(found.Account, forUpdate: false, cancellationToken));
            },
            cancellationToken);
        if (token is null || account is null || account.Disabled || token.EndedAt is not null || token.ExpiresAt <= now)
            return null;
        if (account.Demo && !options.DemoAccounts)
            return null;
        var session = token.Kind == "session";
        if (session && token.LastUsedAt + options.IdleLimit <= now)
            return null;
        if (now - token.LastUsedAt >= TouchEvery)
            await TouchAsync(hash, now, cancellationToken);
        return new Actor(account.Name, account.DisplayName, account.Roles, session ? Credential.Session : Credential.Token, token.Scopes);
    }

    private async Task TouchAsync(byte[] hash, DateTime now, CancellationToken cancellationToken) =>
        await transactions.WriteAsync<bool>(
            async stores =>
            {
                await stores.Accounts.TouchTokenAsync(hash, now, cancellationToken);
                return true;
            },
            cancellationToken);
}
