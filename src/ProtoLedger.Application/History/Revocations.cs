using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Application.History;

/// <summary>Stored revocations as the authority lists them.</summary>
internal static class Revocations
{
    /// <summary>All of them.</summary>
    public static async Task<IReadOnlyList<Revocation>> ListAsync(IStores stores, CancellationToken cancellationToken)
    {
        var list = new List<Revocation>();
        foreach (var row in await stores.Keys.RevocationsAsync(cancellationToken))
        {
            var key = await stores.Keys.FindCertificateAsync(row.CertificateSha256, cancellationToken)
                ?? throw new InvalidOperationException("A revocation names a certificate that is not stored.");
            var reason = row.Reason == "superseded" ? RevocationReason.Superseded : RevocationReason.Unspecified;
            list.Add(new Revocation(SigningCertificate.Parse(key.Certificate).Require().Serial, new DateTimeOffset(row.RevokedAt), reason));
        }

        return list;
    }
}
