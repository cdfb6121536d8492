using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class AuditStore(Session session) : IAuditStore
{
    private static readonly SqlFolder Sql = new("Audit");

    public Task AddAsync(AuditEvent auditEvent, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["Add"], auditEvent, cancellationToken);

    public Task<IReadOnlyList<AuditEvent>> ListAsync(AuditFilter filter, CancellationToken cancellationToken) =>
        session.QueryAsync<AuditEvent>(Sql["List"], filter, cancellationToken);
}
