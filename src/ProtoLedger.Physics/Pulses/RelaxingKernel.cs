using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace ProtoLedger.Physics.Pulses;

/// <summary>Bloch equation with T1 and T2 over all steps of a pulse, eight lanes at a time: what becomes of Mz as an affine map.</summary>
/// <remarks>
/// Two solutions are followed: from Mz = 1 without regrowth (the multiplier) and from rest with regrowth towards 1 (the recovery).
/// The exponential of each step is its power series to the eighth order; relaxation enters the Magnus term as in <see cref="PulseSteps"/>.
/// Only +, − and × in fixed order.
/// </remarks>
internal static class RelaxingKernel
{
    private const int Width = 8;
    private const int Order = 8;

    /// <summary>Mz after the pulse = multiplier · Mz before + recovery, transverse magnetisation zero before and dephased after.</summary>
    public static void Run(
        PulseSteps steps,
        ReadOnlySpan<double> b1Scale,
        ReadOnlySpan<double> offResonanceHz,
        ReadOnlySpan<double> t1,
        ReadOnlySpan<double> t2,
        Span<double> multiplier,
        Span<double> recovery)
    {
        Span<double> lanes = stackalloc double[6 * Width];
        for (var i = 0; i < b1Scale.Length; i += Width)
        {
            var n = Math.Min(Width, b1Scale.Length - i);
            lanes.Fill(1);
            b1Scale.Slice(i, n).CopyTo(lanes);
            offResonanceHz.Slice(i, n).CopyTo(lanes[Width..]);
            t1.Slice(i, n).CopyTo(lanes[(2 * Width)..]);
            t2.Slice(i, n).CopyTo(lanes[(3 * Width)..]);
            Run(steps, lanes);
            lanes.Slice(4 * Width, n).CopyTo(multiplier[i..]);
            lanes.Slice(5 * Width, n).CopyTo(recovery[i..]);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void Run(PulseSteps steps, Span<double> lanes)
    {
        var scale = Vector512.Create<double>(lanes);
        var precession = Vector512.Create<double>(lanes[Width..]) * (2 * Math.PI * steps.StepMs * 1e-3);
        var step = Vector512.Create(steps.StepMs);
        var r1 = step / Vector512.Create<double>(lanes[(2 * Width)..]);
        var r2 = step / Vector512.Create<double>(lanes[(3 * Width)..]);
        var difference = r2 - r1;
        var zero = Vector512<double>.Zero;

        // Kept: from Mz = 1 without regrowth. Grown: from rest with regrowth.
        var (keptX, keptY, keptZ) = (zero, zero, Vector512<double>.One);
        var (grownX, grownY, grownZ) = (zero, zero, zero);
        for (var k = 0; k < steps.X.Length; k++)
        {
            var slope = scale * steps.Slope[k];
            var x = scale * steps.X[k];
            var y = precession * slope + scale * steps.Y[k];
            var z = precession - Vector512.Create(steps.Sweep[k]);
            var shear = slope * difference;
            var (raised, lowered) = (x + shear, x - shear);

            // Terms of the series of exp: each is the generator's action on the one before, over its order.
            var (termX, termY, termZ) = (keptX, keptY, keptZ);
            var (restX, restY, restZ) = (grownX, grownY, grownZ);
            var (sourceY, sourceZ) = (slope * r1, r1);
            for (var order = 1; order <= Order; order++)
            {
                var share = Vector512.Create(1.0 / order);
                (termX, termY, termZ) = (
                    share * (y * termZ - z * termY - r2 * termX),
                    share * (z * termX - lowered * termZ - r2 * termY),
                    share * (raised * termY - y * termX - r1 * termZ));
                (restX, restY, restZ) = (
                    share * (y * restZ - z * restY - r2 * restX),
                    share * (z * restX - lowered * restZ - r2 * restY + sourceY),
                    share * (raised * restY - y * restX - r1 * restZ + sourceZ));
                (keptX, keptY, keptZ) = (keptX + termX, keptY + termY, keptZ + termZ);
                (grownX, grownY, grownZ) = (grownX + restX, grownY + restY, grownZ + restZ);
                (sourceY, sourceZ) = (zero, zero);
            }
        }

        keptZ.CopyTo(lanes[(4 * Width)..]);
        grownZ.CopyTo(lanes[(5 * Width)..]);
    }
}
