using System.Numerics;
using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Ledger.Proofs;

/// <summary>
/// Proof that the tree of <see cref="From"/> leaves is a prefix of the tree of <see cref="To"/> leaves (RFC 9162 section 2.1.4).
/// With From = 0 or From = To the path is empty.
/// </summary>
/// <param name="From">Earlier size, 0 ≤ From ≤ To.</param>
/// <param name="To">Later size.</param>
/// <param name="Path">Hashes in the order of the RFC.</param>
public sealed record ConsistencyProof(long From, long To, IReadOnlyList<Digest> Path)
{
    /// <summary>Every node that <see cref="Build"/> will read, each once.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not 0 ≤ from ≤ to.</exception>
    public static IReadOnlyList<NodeAddress> Needs(long from, long to) =>
        [.. Parts(from, to).SelectMany(p => p.Nodes())];

    /// <summary>Builds the proof from stored nodes: O(log n) reads and hashes.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not 0 ≤ from ≤ to.</exception>
    /// <exception cref="KeyNotFoundException">A node is missing.</exception>
    public static ConsistencyProof Build(long from, long to, ITreeNodes nodes) =>
        new(from, to, [.. Parts(from, to).Select(p => p.Hash(nodes))]);

    /// <summary>Checks the proof as in RFC 9162 section 2.1.4.2. Never throws on hostile numbers.</summary>
    /// <param name="fromRoot">Trusted root of the earlier tree.</param>
    /// <param name="toRoot">Root of the later tree.</param>
    public Verification Verify(Digest fromRoot, Digest toRoot)
    {
        if (From < 0)
        {
            return new Verification.OutOfRange("from", From, "at least 0");
        }

        if (To < From)
        {
            return new Verification.OutOfRange("to", To, $"at least {From}");
        }

        if (From == To || From == 0)
        {
            return WithoutPath(fromRoot, toRoot);
        }

        var length = Parts(From, To).Count;
        if (Path.Count != length)
        {
            return new Verification.WrongLength(length, Path.Count);
        }

        // RFC 9162: where the earlier tree is complete its own root starts the path.
        var complete = BitOperations.IsPow2(From);
        var first = complete ? fromRoot : Path[0];
        var (earlier, later) = (first, first);
        var skip = BitOperations.TrailingZeroCount(From);
        var (node, last) = ((From - 1) >> skip, (To - 1) >> skip);
        foreach (var hash in complete ? Path : Path.Skip(1))
        {
            if ((node & 1) == 1 || node == last)
            {
                (earlier, later) = (MerkleHash.Node(hash, earlier), MerkleHash.Node(hash, later));
                var up = BitOperations.TrailingZeroCount(node);
                (node, last) = (node >> up, last >> up);
            }
            else
            {
                later = MerkleHash.Node(later, hash);
            }

            (node, last) = (node >> 1, last >> 1);
        }

        return earlier != fromRoot ? new Verification.EarlierRootMismatch(fromRoot, earlier)
            : later != toRoot ? new Verification.RootMismatch(toRoot, later)
            : new Verification.Valid();
    }

    private Verification WithoutPath(Digest fromRoot, Digest toRoot) =>
        Path.Count != 0 ? new Verification.WrongLength(0, Path.Count)
        : From == 0 && fromRoot != MerkleHash.Empty ? new Verification.EarlierRootMismatch(fromRoot, MerkleHash.Empty)
        : From == To && fromRoot != toRoot ? new Verification.RootMismatch(toRoot, fromRoot)
        : new Verification.Valid();

    /// <summary>SUBPROOF of RFC 9162 section 2.1.4.1, unrolled from the root down.</summary>
    private static List<Subtree> Parts(long from, long to)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(from);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(from, to);
        var path = new List<Subtree>();
        if (from == 0 || from == to)
        {
            return path;
        }

        var (start, end, whole) = (0L, to, true);
        while (end != from)
        {
            var middle = start + Subtree.Split(end - start);
            if (from <= middle)
            {
                path.Add(new Subtree(middle, end));
                end = middle;
            }
            else
            {
                path.Add(new Subtree(start, middle));
                (start, whole) = (middle, false);
            }
        }

        if (!whole)
        {
            path.Add(new Subtree(start, end));
        }

        path.Reverse();
        return path;
    }
}
