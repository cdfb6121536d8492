using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Store;

/// <summary>One event of the time before the tool: a version that came into use, or a proposal that did not.</summary>
/// <param name="Kind">Kind of the document.</param>
/// <param name="Id">Identifier of the document.</param>
/// <param name="Version">Number of the version, from 1 without a gap; null for a proposal.</param>
/// <param name="Proposal">Name of the file under <c>proposals/</c>, without ending; null for a version.</param>
/// <param name="BaseVersion">Version on which it was built; null for the first one.</param>
/// <param name="StatedTime">When it happened, as the source states it, UTC.</param>
/// <param name="StatedBy">Who made it, as the source states it.</param>
/// <param name="Reason">Why.</param>
/// <param name="Source">Where this is written down.</param>
/// <param name="Outcome">Imported, declined or withdrawn.</param>
/// <param name="DecidedBy">Who decided about a proposal; null where nobody is named.</param>
/// <param name="DecisionReason">Why it was decided so; null where it is not written down.</param>
public sealed record HistoryEntry(
    DocumentKind Kind,
    string Id,
    int? Version,
    string? Proposal,
    int? BaseVersion,
    DateTimeOffset StatedTime,
    string StatedBy,
    string Reason,
    string Source,
    HistoryOutcome Outcome,
    string? DecidedBy,
    string? DecisionReason)
{
    /// <summary>Path of the document's file below the store's folder, with forward slashes.</summary>
    public string Path => Version is { } version
        ? FormattableString.Invariant($"{StoreFolder.Of(Kind)}/{Id}/v{version:0000}.yaml")
        : $"proposals/{Proposal}.yaml";
}

/// <summary>What became of an event of the history.</summary>
public enum HistoryOutcome
{
    /// <summary>A version that came into use and is taken over, not signed here.</summary>
    Imported,

    /// <summary>A proposal that was declined.</summary>
    Declined,

    /// <summary>A proposal that its author took back.</summary>
    Withdrawn,
}

/// <summary>A person of the demonstration.</summary>
/// <param name="Name">Account name.</param>
/// <param name="DisplayName">Name as people write it.</param>
/// <param name="Role">Role.</param>
public sealed record StorePerson(string Name, string DisplayName, string Role);
