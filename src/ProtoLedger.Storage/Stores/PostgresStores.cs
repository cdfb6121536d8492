using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

/// <summary>The stores of one session.</summary>
internal sealed class PostgresStores(Session session) : IStores
{
    public IDocumentStore Documents { get; } = new DocumentStore(session);

    public IChangeRequestStore ChangeRequests { get; } = new ChangeRequestStore(session);

    public IFactStore Facts { get; } = new FactStore(session);

    public ILedgerStore Ledger { get; } = new LedgerStore(session);

    public IRunStore Runs { get; } = new RunStore(session);

    public IAccountStore Accounts { get; } = new AccountStore(session);

    public IKeyStore Keys { get; } = new KeyStore(session);

    public IRecordStore Records { get; } = new RecordStore(session);

    public IAuditStore Audit { get; } = new AuditStore(session);

    public IIdempotencyStore Idempotency { get; } = new IdempotencyStore(session);
}
