using System.Security.Cryptography;
using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Storage.Stores;

internal sealed class LedgerStore(Session session) : ILedgerStore
{
    private static readonly SqlFolder Sql = new("Ledger");

    public async Task<long> LockAsync(CancellationToken cancellationToken)
    {
        await session.ExecuteAsync(Sql["Lock"], null, cancellationToken);
        return await SizeAsync(cancellationToken);
    }

    public Task<long> SizeAsync(CancellationToken cancellationToken) =>
        session.ValueAsync<long>(Sql["Size"], null, cancellationToken);

    public Task AddLeafAsync(LeafRow leaf, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["AddLeaf"], leaf, cancellationToken);

    public Task<IReadOnlyList<LeafRow>> LeavesAsync(long from, int limit, CancellationToken cancellationToken) =>
        session.QueryAsync<LeafRow>(Sql["Leaves"], new { from, limit }, cancellationToken);

    public Task AddNodesAsync(IReadOnlyList<NodeRow> nodes, CancellationToken cancellationToken) =>
        session.ExecuteAsync(
            Sql["AddNodes"],
            new
            {
                levels = nodes.Select(node => (short)node.Level).ToArray(),
                indexes = nodes.Select(node => node.Index).ToArray(),
                hashes = nodes.Select(node => node.Hash).ToArray(),
            },
            cancellationToken);

    public async Task<IReadOnlyList<byte[]>> NodesAsync(IReadOnlyList<(int Level, long Index)> nodes, CancellationToken cancellationToken)
    {
        if (nodes.Count == 0)
            return [];
        var found = await session.QueryAsync<Found>(
            Sql["Nodes"],
            new { levels = nodes.Select(node => (short)node.Level).ToArray(), indexes = nodes.Select(node => node.Index).ToArray() },
            cancellationToken);
        return found.Count == nodes.Count
            ? [.. found.Select(node => node.Hash)]
            : throw new InvalidOperationException($"The tree lacks {nodes.Count - found.Count} of {nodes.Count} hashes: run the audit.");
    }

    public Task AddCheckpointAsync(CheckpointRow checkpoint, CancellationToken cancellationToken) =>
        session.ExecuteAsync(Sql["AddCheckpoint"], checkpoint, cancellationToken);

    public Task<CheckpointRow?> NewestCheckpointAsync(CancellationToken cancellationToken) =>
        session.FindAsync<CheckpointRow>(Sql["NewestCheckpoint"], null, cancellationToken);

    public async Task<byte[]> AddBlobAsync(byte[] bytes, CancellationToken cancellationToken)
    {
        await session.ExecuteAsync(Sql["AddBlob"], new { bytes }, cancellationToken);
        return SHA256.HashData(bytes);
    }

    public Task<byte[]?> FindBlobAsync(byte[] sha256, CancellationToken cancellationToken) =>
        session.FindAsync<byte[]>(Sql["FindBlob"], new { sha256 }, cancellationToken);

    private sealed record Found(int Position, byte[] Hash);
}
