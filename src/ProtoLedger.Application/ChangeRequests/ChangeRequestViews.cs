using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>Makes views of stored requests.</summary>
internal static class ChangeRequestViews
{
    private static readonly RequiredSignature Physicist = new(Roles.Physicist, "approved", []);

    /// <summary>Signatures that approval of the document needs: its own rule for a protocol, a physicist's otherwise.</summary>
    public static IReadOnlyList<RequiredSignature> Required(LedgerDocument document) =>
        document is ProtocolDocument { RequiredSignatures: { Count: > 0 } own } ? own : [Physicist];

    /// <summary>The view of a row.</summary>
    public static async Task<ChangeRequestView> ViewAsync(
        this ChangeRequestRow row, IStores stores, DocumentShelf shelf, CancellationToken cancellationToken)
    {
        var signatures = await stores.ChangeRequests.SignaturesAsync(row.Id, cancellationToken);
        var report = await stores.ChangeRequests.FindReportAsync(row.Id, row.Sha256, row.Round, cancellationToken);
        return new ChangeRequestView(
            row.Id, row.Key.Kind, row.Key.Id, row.BaseVersion, row.Reason, row.Author, row.AuthorName, row.State, row.RowVersion,
            Convert.ToHexStringLower(row.Sha256), row.CreatedAt, row.SubmittedAt, row.DecidedAt, row.DecidedBy, row.DecisionReason,
            row.Version, row.Imported, row.RunId, report is not null && report.RunId == row.RunId, Required(shelf.Read(row.Sha256, row.Bytes)),
            [.. signatures.Select(signature => View(signature, row))]);
    }

    /// <summary>The view of a signature.</summary>
    public static SignatureView View(SignatureRow signature, ChangeRequestRow row) => new(
        signature.Number, signature.Signer, signature.SignerName, signature.Role, signature.Meaning, signature.Time,
        Convert.ToHexStringLower(signature.CertificateSha256), signature.Round == row.Round);
}
