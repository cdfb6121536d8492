namespace ProtoLedger.Reports.Model;

/// <summary>Who changed what, when, and what the prediction was computed from.</summary>
/// <param name="ChangeRequest">Identifier of the change request.</param>
/// <param name="DocumentKind">protocol, scanner, conditions, catalogue or expectations.</param>
/// <param name="DocumentId">Identifier of the document.</param>
/// <param name="DocumentTitle">Title of the document.</param>
/// <param name="BaseVersion">Version that the edit starts from; null for a new document.</param>
/// <param name="ProposedVersion">Number that approval would give.</param>
/// <param name="Author">Account name.</param>
/// <param name="AuthorName">Name as people say it.</param>
/// <param name="Reason">The author's words.</param>
/// <param name="SubmittedAt">When the change was submitted, UTC.</param>
/// <param name="ComputedAt">When the run ended, UTC; the date printed as that of the report.</param>
/// <param name="RunId">Identifier of the regression run.</param>
/// <param name="ModelId">Identifier of the computing model.</param>
/// <param name="Hashes">Documents and conditions that went in, the base and the proposed document first.</param>
public sealed record ReportIdentity(
    string ChangeRequest,
    string DocumentKind,
    string DocumentId,
    string DocumentTitle,
    int? BaseVersion,
    int ProposedVersion,
    string Author,
    string AuthorName,
    string Reason,
    DateTimeOffset SubmittedAt,
    DateTimeOffset ComputedAt,
    string RunId,
    string ModelId,
    IReadOnlyList<NamedHash> Hashes);

/// <summary>SHA-256 of a named content.</summary>
/// <param name="Name">What was hashed, such as <c>proposed document</c>.</param>
/// <param name="Sha256">64 lower-case hexadecimal digits.</param>
public sealed record NamedHash(string Name, string Sha256);
