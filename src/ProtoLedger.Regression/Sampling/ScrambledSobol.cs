using System.Numerics;

namespace ProtoLedger.Regression.Sampling;

/// <summary>Five dimensions of Sobol's sequence with Owen scrambling and a shuffled order, all fixed by a seed.</summary>
/// <remarks>
/// Direction numbers: Joe and Kuo, SIAM J. Sci. Comput. 2008;30:2635, first five dimensions.
/// Hash-based nested uniform scrambling and index shuffling: Burley, Journal of Computer Graphics Techniques 2020;9(4):1.
/// Tissues take differently seeded copies, so that a tissue's draws never depend on which other tissues are there.
/// </remarks>
internal static class ScrambledSobol
{
    internal const int Dimensions = 5;

    private static readonly uint[][] Directions = [
        MakeDirections(0, 0, []),
        MakeDirections(1, 0, [1]),
        MakeDirections(2, 1, [1, 3]),
        MakeDirections(3, 1, [1, 3, 1]),
        MakeDirections(3, 2, [1, 1, 1]),
    ];

    /// <summary>Points 0 … n − 1 of one dimension.</summary>
    /// <param name="seed">Seed of the scrambling.</param>
    /// <param name="dimension">0 … 4.</param>
    /// <param name="destination">n values in (0, 1).</param>
    internal static void Fill(ulong seed, int dimension, Span<double> destination)
    {
        var order = (uint)Mix(seed);
        var scramble = (uint)Mix(seed + 1 + (ulong)dimension);
        var directions = Directions[dimension];
        for (var i = 0; i < destination.Length; i++)
        {
            var x = 0u;
            for (var rest = NestedUniform((uint)i, order); rest != 0; rest &= rest - 1)
                x ^= directions[BitOperations.TrailingZeroCount(rest)];
            destination[i] = (NestedUniform(x, scramble) + 0.5) * (1.0 / 4294967296.0);
        }
    }

    /// <summary>Seed of a named stream: FNV-1a of the name, mixed with the run's seed.</summary>
    internal static ulong SeedOf(ulong seed, string name)
    {
        var hash = 14695981039346656037UL;
        foreach (var c in name)
            hash = (hash ^ c) * 1099511628211UL;
        return Mix(hash ^ Mix(seed));
    }

    // splitmix64 (Steele, Lea and Flood, OOPSLA 2014).
    internal static ulong Mix(ulong x)
    {
        x += 0x9E3779B97F4A7C15UL;
        x = (x ^ (x >> 30)) * 0xBF58476D1CE4E5B9UL;
        x = (x ^ (x >> 27)) * 0x94D049BB133111EBUL;
        return x ^ (x >> 31);
    }

    private static uint NestedUniform(uint x, uint seed) => Reverse(LaineKarras(Reverse(x), seed));

    private static uint LaineKarras(uint x, uint seed)
    {
        x += seed;
        x ^= x * 0x6c50b47cu;
        x ^= x * 0xb82f1e52u;
        x ^= x * 0xc7afe638u;
        x ^= x * 0x8d22f6e6u;
        return x;
    }

    private static uint Reverse(uint x)
    {
        x = ((x >> 1) & 0x55555555u) | ((x & 0x55555555u) << 1);
        x = ((x >> 2) & 0x33333333u) | ((x & 0x33333333u) << 2);
        x = ((x >> 4) & 0x0F0F0F0Fu) | ((x & 0x0F0F0F0Fu) << 4);
        return System.Buffers.Binary.BinaryPrimitives.ReverseEndianness(x);
    }

    private static uint[] MakeDirections(int degree, uint polynomial, uint[] initial)
    {
        var v = new uint[32];
        for (var i = 0; i < 32; i++)
        {
            if (degree == 0)
            {
                v[i] = 1u << (31 - i);
            }
            else if (i < degree)
            {
                v[i] = initial[i] << (31 - i);
            }
            else
            {
                v[i] = v[i - degree] ^ (v[i - degree] >> degree);
                for (var k = 1; k < degree; k++)
                {
                    if (((polynomial >> (degree - 1 - k)) & 1) != 0)
                        v[i] ^= v[i - k];
                }
            }
        }

        return v;
    }
}
