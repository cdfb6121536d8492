using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class DocumentStore(Session session) : IDocumentStore
{
    private static readonly SqlFolder Sql = new("Documents");

    public Task AddAsync(StoredVersion version, CancellationToken cancellationToken) =>
        session.ExecuteAsync(
            Sql["Add"],
            new
            {
                kind = version.Key.KindWord,
                id = version.Key.Id,
                version.Version,
                version.Bytes,
                version.Sha256,
                version.BaseVersion,
                version.CreatedAt,
                version.CreatedBy,
                version.Author,
                version.Reason,
                version.ChangeRequestId,
                version.Imported,
                version.StatedTime,
                version.Source,
                version.SourceSha256,
            },
            cancellationToken);

    public async Task<StoredVersion?> FindAsync(DocumentKey key, int version, CancellationToken cancellationToken) =>
        (await session.FindAsync<Row>(Sql["Find"], new { kind = key.KindWord, id = key.Id, version }, cancellationToken))?.ToVersion();

    public Task<int> NewestAsync(DocumentKey key, CancellationToken cancellationToken) =>
        session.ValueAsync<int>(Sql["Newest"], new { kind = key.KindWord, id = key.Id }, cancellationToken);

    public Task<IReadOnlyList<StoredVersion>> VersionsAsync(DocumentKey key, CancellationToken cancellationToken) =>
        ListAsync("Versions", new { kind = key.KindWord, id = key.Id }, cancellationToken);

    public Task<IReadOnlyList<StoredVersion>> AllAsync(DocumentKind kind, CancellationToken cancellationToken) =>
        ListAsync("All", new { kind = DocumentKey.Word(kind) }, cancellationToken);

    public Task<IReadOnlyList<StoredVersion>> NewestOfEachAsync(DocumentKind kind, string? after, int limit, CancellationToken cancellationToken) =>
        ListAsync("NewestOfEach", new { kind = DocumentKey.Word(kind), after, limit }, cancellationToken);

    public Task<long> CountAsync(CancellationToken cancellationToken) =>
        session.ValueAsync<long>(Sql["Count"], null, cancellationToken);

    private async Task<IReadOnlyList<StoredVersion>> ListAsync(string operation, object arguments, CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<Row>(Sql[operation], arguments, cancellationToken)).Select(row => row.ToVersion())];

    private sealed class Row
    {
        public string Kind { get; init; } = "";

        public string Id { get; init; } = "";

        public int Version { get; init; }

        public byte[] Bytes { get; init; } = [];

        public byte[] Sha256 { get; init; } = [];

        public int BaseVersion { get; init; }

        public DateTime CreatedAt { get; init; }

        public string CreatedBy { get; init; } = "";

        public string Author { get; init; } = "";

        public string Reason { get; init; } = "";

        public long? ChangeRequestId { get; init; }

        public bool Imported { get; init; }

        public DateTime? StatedTime { get; init; }

        public string? Source { get; init; }

        public byte[]? SourceSha256 { get; init; }

        public StoredVersion ToVersion() =>
            new(Rows.Key(Kind, Id), Version, Bytes, Sha256, BaseVersion, CreatedAt, CreatedBy, Author, Reason, ChangeRequestId, Imported, StatedTime, Source, SourceSha256);
    }
}
