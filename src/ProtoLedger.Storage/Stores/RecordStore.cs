using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class RecordStore(Session session) : IRecordStore
{
    private static readonly SqlFolder Sql = new("Records");

    public async Task<IReadOnlyList<EffectiveRow>> EffectiveAsync(CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<EffectiveFact>(Sql["Effective"], null, cancellationToken)).Select(row => row.ToRow())];

    public Task<IReadOnlyList<LoadedRow>> LoadedAsync(CancellationToken cancellationToken) =>
        session.QueryAsync<LoadedRow>(Sql["Loaded"], null, cancellationToken);

    public Task<IReadOnlyList<SignatureRow>> SignaturesAsync(CancellationToken cancellationToken) =>
        session.QueryAsync<SignatureRow>(Sql["Signatures"], null, cancellationToken);

    public Task<IReadOnlyList<PersonKeyRow>> CertificatesAsync(CancellationToken cancellationToken) =>
        session.QueryAsync<PersonKeyRow>(Sql["Certificates"], null, cancellationToken);

    public async Task<IReadOnlyList<ChangeRequestRow>> ChangeRequestsAsync(CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<ChangeRequestStore.Row>(Sql["ChangeRequests"], null, cancellationToken)).Select(row => row.ToRequest())];

    public async Task<IReadOnlyList<NodeRow>> NodesAsync(CancellationToken cancellationToken) =>
        [.. (await session.QueryAsync<Node>(Sql["Nodes"], null, cancellationToken)).Select(node => new NodeRow(node.Level, node.Index, node.Hash))];

    public Task<IReadOnlyList<CheckpointRow>> CheckpointsAsync(CancellationToken cancellationToken) =>
        session.QueryAsync<CheckpointRow>(Sql["Checkpoints"], null, cancellationToken);

    private sealed record Node(short Level, long Index, byte[] Hash);

    private sealed class EffectiveFact
    {
        public string Kind { get; init; } = "";

        public string DocumentId { get; init; } = "";

        public int Version { get; init; }

        public string Scanner { get; init; } = "";

        public DateTime ValidFrom { get; init; }

        public DateTime RecordedAt { get; init; }

        public string RecordedBy { get; init; } = "";

        public long? ChangeRequestId { get; init; }

        public bool Imported { get; init; }

        public EffectiveRow ToRow() =>
            new(Rows.Key(Kind, DocumentId), Version, Scanner, ValidFrom, RecordedAt, RecordedBy, ChangeRequestId, Imported);
    }
}
