using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Ledger.Proofs;

/// <summary>
/// A hash that a proof asks for: the Merkle tree hash of leaves [Start, End). Where that is no complete subtree it is put
/// together from the complete ones on its right edge.
/// </summary>
internal readonly record struct Subtree(long Start, long End)
{
    /// <summary>Complete subtrees from left to right.</summary>
    public IEnumerable<NodeAddress> Nodes()
    {
        var start = Start;
        foreach (var (level, _) in CompactRange.EdgeOf(End - Start))
        {
            yield return new NodeAddress(level, start >> level);
            start += 1L << level;
        }
    }

    public Digest Hash(ITreeNodes nodes) =>
        CompactRange.Restore(End - Start, [.. Nodes().Select(nodes.Hash)]).Root();

    /// <summary>k of RFC 9162 section 2.1.1: the largest power of two smaller than n, for n ≥ 2.</summary>
    public static long Split(long n) => 1L << (63 - System.Numerics.BitOperations.LeadingZeroCount((ulong)(n - 1)));
}
