using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Ledger.Audit;

/// <summary>Everything that a store holds of the ledger, read once and in order, as raw as it is stored.</summary>
/// <param name="Origin">Origin that checkpoints must bear.</param>
/// <param name="Keys">The log's own key and, where wanted, witnesses'.</param>
/// <param name="Leaves">By rising sequence.</param>
/// <param name="Nodes">Stored complete subtrees, level 0 (leaf hashes) included, in any order.</param>
/// <param name="Checkpoints">Bytes of every stored checkpoint note, oldest first.</param>
/// <param name="Blobs">Every stored content, in any order.</param>
/// <param name="Outside">A checkpoint note that was kept outside the store, or null.</param>
public sealed record AuditInput(
    string Origin, IReadOnlyCollection<NoteKey> Keys, IEnumerable<StoredLeaf> Leaves, IEnumerable<TreeNode> Nodes,
    IEnumerable<byte[]> Checkpoints, IEnumerable<StoredBlob> Blobs, byte[]? Outside = null);

/// <summary>A stored leaf.</summary>
/// <param name="Sequence">Stored sequence number, from 0 without gaps in a healthy store.</param>
/// <param name="Bytes">Stored canonical bytes.</param>
public readonly record struct StoredLeaf(long Sequence, byte[] Bytes);

/// <summary>A stored content.</summary>
/// <param name="Hash">Hash that it is stored under.</param>
/// <param name="Content">Stored bytes.</param>
public readonly record struct StoredBlob(Digest Hash, byte[] Content);
