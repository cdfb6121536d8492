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

    private static void Run(PulseSteps steps, Span<double> lanes)
    {
        var scale = Vector512.Create<double>(lanes);
        var precession = Vector512.Create<double>(lanes[Width..]) * (2 * Math.PI * steps.StepMs * 1e-3);
        var step = Vector512.Create(steps.StepMs);
        var r1 = step / Vector512.Create<double>(lanes[(2 * Width)..]);
        var r2 = step / Vector512.Create<double>(lanes[(3 * Width)..]);
        var difference = r2 - r1;
        var (kept, grown) = (new Vector(z: Vector512<double>.One), new Vector(Vector512<double>.Zero));
        for (var k = 0; k < steps.X.Length; k++)
        {
            var slope = scale * steps.Slope[k];
            var generator = new Generator(
                scale * steps.X[k],
                precession * slope + scale * steps.Y[k],
                precession - Vector512.Create(steps.Sweep[k]),
                slope * difference,
                r1,
                r2);
            var term = generator.Apply(kept);
            var regrowth = generator.Apply(grown) + new Vector(Vector512<double>.Zero, slope * r1, r1);
            (kept, grown) = (kept + term, grown + regrowth);
            for (var order = 2; order <= Order; order++)
            {
                (term, regrowth) = (generator.Apply(term) * (1.0 / order), generator.Apply(regrowth) * (1.0 / order));
                (kept, grown) = (kept + term, grown + regrowth);
            }
        }

        kept.Z.CopyTo(lanes[(4 * Width)..]);
        grown.Z.CopyTo(lanes[(5 * Width)..]);
    }

    private readonly struct Vector
    {
        public readonly Vector512<double> X, Y, Z;

        public Vector(Vector512<double> z) => Z = z;

        public Vector(Vector512<double> x, Vector512<double> y, Vector512<double> z) => (X, Y, Z) = (x, y, z);

        public static Vector operator +(Vector a, Vector b) => new(a.X + b.X, a.Y + b.Y, a.Z + b.Z);

        public static Vector operator *(Vector a, double factor) => new(a.X * factor, a.Y * factor, a.Z * factor);
    }

    private readonly struct Generator(
        Vector512<double> x, Vector512<double> y, Vector512<double> z, Vector512<double> shear, Vector512<double> r1, Vector512<double> r2)
    {
        public Vector Apply(Vector m) => new(
            y * m.Z - z * m.Y - r2 * m.X,
            z * m.X - (x - shear) * m.Z - r2 * m.Y,
            (x + shear) * m.Y - y * m.X - r1 * m.Z);
    }
}
