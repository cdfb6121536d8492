using System.Security.Cryptography;

namespace ProtoLedger.Ledger.Merkle;

/// <summary>Hashing of RFC 9162 section 2.1.1 with SHA-256: leaves under a 0x00 prefix, inner nodes under 0x01.</summary>
public static class MerkleHash
{
    /// <summary>Root of the empty tree: SHA-256 of nothing.</summary>
    public static Digest Empty { get; } = Digest.Of([]);

    /// <summary>SHA-256(0x00 || <paramref name="leaf"/>).</summary>
    public static Digest Leaf(ReadOnlySpan<byte> leaf)
    {
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        hash.AppendData([0x00]);
        hash.AppendData(leaf);
        Span<byte> result = stackalloc byte[Digest.Length];
        hash.GetHashAndReset(result);
        return new Digest(result);
    }

    /// <summary>SHA-256(0x01 || <paramref name="left"/> || <paramref name="right"/>).</summary>
    public static Digest Node(Digest left, Digest right)
    {
        Span<byte> input = stackalloc byte[1 + 2 * Digest.Length];
        input[0] = 0x01;
        left.CopyTo(input[1..]);
        right.CopyTo(input[(1 + Digest.Length)..]);
        return Digest.Of(input);
    }
}
