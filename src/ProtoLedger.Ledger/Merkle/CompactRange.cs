using System.Numerics;

namespace ProtoLedger.Ledger.Merkle;

/// <summary>
/// A tree of <see cref="Size"/> leaves, kept as the roots of its complete subtrees only: one for each 1 bit of the size,
/// largest first. That list is all that is needed to append and to compute the root. Immutable.
/// </summary>
public sealed class CompactRange
{
    private readonly Digest[] edge;
    private readonly Func<Digest, Digest, Digest> combine;

    private CompactRange(long size, Digest[] edge, Func<Digest, Digest, Digest> combine) =>
        (Size, this.edge, this.combine) = (size, edge, combine);

    /// <summary>The tree without leaves.</summary>
    public static CompactRange Empty { get; } = new(0, [], MerkleHash.Node);

    /// <summary>Number of leaves, ≥ 0.</summary>
    public long Size { get; }

    /// <summary>Roots of the complete subtrees, largest (leftmost) first.</summary>
    public IReadOnlyList<Digest> Edge => edge;

    /// <summary>Takes up a stored state again.</summary>
    /// <param name="size">Number of leaves, ≥ 0.</param>
    /// <param name="edge">As <see cref="Edge"/> gave it: as many hashes as <paramref name="size"/> has 1 bits.</param>
    /// <exception cref="ArgumentException">Negative size or a wrong number of hashes.</exception>
    public static CompactRange Restore(long size, IReadOnlyList<Digest> edge)
    {
        ArgumentNullException.ThrowIfNull(edge);
        ArgumentOutOfRangeException.ThrowIfNegative(size);
        var expected = BitOperations.PopCount((ulong)size);
        return edge.Count == expected
            ? new CompactRange(size, [.. edge], MerkleHash.Node)
            : throw new ArgumentException($"A tree of {size} leaves has {expected} edge hashes, not {edge.Count}.", nameof(edge));
    }

    /// <summary>Addresses of <see cref="Edge"/> for a tree of <paramref name="size"/> leaves, in the same order.</summary>
    public static IReadOnlyList<NodeAddress> EdgeOf(long size)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(size);
        var result = new List<NodeAddress>();
        for (var level = 62; level >= 0; level--)
        {
            if ((size >> level & 1) == 1)
            {
                result.Add(new NodeAddress(level, (size >> level) - 1));
            }
        }

        return result;
    }

    /// <summary>
    /// Appends one leaf: as many inner hashes as the size has trailing 1 bits, less than one on average and at most log2(size + 1).
    /// </summary>
    /// <param name="leafHash"><see cref="MerkleHash.Leaf"/> of the leaf's bytes.</param>
    /// <returns>The grown tree and the nodes that became complete: the leaf first, then one for each level above.</returns>
    public TreeGrowth Append(Digest leafHash)
    {
        var merges = BitOperations.TrailingZeroCount(~(ulong)Size);
        var created = new TreeNode[merges + 1];
        created[0] = new TreeNode(new NodeAddress(0, Size), leafHash);
        var hash = leafHash;
        for (var level = 1; level <= merges; level++)
        {
            hash = combine(edge[^level], hash);
            created[level] = new TreeNode(new NodeAddress(level, Size >> level), hash);
        }

        var grown = new Digest[edge.Length - merges + 1];
        edge.AsSpan(0, edge.Length - merges).CopyTo(grown);
        grown[^1] = hash;
        return new TreeGrowth(new CompactRange(checked(Size + 1), grown, combine), created);
    }

    /// <summary>Root hash: one inner hash fewer than the size has 1 bits.</summary>
    public Digest Root()
    {
        if (edge.Length == 0)
        {
            return MerkleHash.Empty;
        }

        var root = edge[^1];
        for (var i = edge.Length - 2; i >= 0; i--)
        {
            root = combine(edge[i], root);
        }

        return root;
    }

    /// <summary>The empty tree with another node function, so that hashes can be counted.</summary>
    internal static CompactRange EmptyWith(Func<Digest, Digest, Digest> combine) => new(0, [], combine);
}

/// <summary>Outcome of one append.</summary>
/// <param name="Tree">The tree with the leaf.</param>
/// <param name="NewNodes">Nodes that became complete: store them and every proof costs O(log n) reads.</param>
public sealed record TreeGrowth(CompactRange Tree, IReadOnlyList<TreeNode> NewNodes);
