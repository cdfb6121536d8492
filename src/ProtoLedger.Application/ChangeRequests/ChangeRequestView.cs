using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>A change request as any reader sees it, without the document's text.</summary>
/// <param name="Id">Number, from 1.</param>
/// <param name="Kind">Kind of the document.</param>
/// <param name="DocumentId">Identifier of the document.</param>
/// <param name="BaseVersion">Version it stands on; 0 for a new document.</param>
/// <param name="Reason">Why, as the author wrote it.</param>
/// <param name="Author">Account name.</param>
/// <param name="AuthorName">Display name.</param>
/// <param name="State">State.</param>
/// <param name="RowVersion">Counts every change of this record; the entity tag.</param>
/// <param name="Sha256">Of the proposed document's canonical bytes, lower-case hexadecimal.</param>
/// <param name="CreatedAt">UTC.</param>
/// <param name="SubmittedAt">UTC, or null.</param>
/// <param name="DecidedAt">UTC, or null.</param>
/// <param name="DecidedBy">Account that declined, withdrew or gave the last signature; null before.</param>
/// <param name="DecisionReason">Reason of a decline or withdrawal, or null.</param>
/// <param name="Version">Version that approval created, or null.</param>
/// <param name="Imported">True for history that predates the tool.</param>
/// <param name="RunId">Regression run for the present content, or null.</param>
/// <param name="ReportReady">True when the change report for the present content is stored.</param>
/// <param name="RequiredSignatures">Signatures that approval needs.</param>
/// <param name="Signatures">Signatures given, oldest first, dropped ones marked.</param>
public sealed record ChangeRequestView(
    long Id,
    DocumentKind Kind,
    string DocumentId,
    int BaseVersion,
    string Reason,
    string Author,
    string AuthorName,
    ChangeRequestState State,
    long RowVersion,
    string Sha256,
    DateTime CreatedAt,
    DateTime? SubmittedAt,
    DateTime? DecidedAt,
    string? DecidedBy,
    string? DecisionReason,
    int? Version,
    bool Imported,
    long? RunId,
    bool ReportReady,
    IReadOnlyList<RequiredSignature> RequiredSignatures,
    IReadOnlyList<SignatureView> Signatures);

/// <summary>A signature as any reader sees it.</summary>
/// <param name="Number">From 1, within the request.</param>
/// <param name="Signer">Account name.</param>
/// <param name="SignerName">Printed name.</param>
/// <param name="Role">Role in which it was given.</param>
/// <param name="Meaning">What it says.</param>
/// <param name="Time">UTC, of the server's clock.</param>
/// <param name="CertificateSha256">Of the signer's certificate, lower-case hexadecimal.</param>
/// <param name="Current">False when the content changed afterwards and the signature no longer counts.</param>
public sealed record SignatureView(
    int Number, string Signer, string SignerName, string Role, string Meaning, DateTime Time, string CertificateSha256, bool Current);

/// <summary>A change request with its document.</summary>
/// <param name="Request">The request.</param>
/// <param name="Document">Canonical JSON bytes of the proposed document.</param>
/// <param name="Base">Canonical JSON bytes of the base version, or null for a new document.</param>
public sealed record ChangeRequestDetail(ChangeRequestView Request, byte[] Document, byte[]? Base);

/// <summary>A remark on a request or on one of its parameters.</summary>
/// <param name="Number">From 1, within the request.</param>
/// <param name="Author">Account name.</param>
/// <param name="AuthorName">Display name.</param>
/// <param name="Pointer">JSON pointer of the parameter, or null for the whole request.</param>
/// <param name="Text">1 to 4,000 characters.</param>
/// <param name="Time">UTC.</param>
public sealed record CommentView(int Number, string Author, string AuthorName, string? Pointer, string Text, DateTime Time);
