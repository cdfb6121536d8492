namespace ProtoLedger.Application.Stores;

/// <summary>Accounts, their sessions and API tokens.</summary>
public interface IAccountStore
{
    /// <summary>Stores a new account; false when the name is or was in use.</summary>
    /// <param name="account">The account.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<bool> AddAsync(AccountRow account, CancellationToken cancellationToken);

    /// <summary>The account, or null; locked until the transaction ends when asked.</summary>
    /// <param name="name">Name, lower case.</param>
    /// <param name="forUpdate">Lock it.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<AccountRow?> FindAsync(string name, bool forUpdate, CancellationToken cancellationToken);

    /// <summary>Writes every changeable column.</summary>
    /// <param name="account">New values.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task UpdateAsync(AccountRow account, CancellationToken cancellationToken);

    /// <summary>All accounts by name.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<AccountRow>> ListAsync(CancellationToken cancellationToken);

    /// <summary>Stores a session or API token.</summary>
    /// <param name="token">The token.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddTokenAsync(TokenRow token, CancellationToken cancellationToken);

    /// <summary>The token with this hash, or null.</summary>
    /// <param name="sha256">SHA-256 of the secret.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<TokenRow?> FindTokenAsync(byte[] sha256, CancellationToken cancellationToken);

    /// <summary>Notes that a token was used.</summary>
    /// <param name="sha256">Hash.</param>
    /// <param name="at">UTC.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task TouchTokenAsync(byte[] sha256, DateTime at, CancellationToken cancellationToken);

    /// <summary>Ends one token, or all of an account when <paramref name="sha256"/> is null; gives how many.</summary>
    /// <param name="account">Account.</param>
    /// <param name="sha256">Hash, or null.</param>
    /// <param name="at">UTC.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<int> EndTokensAsync(string account, byte[]? sha256, DateTime at, CancellationToken cancellationToken);

    /// <summary>API tokens of an account, newest first.</summary>
    /// <param name="account">Account.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<TokenRow>> ApiTokensAsync(string account, CancellationToken cancellationToken);
}

/// <summary>An account as stored.</summary>
/// <param name="Name">Lower case, never reused.</param>
/// <param name="DisplayName">Printed name.</param>
/// <param name="PasswordHash">Of the platform's hasher; null for an account that signs in elsewhere or is only a name in imported history.</param>
/// <param name="Roles">Roles.</param>
/// <param name="FailedAttempts">Since the last success.</param>
/// <param name="LockedUntil">UTC, or null.</param>
/// <param name="Disabled">True when it may not sign in.</param>
/// <param name="Demo">Made for a demonstration.</param>
/// <param name="TotpSecret">Shared secret of the second factor, encrypted at rest, or null.</param>
/// <param name="TotpStep">Newest time step that was accepted; a code is taken once.</param>
/// <param name="CreatedAt">UTC.</param>
public sealed record AccountRow(
    string Name,
    string DisplayName,
    string? PasswordHash,
    string[] Roles,
    int FailedAttempts,
    DateTime? LockedUntil,
    bool Disabled,
    bool Demo,
    byte[]? TotpSecret,
    long TotpStep,
    DateTime CreatedAt);

/// <summary>A session or an API token, known by the hash of its secret.</summary>
/// <param name="Sha256">SHA-256 of the secret.</param>
/// <param name="Account">Account.</param>
/// <param name="Kind">session or api.</param>
/// <param name="Label">What the owner calls an API token; empty for a session.</param>
/// <param name="Scopes">Scopes of an API token.</param>
/// <param name="CreatedAt">UTC.</param>
/// <param name="LastUsedAt">UTC.</param>
/// <param name="ExpiresAt">UTC: absolute end.</param>
/// <param name="EndedAt">UTC, or null while it lives.</param>
public sealed record TokenRow(
    byte[] Sha256,
    string Account,
    string Kind,
    string Label,
    string[] Scopes,
    DateTime CreatedAt,
    DateTime LastUsedAt,
    DateTime ExpiresAt,
    DateTime? EndedAt);
