using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>Makes views of stored requests.</summary>
internal static class ChangeRequestViews
{
    private static readonly RequiredSignature Physicist = new(Roles.Physicist, "approved", []);

    /// <summary>
    /// Signatures that approval needs: those of the version that the proposal replaces (a physicist's for a new document and for what is
    /// no protocol), then what the proposed rule adds. A proposal can add to the rule that decides on it; roles and deputies that it takes
    /// away or names count only for the edits after it.
    /// </summary>
    public static async Task<IReadOnlyList<RequiredSignature>> RequiredAsync(
        this ChangeRequestRow row, IStores stores, DocumentShelf shelf, CancellationToken cancellationToken)
    {
        var replaced = row.BaseVersion == 0 ? null : await stores.Documents.FindAsync(row.Key, row.BaseVersion, cancellationToken);
        var standing = replaced is null ? [Physicist] : Rule(shelf.Read(replaced));
        var added = Rule(shelf.Read(row.Sha256, row.Bytes))
            .Where(wanted => !standing.Any(known => known.Role == wanted.Role && known.Meaning == wanted.Meaning));
        return [.. standing, .. added];
    }

    /// <summary>The view of a row.</summary>
    public static async Task<ChangeRequestView> ViewAsync(
        this ChangeRequestRow row, IStores stores, DocumentShelf shelf, CancellationToken cancellationToken)
    {
        var signatures = await stores.ChangeRequests.SignaturesAsync(row.Id, cancellationToken);
        var report = await stores.ChangeRequests.FindReportAsync(row.Id, row.Sha256, row.Round, cancellationToken);
        return new ChangeRequestView(
            row.Id, row.Key.Kind, row.Key.Id, row.BaseVersion, row.Reason, row.Author, row.AuthorName, row.State, row.RowVersion,
            Convert.ToHexStringLower(row.Sha256), row.CreatedAt, row.SubmittedAt, row.DecidedAt, row.DecidedBy, row.DecisionReason,
            row.Version, row.Imported, row.RunId, report is not null && report.RunId == row.RunId, await row.RequiredAsync(stores, shelf, cancellationToken),
            [.. signatures.Select(signature => View(signature, row))]);
    }

    /// <summary>The view of a signature.</summary>
    public static SignatureView View(SignatureRow signature, ChangeRequestRow row) => new(
        signature.Number, signature.Signer, signature.SignerName, signature.Role, signature.Meaning, signature.Time,
        Convert.ToHexStringLower(signature.CertificateSha256), signature.Round == row.Round);

    private static IReadOnlyList<RequiredSignature> Rule(LedgerDocument document) =>
        document is ProtocolDocument { RequiredSignatures: { Count: > 0 } own } ? own : [Physicist];
}
