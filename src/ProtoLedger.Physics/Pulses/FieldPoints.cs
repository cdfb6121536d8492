using System.Runtime.InteropServices;

namespace ProtoLedger.Physics.Pulses;

/// <summary>The different pairs of B1+ scale and off-resonance among lanes, in the order in which they first occur.</summary>
/// <param name="B1Scale">One value a pair.</param>
/// <param name="OffResonanceHz">One value a pair.</param>
/// <param name="PointOf">Pair of each lane.</param>
internal sealed record FieldPoints(double[] B1Scale, double[] OffResonanceHz, int[] PointOf)
{
    /// <summary>Number of pairs.</summary>
    public int Count => B1Scale.Length;

    /// <summary>Finds the pairs of n lanes.</summary>
    public static FieldPoints Distinct(ReadOnlySpan<double> b1Scale, ReadOnlySpan<double> offResonanceHz)
    {
        var known = new Dictionary<(double, double), int>();
        var (scales, frequencies) = (new List<double>(), new List<double>());
        var pointOf = new int[b1Scale.Length];
        for (var i = 0; i < pointOf.Length; i++)
        {
            ref var point = ref CollectionsMarshal.GetValueRefOrAddDefault(known, (b1Scale[i], offResonanceHz[i]), out var exists);
            if (!exists)
            {
                point = scales.Count;
                scales.Add(b1Scale[i]);
                frequencies.Add(offResonanceHz[i]);
            }

            pointOf[i] = point;
        }

        return new FieldPoints([.. scales], [.. frequencies], pointOf);
    }
}
