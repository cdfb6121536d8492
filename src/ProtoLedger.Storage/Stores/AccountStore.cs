using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class AccountStore(Session session) : IAccountStore
{
    private static readonly SqlFolder Sql = new("Accounts");

    public async Task<bool> AddAsync(AccountRow account, CancellationToken cancellationToken) =>
        await session.ExecuteAsync(Sql["Add"], account, cancellationToken) == 1;

    public async Task<AccountRow?> FindAsync(string name, bool forUpdate, CancellationToken cancellationToken) =>
        (await session.FindAsync<Row>(Sql[forUpdate ? "FindForUpdate" : "Find"], new { name }, cancellationToken))?.ToAccount();

    public Task UpdateAsync(AccountRow account, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["Update"], account, cancellationToken);

    public async Task<IReadOnlyList<AccountRow>> ListAsync(CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<Row>(Sql["List"], null, cancellationToken)).Select(row => row.ToAccount())];

    public Task AddTokenAsync(TokenRow token, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["AddToken"], token, cancellationToken);

    public async Task<TokenRow?> FindTokenAsync(byte[] sha256, CancellationToken cancellationToken) =>
        (await session.FindAsync<StoredToken>(Sql["FindToken"], new { sha256 }, cancellationToken))?.ToToken();

    public Task TouchTokenAsync(byte[] sha256, DateTime at, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["TouchToken"], new { sha256, at }, cancellationToken);

    public Task<int> EndTokensAsync(string account, byte[]? sha256, DateTime at, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["EndTokens"], new { account, sha256, at }, cancellationToken);

    public async Task<IReadOnlyList<TokenRow>> ApiTokensAsync(string account, CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<StoredToken>(Sql["ApiTokens"], new { account }, cancellationToken)).Select(row => row.ToToken())];

    private sealed class Row
    {
        public string Name { get; init; } = "";

        public string DisplayName { get; init; } = "";

        public string? PasswordHash { get; init; }

        public string[] Roles { get; init; } = [];

        public int FailedAttempts { get; init; }

        public DateTime? LockedUntil { get; init; }

        public bool Disabled { get; init; }

        public bool Demo { get; init; }

        public byte[]? TotpSecret { get; init; }

        public long TotpStep { get; init; }

        public DateTime CreatedAt { get; init; }

        public AccountRow ToAccount() =>
            new(Name, DisplayName, PasswordHash, Roles, FailedAttempts, LockedUntil, Disabled, Demo, TotpSecret, TotpStep, CreatedAt);
    }

    private sealed class StoredToken
    {
        public byte[] Sha256 { get; init; } = [];

        public string Account { get; init; } = "";

        public string Kind { get; init; } = "";

        public string Label { get; init; } = "";

        public string[] Scopes { get; init; } = [];

        public DateTime CreatedAt { get; init; }

        public DateTime LastUsedAt { get; init; }

        public DateTime ExpiresAt { get; init; }

        public DateTime? EndedAt { get; init; }

        public TokenRow ToToken() => new(Sha256, Account, Kind, Label, Scopes, CreatedAt, LastUsedAt, ExpiresAt, EndedAt);
    }
}
