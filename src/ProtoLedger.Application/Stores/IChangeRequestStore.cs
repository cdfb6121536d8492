using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;

namespace ProtoLedger.Application.Stores;

/// <summary>Change requests and what hangs on them.</summary>
public interface IChangeRequestStore
{
    /// <summary>Stores a new request and gives it its number.</summary>
    /// <param name="row">The row; its Id is ignored.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<long> AddAsync(ChangeRequestRow row, CancellationToken cancellationToken);

    /// <summary>The request, or null; locked against other writers until the transaction ends when asked.</summary>
    /// <param name="id">Number.</param>
    /// <param name="forUpdate">Lock it.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<ChangeRequestRow?> FindAsync(long id, bool forUpdate, CancellationToken cancellationToken);

    /// <summary>Writes every changeable column and counts the row version up; false when it was not <paramref name="row"/>.RowVersion any more.</summary>
    /// <param name="row">New values; RowVersion is the version read.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<bool> UpdateAsync(ChangeRequestRow row, CancellationToken cancellationToken);

    /// <summary>Requests, newest first, before a number.</summary>
    /// <param name="filter">What to list.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<ChangeRequestRow>> ListAsync(ChangeRequestFilter filter, CancellationToken cancellationToken);

    /// <summary>Numbers of all requests under review, ascending.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<long>> UnderReviewAsync(CancellationToken cancellationToken);

    /// <summary>Another request under review for the same document, or null.</summary>
    /// <param name="key">Document.</param>
    /// <param name="except">Number to leave out.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<long?> PendingAsync(DocumentKey key, long except, CancellationToken cancellationToken);

    /// <summary>Stores the hashes of a finished report.</summary>
    /// <param name="report">The report.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddReportAsync(ReportRow report, CancellationToken cancellationToken);

    /// <summary>Newest report of the request for these bytes, or null.</summary>
    /// <param name="id">Request.</param>
    /// <param name="documentSha256">Hash of the proposed document.</param>
    /// <param name="round">Round of review.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<ReportRow?> FindReportAsync(long id, byte[] documentSha256, int round, CancellationToken cancellationToken);

    /// <summary>Stores a signature.</summary>
    /// <param name="signature">The signature.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddSignatureAsync(SignatureRow signature, CancellationToken cancellationToken);

    /// <summary>All signatures of a request, oldest first.</summary>
    /// <param name="id">Request.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<SignatureRow>> SignaturesAsync(long id, CancellationToken cancellationToken);

    /// <summary>Stores a remark; its number is the next of the request.</summary>
    /// <param name="id">Request.</param>
    /// <param name="comment">The remark; its number is ignored.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<int> AddCommentAsync(long id, CommentView comment, CancellationToken cancellationToken);

    /// <summary>Remarks, oldest first.</summary>
    /// <param name="id">Request.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<CommentView>> CommentsAsync(long id, CancellationToken cancellationToken);
}

/// <summary>A change request as stored.</summary>
/// <param name="Id">Number.</param>
/// <param name="Key">Document.</param>
/// <param name="BaseVersion">Version it stands on; 0 for a new document.</param>
/// <param name="Bytes">Canonical bytes of the proposed document.</param>
/// <param name="Sha256">Their hash.</param>
/// <param name="Reason">Why.</param>
/// <param name="Author">Account.</param>
/// <param name="AuthorName">Display name at creation.</param>
/// <param name="State">State.</param>
/// <param name="RowVersion">Counts changes, from 1.</param>
/// <param name="Round">Counts changes of content or base while under review, from 1; signatures belong to a round.</param>
/// <param name="CreatedAt">UTC, microseconds.</param>
/// <param name="SubmittedAt">UTC, or null.</param>
/// <param name="DecidedAt">UTC, or null.</param>
/// <param name="DecidedBy">Account, or null.</param>
/// <param name="DecisionReason">Text, or null.</param>
/// <param name="Version">Version that approval created, or null.</param>
/// <param name="Imported">Predates the tool.</param>
/// <param name="Source">Where imported history comes from, or null.</param>
/// <param name="RunId">Run for the present content, or null.</param>
public sealed record ChangeRequestRow(
    long Id,
    DocumentKey Key,
    int BaseVersion,
    byte[] Bytes,
    byte[] Sha256,
    string Reason,
    string Author,
    string AuthorName,
    ChangeRequestState State,
    long RowVersion,
    int Round,
    DateTime CreatedAt,
    DateTime? SubmittedAt = null,
    DateTime? DecidedAt = null,
    string? DecidedBy = null,
    string? DecisionReason = null,
    int? Version = null,
    bool Imported = false,
    string? Source = null,
    long? RunId = null);

/// <summary>What to list.</summary>
/// <param name="State">Only this state, or null for all.</param>
/// <param name="Document">Only this document, or null for all.</param>
/// <param name="Author">Only this author, or null for all.</param>
/// <param name="Before">Only numbers below, or null for the newest.</param>
/// <param name="Limit">Most rows, 1 to 200.</param>
public sealed record ChangeRequestFilter(
    ChangeRequestState? State = null, DocumentKey? Document = null, string? Author = null, long? Before = null, int Limit = 50);

/// <summary>A finished report of a change request. Its bytes are blobs, made once.</summary>
/// <param name="ChangeRequestId">Request.</param>
/// <param name="DocumentSha256">Hash of the proposed document that it speaks of.</param>
/// <param name="Round">Round of review.</param>
/// <param name="RunId">Run that it was made from.</param>
/// <param name="ModelId">Model that predicted.</param>
/// <param name="JsonSha256">report.json.</param>
/// <param name="MarkdownSha256">report.md.</param>
/// <param name="HtmlSha256">report.html.</param>
/// <param name="InputsSha256">Canonical JSON that names every input document with its hash.</param>
/// <param name="CreatedAt">UTC, microseconds.</param>
public sealed record ReportRow(
    long ChangeRequestId,
    byte[] DocumentSha256,
    int Round,
    long RunId,
    string ModelId,
    byte[] JsonSha256,
    byte[] MarkdownSha256,
    byte[] HtmlSha256,
    byte[] InputsSha256,
    DateTime CreatedAt);

/// <summary>A signature as stored.</summary>
/// <param name="ChangeRequestId">Request.</param>
/// <param name="Number">From 1.</param>
/// <param name="Round">Round of review in which it counts.</param>
/// <param name="Signer">Account.</param>
/// <param name="SignerName">Printed name.</param>
/// <param name="Role">Role in which it was given.</param>
/// <param name="Meaning">What it says.</param>
/// <param name="Time">UTC, microseconds.</param>
/// <param name="CertificateSha256">Of the signer's certificate.</param>
/// <param name="Manifest">Canonical JSON bytes that were signed.</param>
/// <param name="Cms">The detached CMS signature, DER.</param>
public sealed record SignatureRow(
    long ChangeRequestId,
    int Number,
    int Round,
    string Signer,
    string SignerName,
    string Role,
    string Meaning,
    DateTime Time,
    byte[] CertificateSha256,
    byte[] Manifest,
    byte[] Cms);
