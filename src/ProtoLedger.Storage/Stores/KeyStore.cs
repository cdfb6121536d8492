using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class KeyStore(Session session) : IKeyStore
{
    private static readonly SqlFolder Sql = new("Keys");

    public Task<SiteKeyRow?> FindSiteKeyAsync(CancellationToken cancellationToken) =>
        session.FindAsync<SiteKeyRow>(Sql["FindSiteKey"], null, cancellationToken);

    public async Task<bool> AddSiteKeyAsync(SiteKeyRow key, CancellationToken cancellationToken) =>
        await session.ExecuteAsync(Sql["AddSiteKey"], key, cancellationToken) == 1;

    public Task AddPersonKeyAsync(PersonKeyRow key, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["AddPersonKey"], key, cancellationToken);

    public Task<PersonKeyRow?> FindPersonKeyAsync(string account, CancellationToken cancellationToken) =>
        session.FindAsync<PersonKeyRow>(Sql["FindPersonKey"], new { account }, cancellationToken);

    public Task<PersonKeyRow?> FindCertificateAsync(byte[] sha256, CancellationToken cancellationToken) =>
        session.FindAsync<PersonKeyRow>(Sql["FindCertificate"], new { sha256 }, cancellationToken);

    public Task AddRevocationAsync(RevocationRow revocation, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["AddRevocation"], revocation, cancellationToken);

    public Task<IReadOnlyList<RevocationRow>> RevocationsAsync(CancellationToken cancellationToken) =>
        session.QueryAsync<RevocationRow>(Sql["Revocations"], null, cancellationToken);
}
