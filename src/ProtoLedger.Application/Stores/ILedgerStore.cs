namespace ProtoLedger.Application.Stores;

/// <summary>Leaves, complete subtree hashes, checkpoints, and blobs by hash. Appends are serialised by <see cref="LockAsync"/>.</summary>
public interface ILedgerStore
{
    /// <summary>Waits for the one append lock; it is held until the transaction ends. Gives the number of leaves.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<long> LockAsync(CancellationToken cancellationToken);

    /// <summary>Number of leaves.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<long> SizeAsync(CancellationToken cancellationToken);

    /// <summary>Stores a leaf.</summary>
    /// <param name="leaf">Its sequence is the number of leaves before it.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddLeafAsync(LeafRow leaf, CancellationToken cancellationToken);

    /// <summary>Leaves from a sequence number on, in order.</summary>
    /// <param name="from">First sequence number.</param>
    /// <param name="limit">Most rows.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<LeafRow>> LeavesAsync(long from, int limit, CancellationToken cancellationToken);

    /// <summary>Stores hashes of complete subtrees.</summary>
    /// <param name="nodes">Nodes.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddNodesAsync(IReadOnlyList<NodeRow> nodes, CancellationToken cancellationToken);

    /// <summary>Hashes of complete subtrees, in the order asked.</summary>
    /// <param name="nodes">Level and index of each.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<IReadOnlyList<byte[]>> NodesAsync(IReadOnlyList<(int Level, long Index)> nodes, CancellationToken cancellationToken);

    /// <summary>Stores a checkpoint.</summary>
    /// <param name="checkpoint">The checkpoint.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task AddCheckpointAsync(CheckpointRow checkpoint, CancellationToken cancellationToken);

    /// <summary>Newest checkpoint, or null on an empty ledger.</summary>
    /// <param name="cancellationToken">Stops it.</param>
    Task<CheckpointRow?> NewestCheckpointAsync(CancellationToken cancellationToken);

    /// <summary>Stores a blob unless it is there; gives its SHA-256.</summary>
    /// <param name="bytes">Contents.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<byte[]> AddBlobAsync(byte[] bytes, CancellationToken cancellationToken);

    /// <summary>Contents, or null.</summary>
    /// <param name="sha256">Hash.</param>
    /// <param name="cancellationToken">Stops it.</param>
    Task<byte[]?> FindBlobAsync(byte[] sha256, CancellationToken cancellationToken);
}

/// <summary>A leaf.</summary>
/// <param name="Sequence">From 0, dense.</param>
/// <param name="Bytes">Canonical JSON.</param>
/// <param name="Hash">Leaf hash of RFC 9162: SHA-256 of 0x00 and the bytes.</param>
public sealed record LeafRow(long Sequence, byte[] Bytes, byte[] Hash);

/// <summary>Hash of a complete subtree.</summary>
/// <param name="Level">0 for a leaf; a node at level k covers 2^k leaves.</param>
/// <param name="Index">From 0, from the left at its level.</param>
/// <param name="Hash">32 bytes.</param>
public sealed record NodeRow(int Level, long Index, byte[] Hash);

/// <summary>A signed checkpoint.</summary>
/// <param name="Size">Leaves that it covers.</param>
/// <param name="Root">Root hash.</param>
/// <param name="Note">Signed note, UTF-8 text.</param>
/// <param name="CreatedAt">UTC, microseconds.</param>
public sealed record CheckpointRow(long Size, byte[] Root, string Note, DateTime CreatedAt);
