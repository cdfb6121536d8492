using ProtoLedger.Application.Documents;

namespace ProtoLedger.Application.Stores;

/// <summary>What was effective and what was loaded, where and when.</summary>
public interface IFactStore
{
    /// <summary>Records that a version is effective from a time on; an earlier fact of the same document and scanner ends there.</summary>
    /// <param name="fact">The fact.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddEffectiveAsync(EffectiveRow fact, CancellationToken cancellationToken);

    /// <summary>Facts with their intervals, by scanner and begin.</summary>
    /// <param name="key">Document.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<EffectiveInterval>> IntervalsAsync(DocumentKey key, CancellationToken cancellationToken);

    /// <summary>Intervals that hold at a time, of all documents of all kinds.</summary>
    /// <param name="at">UTC.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<EffectiveInterval>> EffectiveAtAsync(DateTime at, CancellationToken cancellationToken);

    /// <summary>Records that a version was entered at a console, or that a second person checked it.</summary>
    /// <param name="fact">The fact.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddLoadedAsync(LoadedRow fact, CancellationToken cancellationToken);

    /// <summary>Loading facts of a protocol, oldest first.</summary>
    /// <param name="protocol">Protocol identifier.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<LoadedRow>> LoadedAsync(string protocol, CancellationToken cancellationToken);
}

/// <summary>An effective fact as stored.</summary>
/// <param name="Key">Document.</param>
/// <param name="Version">Version.</param>
/// <param name="Scanner">Scanner identifier; <c>*</c> for documents of other kinds than protocol.</param>
/// <param name="From">UTC, microseconds, inclusive.</param>
/// <param name="RecordedAt">UTC, microseconds.</param>
/// <param name="RecordedBy">Account.</param>
/// <param name="ChangeRequestId">Request, or null for imported history.</param>
/// <param name="Imported">Predates the tool.</param>
public sealed record EffectiveRow(
    DocumentKey Key, int Version, string Scanner, DateTime From, DateTime RecordedAt, string RecordedBy, long? ChangeRequestId, bool Imported);

/// <summary>An effective fact with the end that the next one gave it.</summary>
/// <param name="Key">Document.</param>
/// <param name="Version">Version.</param>
/// <param name="Scanner">Scanner, or <c>*</c>.</param>
/// <param name="From">UTC, inclusive.</param>
/// <param name="Until">UTC, exclusive; null while it lasts.</param>
/// <param name="RecordedAt">UTC.</param>
/// <param name="RecordedBy">Account.</param>
/// <param name="ChangeRequestId">Request, or null.</param>
/// <param name="Imported">Predates the tool.</param>
public sealed record EffectiveInterval(
    DocumentKey Key,
    int Version,
    string Scanner,
    DateTime From,
    DateTime? Until,
    DateTime RecordedAt,
    string RecordedBy,
    long? ChangeRequestId,
    bool Imported);

/// <summary>A loading fact.</summary>
/// <param name="Protocol">Protocol identifier.</param>
/// <param name="Version">Version.</param>
/// <param name="Scanner">Scanner identifier.</param>
/// <param name="Step">entered or checked.</param>
/// <param name="Account">Who.</param>
/// <param name="At">UTC, microseconds.</param>
public sealed record LoadedRow(string Protocol, int Version, string Scanner, string Step, string Account, DateTime At);
