using ProtoLedger.Application.Documents;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.Stores;

/// <summary>Immutable versions of documents.</summary>
public interface IDocumentStore
{
    /// <summary>Stores a version. The pair (key, version) is unique; numbers are dense.</summary>
    /// <param name="version">The version with its bytes.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddAsync(StoredVersion version, CancellationToken cancellationToken);

    /// <summary>One version, or null.</summary>
    /// <param name="key">Document.</param>
    /// <param name="version">Number, ≥ 1.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<StoredVersion?> FindAsync(DocumentKey key, int version, CancellationToken cancellationToken);

    /// <summary>Newest version number; 0 where there is none.</summary>
    /// <param name="key">Document.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<int> NewestAsync(DocumentKey key, CancellationToken cancellationToken);

    /// <summary>All versions of one document, oldest first.</summary>
    /// <param name="key">Document.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<StoredVersion>> VersionsAsync(DocumentKey key, CancellationToken cancellationToken);

    /// <summary>Every version of a kind, by identifier and number.</summary>
    /// <param name="kind">Kind.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<StoredVersion>> AllAsync(DocumentKind kind, CancellationToken cancellationToken);

    /// <summary>Newest version of each document of a kind, by identifier, after a cursor.</summary>
    /// <param name="kind">Kind.</param>
    /// <param name="after">Identifier to start after, or null.</param>
    /// <param name="limit">Most rows.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<StoredVersion>> NewestOfEachAsync(DocumentKind kind, string? after, int limit, CancellationToken cancellationToken);

    /// <summary>Number of stored versions of all kinds.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<long> CountAsync(CancellationToken cancellationToken);
}
