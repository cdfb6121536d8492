using System.Numerics;
using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Ledger.Proofs;

/// <summary>Proof that leaf <see cref="Index"/> is in the tree of <see cref="Size"/> leaves (RFC 9162 section 2.1.3).</summary>
/// <param name="Index">0-based, 0 ≤ Index &lt; Size.</param>
/// <param name="Size">Leaves in the tree.</param>
/// <param name="Path">Sibling hashes from the leaf to the root.</param>
public sealed record InclusionProof(long Index, long Size, IReadOnlyList<Digest> Path)
{
    /// <summary>Every node that <see cref="Build"/> will read, each once.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The index is outside the tree.</exception>
    public static IReadOnlyList<NodeAddress> Needs(long index, long size) =>
        [.. Siblings(index, size).SelectMany(s => s.Nodes())];

    /// <summary>Builds the proof from stored nodes: O(log n) reads and hashes.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The index is outside the tree.</exception>
    /// <exception cref="KeyNotFoundException">A node is missing.</exception>
    public static InclusionProof Build(long index, long size, ITreeNodes nodes) =>
        new(index, size, [.. Siblings(index, size).Select(s => s.Hash(nodes))]);

    /// <summary>Checks the proof as in RFC 9162 section 2.1.3.2. Never throws on hostile numbers.</summary>
    /// <param name="leafHash"><see cref="MerkleHash.Leaf"/> of the leaf.</param>
    /// <param name="root">The root that is trusted for this size.</param>
    public Verification Verify(Digest leafHash, Digest root)
    {
        if (Size < 1)
        {
            return new Verification.OutOfRange("size", Size, "at least 1");
        }

        if (Index < 0 || Index >= Size)
        {
            return new Verification.OutOfRange("index", Index, $"0 to {Size - 1}");
        }

        var length = PathLength(Index, Size);
        if (Path.Count != length)
        {
            return new Verification.WrongLength(length, Path.Count);
        }

        var (node, last, hash) = (Index, Size - 1, leafHash);
        foreach (var sibling in Path)
        {
            if ((node & 1) == 1 || node == last)
            {
                hash = MerkleHash.Node(sibling, hash);
                var up = BitOperations.TrailingZeroCount(node);
                (node, last) = (node >> up, last >> up);
            }
            else
            {
                hash = MerkleHash.Node(hash, sibling);
            }

            (node, last) = (node >> 1, last >> 1);
        }

        return hash == root ? new Verification.Valid() : new Verification.RootMismatch(root, hash);
    }

    /// <summary>
    /// Below the level where the paths of this leaf and of the last leaf part every level has a sibling; above it only the
    /// 1 bits of the index do.
    /// </summary>
    private static int PathLength(long index, long size)
    {
        var inner = 64 - BitOperations.LeadingZeroCount((ulong)(index ^ (size - 1)));
        return inner + BitOperations.PopCount((ulong)(index >> inner));
    }

    private static List<Subtree> Siblings(long index, long size)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(index);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(index, size);
        var path = new List<Subtree>();
        for (var (start, end) = (0L, size); end - start > 1;)
        {
            var middle = start + Subtree.Split(end - start);
            var left = index < middle;
            path.Add(left ? new Subtree(middle, end) : new Subtree(start, middle));
            (start, end) = left ? (start, middle) : (middle, end);
        }

        path.Reverse();
        return path;
    }
}
