using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace ProtoLedger.Physics.Pulses;

/// <summary>Product of the rotations of all steps of a pulse, eight lanes at a time, without relaxation.</summary>
/// <remarks>
/// Only +, − and × in fixed order, so the bits are those of any instruction set and of any place of a lane among others.
/// cos and sin of the half angle come from their power series: a step turns by so little that the terms left out are below 1e-16.
/// </remarks>
internal static class RotationKernel
{
    private const int Width = 8;

    /// <param name="steps">The pulse.</param>
    /// <param name="b1Scale">n values.</param>
    /// <param name="offResonanceHz">n values.</param>
    /// <param name="result">n lanes.</param>
    public static void Run(PulseSteps steps, ReadOnlySpan<double> b1Scale, ReadOnlySpan<double> offResonanceHz, CayleyKleinLanes result)
    {
        Span<double> lanes = stackalloc double[6 * Width];
        for (var i = 0; i < b1Scale.Length; i += Width)
        {
            var n = Math.Min(Width, b1Scale.Length - i);
            lanes.Clear();
            b1Scale.Slice(i, n).CopyTo(lanes);
            offResonanceHz.Slice(i, n).CopyTo(lanes[Width..]);
            Run(steps, lanes);
            lanes.Slice(2 * Width, n).CopyTo(result.AReal[i..]);
            lanes.Slice(3 * Width, n).CopyTo(result.AImaginary[i..]);
            lanes.Slice(4 * Width, n).CopyTo(result.BReal[i..]);
            lanes.Slice(5 * Width, n).CopyTo(result.BImaginary[i..]);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Run(PulseSteps steps, Span<double> lanes)
    {
        var scale = Vector512.Create<double>(lanes);
        var precession = Vector512.Create<double>(lanes[Width..]) * (2 * Math.PI * steps.StepMs * 1e-3);
        var (ar, ai, br, bi) = (Vector512<double>.One, Vector512<double>.Zero, Vector512<double>.Zero, Vector512<double>.Zero);
        for (var k = 0; k < steps.X.Length; k++)
        {
            var x = scale * steps.X[k];
            var y = scale * (precession * steps.Slope[k] + Vector512.Create(steps.Y[k]));
            var z = precession - Vector512.Create(steps.Sweep[k]);
            var u = (x * x + y * y + z * z) * 0.25;
            var c = Cosine(u);
            var s = HalfSine(u);
            (x, y, z) = (x * s, y * s, z * s);
            (ar, ai, br, bi) = (
                c * ar + z * ai - y * br + x * bi,
                c * ai - z * ar - y * bi - x * br,
                y * ar + x * ai + c * br - z * bi,
                y * ai - x * ar + c * bi + z * br);
        }

        ar.CopyTo(lanes[(2 * Width)..]);
        ai.CopyTo(lanes[(3 * Width)..]);
        br.CopyTo(lanes[(4 * Width)..]);
        bi.CopyTo(lanes[(5 * Width)..]);
    }

    /// <summary>cos √u for u in [0, 1].</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector512<double> Cosine(Vector512<double> u)
    {
        var r = Vector512.Create(1 / 20922789888000.0);
        r = Vector512.Create(-1 / 87178291200.0) + r * u;
        r = Vector512.Create(1 / 479001600.0) + r * u;
        r = Vector512.Create(-1 / 3628800.0) + r * u;
        r = Vector512.Create(1 / 40320.0) + r * u;
        r = Vector512.Create(-1 / 720.0) + r * u;
        r = Vector512.Create(1 / 24.0) + r * u;
        r = Vector512.Create(-0.5) + r * u;
        return Vector512<double>.One + r * u;
    }

    /// <summary>sin √u / (2 √u) for u in [0, 1].</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector512<double> HalfSine(Vector512<double> u)
    {
        var r = Vector512.Create(0.5 / 355687428096000.0);
        r = Vector512.Create(-0.5 / 1307674368000.0) + r * u;
        r = Vector512.Create(0.5 / 6227020800.0) + r * u;
        r = Vector512.Create(-0.5 / 39916800.0) + r * u;
        r = Vector512.Create(0.5 / 362880.0) + r * u;
        r = Vector512.Create(-0.5 / 5040.0) + r * u;
        r = Vector512.Create(0.5 / 120.0) + r * u;
        r = Vector512.Create(-0.5 / 6.0) + r * u;
        return Vector512.Create(0.5) + r * u;
    }
}
