using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Ledger.Tests.Proofs;

/// <summary>
/// What can be done to a path of hashes. The families are those of the published test vectors of open-source
/// transparency logs (truncated, inserted and removed components, flipped bits, garbage before and behind).
/// </summary>
internal static class Mutations
{
    private static readonly Digest Garbage = Digest.Of("garbage"u8);

    public static IEnumerable<(string Name, IReadOnlyList<Digest> Path)> OfPath(IReadOnlyList<Digest> path, Digest root)
    {
        yield return ("trailing garbage", [.. path, Garbage]);
        yield return ("trailing root", [.. path, root]);
        yield return ("preceding garbage", [Garbage, .. path]);
        yield return ("preceding root", [root, .. path]);
        yield return ("trailing empty root", [.. path, MerkleHash.Empty]);
        for (var i = 0; i < path.Count; i++)
        {
            yield return ($"component {i} removed", [.. path.Take(i), .. path.Skip(i + 1)]);
            yield return ($"truncated to {i}", [.. path.Take(i)]);
            yield return ($"component inserted at {i}", [.. path.Take(i), Garbage, .. path.Skip(i)]);
            yield return ($"component {i} doubled", [.. path.Take(i + 1), .. path.Skip(i)]);
            yield return ($"component {i} replaced", [.. path.Take(i), Garbage, .. path.Skip(i + 1)]);
            foreach (var bit in (int[])[0, 77, 255])
            {
                yield return ($"component {i} with bit {bit} flipped", [.. path.Take(i), Flip(path[i], bit), .. path.Skip(i + 1)]);
            }

            if (i > 0 && path[i] != path[i - 1])
            {
                yield return ($"components {i - 1} and {i} swapped", [.. path.Take(i - 1), path[i], path[i - 1], .. path.Skip(i + 1)]);
            }
        }
    }

    public static IEnumerable<(string Name, Digest Root)> OfRoot(Digest root)
    {
        yield return ("random root", Garbage);
        yield return ("zero root", default);
        yield return ("root with its first bit flipped", Flip(root, 0));
        yield return ("root with its last bit flipped", Flip(root, 255));
        if (root != MerkleHash.Empty)
        {
            yield return ("empty root", MerkleHash.Empty);
        }
    }

    public static Digest Flip(Digest hash, int bit)
    {
        var bytes = hash.ToArray();
        bytes[bit / 8] ^= (byte)(1 << bit % 8);
        return new Digest(bytes);
    }
}
