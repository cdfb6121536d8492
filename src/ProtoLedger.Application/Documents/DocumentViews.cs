using System.Text.Json.Nodes;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.Documents;

/// <summary>A document in a list.</summary>
/// <param name="Kind">Kind.</param>
/// <param name="Id">Identifier.</param>
/// <param name="Title">Title of the newest version.</param>
/// <param name="Newest">Newest version.</param>
/// <param name="Effective">What is effective now, by scanner.</param>
public sealed record DocumentSummary(DocumentKind Kind, string Id, string Title, int Newest, IReadOnlyList<EffectiveInterval> Effective);

/// <summary>A version in a list.</summary>
/// <param name="Kind">Kind.</param>
/// <param name="Id">Identifier.</param>
/// <param name="Version">Number.</param>
/// <param name="Sha256">Of its canonical bytes, lower-case hexadecimal.</param>
/// <param name="BaseVersion">Version it was made from; 0 for the first.</param>
/// <param name="Author">Who proposed it; the stated author of imported history.</param>
/// <param name="Reason">Why.</param>
/// <param name="CreatedAt">When it was recorded here, UTC.</param>
/// <param name="StatedTime">Date that imported history states, UTC; null for versions approved here.</param>
/// <param name="Imported">True for history that predates the tool: not signed here.</param>
/// <param name="Source">Where imported history comes from, or null.</param>
/// <param name="ChangeRequestId">Request it came from, or null.</param>
/// <param name="Signatures">Signatures that approved it; empty for imported history.</param>
/// <param name="Effective">When and where it was effective.</param>
public sealed record VersionSummary(
    DocumentKind Kind,
    string Id,
    int Version,
    string Sha256,
    int BaseVersion,
    string Author,
    string Reason,
    DateTime CreatedAt,
    DateTime? StatedTime,
    bool Imported,
    string? Source,
    long? ChangeRequestId,
    IReadOnlyList<SignatureView> Signatures,
    IReadOnlyList<EffectiveInterval> Effective);

/// <summary>A version with its content.</summary>
/// <param name="Summary">What is known about it.</param>
/// <param name="Bytes">Canonical JSON bytes.</param>
/// <param name="Document">Parsed.</param>
public sealed record VersionDetail(VersionSummary Summary, byte[] Bytes, LedgerDocument Document);

/// <summary>Why a parameter is what it is.</summary>
/// <param name="Key">Document.</param>
/// <param name="Version">Version asked about.</param>
/// <param name="Pointer">JSON pointer asked about.</param>
/// <param name="Parameter">What is known about the parameter, or null.</param>
/// <param name="Settings">Versions that set it, newest first; the first one gave the present value.</param>
public sealed record ParameterProvenance(
    DocumentKey Key, int Version, string Pointer, ParameterInfo? Parameter, IReadOnlyList<ParameterSetting> Settings);

/// <summary>One version that set a parameter.</summary>
/// <param name="Version">The version: who, when, why, signed by whom, effective where.</param>
/// <param name="Pointer">Where the parameter stood in it.</param>
/// <param name="Value">The value that it set; null where it removed the parameter.</param>
/// <param name="PredictedEffect">Findings of the signed report, in words; empty for imported history.</param>
public sealed record ParameterSetting(VersionSummary Version, string Pointer, JsonNode? Value, IReadOnlyList<string> PredictedEffect);

/// <summary>What was effective at a time.</summary>
/// <param name="At">UTC.</param>
/// <param name="Versions">By protocol and scanner.</param>
/// <param name="Gap">Said where nothing is known, or null.</param>
public sealed record EffectiveAnswer(DateTime At, IReadOnlyList<EffectiveVersion> Versions, string? Gap);

/// <summary>A version that was effective on a scanner.</summary>
/// <param name="Interval">Where and from when until when.</param>
/// <param name="Version">The version.</param>
public sealed record EffectiveVersion(EffectiveInterval Interval, VersionSummary Version);
