using System.Security.Cryptography;

namespace ProtoLedger.Ledger.Tests.Merkle;

/// <summary>
/// The definitions of RFC 9162 section 2.1 written down as they stand there, recursive and slow, with the platform's
/// SHA-256 and plain byte arrays: shares no code with the product.
/// </summary>
internal static class ReferenceTree
{
    /// <summary>MTH(D[n]), section 2.1.1.</summary>
    public static byte[] Root(IReadOnlyList<byte[]> d) => d.Count switch
    {
        0 => SHA256.HashData([]),
        1 => SHA256.HashData([0x00, .. d[0]]),
        _ => Node(Root(Slice(d, 0, Split(d.Count))), Root(Slice(d, Split(d.Count), d.Count))),
    };

    /// <summary>PATH(m, D[n]), section 2.1.3.1.</summary>
    public static List<byte[]> Path(int m, IReadOnlyList<byte[]> d)
    {
        if (d.Count == 1)
        {
            return [];
        }

        var k = Split(d.Count);
        return m < k
            ? [.. Path(m, Slice(d, 0, k)), Root(Slice(d, k, d.Count))]
            : [.. Path(m - k, Slice(d, k, d.Count)), Root(Slice(d, 0, k))];
    }

    /// <summary>PROOF(m, D[n]) = SUBPROOF(m, D[n], true) for 0 &lt; m &lt; n, section 2.1.4.1.</summary>
    public static List<byte[]> Proof(int m, IReadOnlyList<byte[]> d) => SubProof(m, d, true);

    private static List<byte[]> SubProof(int m, IReadOnlyList<byte[]> d, bool b)
    {
        if (m == d.Count)
        {
            return b ? [] : [Root(d)];
        }

        var k = Split(d.Count);
        return m <= k
            ? [.. SubProof(m, Slice(d, 0, k), b), Root(Slice(d, k, d.Count))]
            : [.. SubProof(m - k, Slice(d, k, d.Count), false), Root(Slice(d, 0, k))];
    }

    private static byte[] Node(byte[] left, byte[] right) => SHA256.HashData([0x01, .. left, .. right]);

    /// <summary>The largest power of two smaller than n.</summary>
    private static int Split(int n)
    {
        var k = 1;
        while (k * 2 < n)
        {
            k *= 2;
        }

        return k;
    }

    private static List<byte[]> Slice(IReadOnlyList<byte[]> d, int from, int to) => [.. d.Skip(from).Take(to - from)];
}
