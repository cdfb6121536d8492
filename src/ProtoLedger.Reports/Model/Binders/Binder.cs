namespace ProtoLedger.Reports.Model.Binders;

/// <summary>Everything that a bundle's pages say to people.</summary>
/// <param name="Identity">What was asked for, and when it was made.</param>
/// <param name="Effective">What was effective where and since when, within or into the period.</param>
/// <param name="Log">Every change request that touches it, decided or not, and imported history.</param>
/// <param name="Signatures">Every signature given, with the roles of that time.</param>
/// <param name="Loadings">What was entered and checked at consoles.</param>
/// <param name="OtherFacts">Facts of every other kind.</param>
/// <param name="Gaps">What is not known, stated by whoever gathered it; gaps in the effective table are found by the binder itself.</param>
/// <param name="Files">Files of the bundle that a reader may open.</param>
public sealed record Binder(
    BinderIdentity Identity,
    IReadOnlyList<EffectiveLine> Effective,
    IReadOnlyList<LogEntry> Log,
    IReadOnlyList<SignatureLine> Signatures,
    IReadOnlyList<LoadingLine> Loadings,
    IReadOnlyList<FactLine> OtherFacts,
    IReadOnlyList<string> Gaps,
    IReadOnlyList<BinderFile> Files);

/// <summary>What the binder covers.</summary>
/// <param name="Site">Name of the site.</param>
/// <param name="Protocol">Identifier of the protocol asked for; null for all.</param>
/// <param name="Scanner">Identifier of the scanner asked for; null for all.</param>
/// <param name="From">Begin of the period, UTC.</param>
/// <param name="Until">End of the period, UTC.</param>
/// <param name="MadeAt">When it was made, UTC.</param>
/// <param name="MadeBy">Account that asked for it.</param>
/// <param name="LedgerSize">Number of ledger entries of the checkpoint inside.</param>
/// <param name="LedgerRoot">Root hash of that checkpoint, hexadecimal.</param>
/// <param name="FirstRecordAt">Time of the oldest ledger entry, UTC; null for an empty ledger. What lies before it was stated, not recorded.</param>
public sealed record BinderIdentity(
    string Site,
    string? Protocol,
    string? Scanner,
    DateTimeOffset From,
    DateTimeOffset Until,
    DateTimeOffset MadeAt,
    string MadeBy,
    long LedgerSize,
    string LedgerRoot,
    DateTimeOffset? FirstRecordAt);

/// <summary>A version that was effective on a scanner for a time.</summary>
/// <param name="ProtocolId">Document.</param>
/// <param name="Title">Title of that version.</param>
/// <param name="Version">Version.</param>
/// <param name="ScannerId">Scanner; <c>*</c> for documents that hold everywhere.</param>
/// <param name="ScannerTitle">Title of the scanner.</param>
/// <param name="From">Inclusive, UTC.</param>
/// <param name="Until">Exclusive, UTC; null while it lasts.</param>
/// <param name="RecordedBy">Name of who recorded it.</param>
/// <param name="Imported">True where it was taken over from stated history and not signed here.</param>
/// <param name="Sha256">Of the document, hexadecimal.</param>
public sealed record EffectiveLine(
    string ProtocolId,
    string Title,
    int Version,
    string ScannerId,
    string ScannerTitle,
    DateTimeOffset From,
    DateTimeOffset? Until,
    string RecordedBy,
    bool Imported,
    string Sha256);

/// <summary>A change, whatever became of it.</summary>
/// <param name="Number">Number of the change request; empty for imported history.</param>
/// <param name="DocumentKind">protocol, scanner, conditions, catalogue or expectations.</param>
/// <param name="DocumentId">Document.</param>
/// <param name="At">When it was decided, or stated for imported history, UTC.</param>
/// <param name="What">The changed parameters in words, one each.</param>
/// <param name="Why">Reason given by the author.</param>
/// <param name="Author">Name and account.</param>
/// <param name="Outcome">approved, declined, withdrawn, imported, under review or draft.</param>
/// <param name="Version">Version that it made; null where it made none.</param>
/// <param name="DecidedBy">Names of who decided; empty where nobody has.</param>
/// <param name="DecisionReason">Reason of the decision, or empty.</param>
/// <param name="Report">Name of the report's file in the bundle, or null.</param>
public sealed record LogEntry(
    string Number,
    string DocumentKind,
    string DocumentId,
    DateTimeOffset At,
    IReadOnlyList<string> What,
    string Why,
    string Author,
    string Outcome,
    int? Version,
    string DecidedBy,
    string DecisionReason,
    string? Report);

/// <summary>A signature with what it said and in which role it was given.</summary>
/// <param name="Number">Number of the change request.</param>
/// <param name="Signer">Printed name.</param>
/// <param name="Account">Account name.</param>
/// <param name="RoleThen">Role at the time of signing.</param>
/// <param name="Meaning">What the signature says.</param>
/// <param name="At">Time, UTC.</param>
/// <param name="State">In words: "counts", or why it no longer does.</param>
/// <param name="CertificateSha256">Of the certificate, hexadecimal.</param>
/// <param name="File">Name of the signature's file in the bundle.</param>
public sealed record SignatureLine(
    string Number, string Signer, string Account, string RoleThen, string Meaning, DateTimeOffset At, string State, string CertificateSha256, string File);

/// <summary>A version that was entered or checked at a console.</summary>
/// <param name="ProtocolId">Protocol.</param>
/// <param name="Version">Version.</param>
/// <param name="ScannerTitle">Scanner.</param>
/// <param name="Step">entered or checked.</param>
/// <param name="Who">Name.</param>
/// <param name="At">Time, UTC.</param>
public sealed record LoadingLine(string ProtocolId, int Version, string ScannerTitle, string Step, string Who, DateTimeOffset At);

/// <summary>A fact of the ledger that has no table of its own.</summary>
/// <param name="Index">Its place in the ledger, from 0.</param>
/// <param name="At">Time, UTC.</param>
/// <param name="Type">Type of the fact.</param>
/// <param name="Actor">Account.</param>
/// <param name="Subject">What it is about.</param>
public sealed record FactLine(long Index, DateTimeOffset At, string Type, string Actor, string Subject);

/// <summary>A file of the bundle.</summary>
/// <param name="Name">Path in the bundle: lower-case letters, digits, <c>. _ - /</c>.</param>
/// <param name="What">What it is, in words.</param>
/// <param name="Sha256">Hexadecimal.</param>
public sealed record BinderFile(string Name, string What, string Sha256);
