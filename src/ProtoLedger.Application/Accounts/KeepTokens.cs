using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Accounts;

/// <summary>A new API token.</summary>
/// <param name="Label">What the owner calls it, 1 to 100 characters.</param>
/// <param name="Scopes">Scopes, at least one.</param>
/// <param name="Days">Days until it expires, 1 to 366.</param>
public sealed record NewToken(string Label, IReadOnlyList<string> Scopes, int Days);

/// <summary>An API token as its owner sees it.</summary>
/// <param name="Sha256">Hash of the secret, lower-case hexadecimal: its name.</param>
/// <param name="Label">What the owner calls it.</param>
/// <param name="Scopes">Scopes.</param>
/// <param name="CreatedAt">UTC.</param>
/// <param name="LastUsedAt">UTC.</param>
/// <param name="ExpiresAt">UTC.</param>
/// <param name="Ended">True when it was revoked.</param>
public sealed record TokenView(
    string Sha256, string Label, IReadOnlyList<string> Scopes, DateTime CreatedAt, DateTime LastUsedAt, DateTime ExpiresAt, bool Ended);

/// <summary>A token with its secret, shown once.</summary>
/// <param name="Secret">The secret.</param>
/// <param name="Token">What is kept.</param>
public sealed record MadeToken(string Secret, TokenView Token);

/// <summary>Keeps one's own API tokens. They expire, carry scopes, are stored as hashes, and can never sign.</summary>
/// <param name="commands">Runs it.</param>
public sealed class KeepTokens(Commands commands)
{
    private static readonly CommandKind Create = new("create-token", Rule);
    private static readonly CommandKind Revoke = new("revoke-token", Rule);
    private static readonly CommandKind List = new("list-tokens", Rule);

    /// <summary>Who may: anybody with a session, about their own tokens.</summary>
    public static RoleRule Rule => RoleRule.Own;

    /// <summary>Makes a token. The answer is not kept for a repeated request, since the secret is shown once.</summary>
    /// <param name="caller">Whose token.</param>
    /// <param name="token">The token.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<MadeToken>> CreateAsync(Caller caller, NewToken token, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller with { IdempotencyKey = null }, Create, caller.Actor.Name, token, command => CreateAsync(command, token), cancellationToken);

    /// <summary>Ends a token.</summary>
    /// <param name="caller">Whose token.</param>
    /// <param name="sha256">Its name.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<bool>> RevokeAsync(Caller caller, string sha256, CancellationToken cancellationToken) =>
        commands.WriteAsync<bool>(
            caller,
            Revoke,
            caller.Actor.Name,
            new { sha256 },
            async command => Ledger.Digest.TryParse(sha256, out var hash)
                && await command.Stores.Accounts.EndTokensAsync(command.Actor.Name, hash.ToArray(), command.Now, command.Cancellation) == 1
                ? true
                : new NotFound("There is no such token, or it ended already."),
            cancellationToken);

    /// <summary>One's tokens, newest first.</summary>
    /// <param name="caller">Whose tokens.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<IReadOnlyList<TokenView>>> ListAsync(Caller caller, CancellationToken cancellationToken) =>
        commands.ReadAsync(
            caller,
            List,
            caller.Actor.Name,
            async stores => Outcome.Done<IReadOnlyList<TokenView>>([.. (await stores.Accounts.ApiTokensAsync(caller.Actor.Name, cancellationToken)).Select(View)]),
            cancellationToken);

    private static async Task<Outcome<MadeToken>> CreateAsync(Command command, NewToken token)
    {
        if (string.IsNullOrWhiteSpace(token.Label))
            return Invalid.Field("/label", token.Label, "1 to 100 characters", "A token needs a label.");
        if (Proposals.Text(token.Label, "/label", 100, "1 to 100 characters") is { } fault)
            return fault;
        if (token.Scopes.Count == 0 || token.Scopes.FirstOrDefault(scope => !Scope.All.Contains(scope)) is not null)
            return Invalid.Field("/scopes", string.Join(", ", token.Scopes), string.Join(", ", Scope.All), "A token needs at least one of the scopes.");
        if (token.Days is < 1 or > 366)
            return Invalid.Field("/days", token.Days.ToString(System.Globalization.CultureInfo.InvariantCulture), "1 to 366", "A token must expire within a year.");
        var secret = Secrets.New(session: false);
        var row = new TokenRow(
            Secrets.Hash(secret), command.Actor.Name, "api", token.Label, [.. token.Scopes.Distinct(StringComparer.Ordinal)], command.Now, command.Now,
            command.Now.AddDays(token.Days), null);
        await command.Stores.Accounts.AddTokenAsync(row, command.Cancellation);
        return new MadeToken(secret, View(row));
    }

    private static TokenView View(TokenRow row) =>
        new(Convert.ToHexStringLower(row.Sha256), row.Label, row.Scopes, row.CreatedAt, row.LastUsedAt, row.ExpiresAt, row.EndedAt is not null);
}
