namespace ProtoLedger.Application.Documents;

/// <summary>An immutable version of a document.</summary>
/// <param name="Key">Document.</param>
/// <param name="Version">Number, from 1, dense.</param>
/// <param name="Bytes">Canonical JSON bytes.</param>
/// <param name="Sha256">Their hash.</param>
/// <param name="BaseVersion">Version it was made from; 0 for the first.</param>
/// <param name="CreatedAt">When it was recorded here, UTC, microseconds.</param>
/// <param name="CreatedBy">Account whose last signature created it, or who imported it.</param>
/// <param name="Author">Account that proposed it, or the stated author of imported history.</param>
/// <param name="Reason">Why.</param>
/// <param name="ChangeRequestId">Request that it came from, or null for imported history.</param>
/// <param name="Imported">Predates the tool: not signed here.</param>
/// <param name="StatedTime">Date that imported history states, UTC, or null.</param>
/// <param name="Source">Where imported history comes from, or null.</param>
/// <param name="SourceSha256">Hash of the imported file, or null.</param>
public sealed record StoredVersion(
    DocumentKey Key,
    int Version,
    byte[] Bytes,
    byte[] Sha256,
    int BaseVersion,
    DateTime CreatedAt,
    string CreatedBy,
    string Author,
    string Reason,
    long? ChangeRequestId,
    bool Imported,
    DateTime? StatedTime,
    string? Source,
    byte[]? SourceSha256);
