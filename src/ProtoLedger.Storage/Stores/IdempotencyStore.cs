using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class IdempotencyStore(Session session) : IIdempotencyStore
{
    private static readonly SqlFolder Sql = new("Idempotency");

    public Task<bool> TryLockAsync(string account, string key, CancellationToken cancellationToken) =>
        session.ValueAsync<bool>(Sql["TryLock"], new { account, key }, cancellationToken);

    public Task<KeptAnswer?> FindAsync(string account, string key, CancellationToken cancellationToken) =>
        session.FindAsync<KeptAnswer>(Sql["Find"], new { account, key }, cancellationToken);

    public Task AddAsync(string account, string key, KeptAnswer answer, CancellationToken cancellationToken) =>
        session.ExecuteAsync(
            Sql["Add"], new { account, key, answer.RequestSha256, answer.Response, answer.CreatedAt }, cancellationToken);
}
