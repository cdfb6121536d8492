using System.Numerics;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Pulses;

/// <summary>Profiles of selective pulses across the slice, without relaxation during the pulse.</summary>
/// <remarks>Every profile is evaluated at z and off-resonance together (<see cref="SliceSelection.FrequencyAt"/>), so a field error moves it.</remarks>
public static class SliceProfile
{
    /// <summary>After an excitation of Mz = 1.</summary>
    /// <param name="selection">Pulse and gradient.</param>
    /// <param name="b1Scale">One scale for all positions.</param>
    /// <param name="offResonanceHz">One field error for all positions, Hz.</param>
    /// <param name="z">n positions, slice thicknesses.</param>
    /// <param name="transverse">|Mxy|, n values in [0, 1].</param>
    /// <param name="longitudinal">Mz, n values in [−1, 1].</param>
    /// <exception cref="ArgumentException">Lengths differ.</exception>
    public static void Excitation(
        SliceSelection selection, double b1Scale, double offResonanceHz, ReadOnlySpan<double> z, Span<double> transverse, Span<double> longitudinal)
    {
        var rotation = Rotation.At(selection, b1Scale, offResonanceHz, z);
        for (var i = 0; i < z.Length; i++)
        {
            var b = rotation.B(i);
            transverse[i] = 2 * Math.Sqrt(rotation.A(i) * b);
            longitudinal[i] = 1 - 2 * b;
        }
    }

    /// <summary>Refocusing: M+ → … + b² (M+)*, so |b|² of the spin rotation is the share of transverse magnetisation that is refocused.</summary>
    /// <param name="selection">Pulse and gradient.</param>
    /// <param name="b1Scale">One scale for all positions.</param>
    /// <param name="offResonanceHz">One field error for all positions, Hz.</param>
    /// <param name="z">n positions, slice thicknesses.</param>
    /// <param name="efficiency">n values in [0, 1]; sin²(θ/2) for an ideal rotation by θ about a transverse axis.</param>
    /// <param name="multiplier">Mz → multiplier · Mz, n values in [−1, 1].</param>
    /// <exception cref="ArgumentException">Lengths differ.</exception>
    public static void Refocusing(
        SliceSelection selection, double b1Scale, double offResonanceHz, ReadOnlySpan<double> z, Span<double> efficiency, Span<double> multiplier)
    {
        var rotation = Rotation.At(selection, b1Scale, offResonanceHz, z);
        for (var i = 0; i < z.Length; i++)
        {
            efficiency[i] = rotation.B(i);
            multiplier[i] = 1 - 2 * efficiency[i];
        }
    }

    /// <summary>Spin echo of one tissue integrated through the slice; 1 is a perfect rectangular slice without relaxation.</summary>
    /// <param name="echo">Pulses, timing and field.</param>
    /// <param name="t1">ms.</param>
    /// <param name="t2">ms.</param>
    /// <remarks>
    /// At every z: steady Mz before the excitation (ideal crushers, pulse lengths not counted in the timing), times the excited M+ after a rephasing lobe of half the
    /// excitation gradient's area, times the refocused share with its phase. Composite Simpson rule over ±<see cref="SelectiveSpinEcho.Reach"/>.
    /// </remarks>
    public static SelectiveEchoSignal Integrate(SelectiveSpinEcho echo, double t1, double t2)
    {
        var z = Positions(echo.Reach, echo.Intervals);
        var excitation = Rotation.At(echo.Excitation, echo.B1Scale, echo.OffResonanceHz, z);
        var refocusing = Rotation.At(echo.Refocusing, echo.B1Scale, echo.OffResonanceHz, z);
        var rephasing = -Math.PI * echo.Excitation.HzPerSlice * PulseSteps.Of(echo.Excitation.Pulse).DurationMs * 1e-3;
        double real = 0, imaginary = 0, magnitude = 0;
        for (var i = 0; i < z.Length; i++)
        {
            var m = SteadyLongitudinal(echo, 1 - 2 * excitation.B(i), 1 - 2 * refocusing.B(i), t1);
            var excited = excitation.Excited(i) * new Complex(Elementary.Cos(rephasing * z[i]), Elementary.Sin(rephasing * z[i]));
            var refocused = refocusing.Refocused(i) * Complex.Conjugate(excited) * m;
            var weight = Simpson(i, z.Length) * (2 * echo.Reach / echo.Intervals);
            real += weight * refocused.Real;
            imaginary += weight * refocused.Imaginary;
            magnitude += weight * refocused.Magnitude;
        }

        var decay = Elementary.Exp(-echo.EchoTime / t2);
        return new SelectiveEchoSignal(Math.Sqrt(real * real + imaginary * imaginary) * decay, magnitude * decay);
    }

    /// <summary>Mz before the excitation in the steady state: two recoveries with the refocusing pulse between them.</summary>
    private static double SteadyLongitudinal(SelectiveSpinEcho echo, double excited, double refocused, double t1)
    {
        if (echo.RepetitionTime is not { } repetitionTime)
            return 1;
        var before = Elementary.Exp(-echo.EchoTime / 2 / t1);
        var after = Elementary.Exp(-(repetitionTime - echo.EchoTime / 2) / t1);
        return ((1 - before) * refocused * after + 1 - after) / (1 - excited * before * refocused * after);
    }

    /// <summary>Odd number of equally spaced positions from −reach to reach.</summary>
    internal static double[] Positions(double reach, int intervals)
    {
        var z = new double[intervals + 1];
        for (var i = 0; i < z.Length; i++)
            z[i] = reach * (2.0 * i / intervals - 1);
        return z;
    }

    /// <summary>Weight of point i of n, over the spacing.</summary>
    internal static double Simpson(int i, int n) => (i == 0 || i == n - 1 ? 1 : i % 2 == 1 ? 4 : 2) / 3.0;

    /// <summary>Rotations at all positions.</summary>
    private readonly struct Rotation(double[] ar, double[] ai, double[] br, double[] bi)
    {
        public static Rotation At(SliceSelection selection, double b1Scale, double offResonanceHz, ReadOnlySpan<double> z)
        {
            var n = z.Length;
            var (scales, frequencies) = (new double[n], new double[n]);
            for (var i = 0; i < n; i++)
                (scales[i], frequencies[i]) = (b1Scale, selection.FrequencyAt(z[i], offResonanceHz));
            var (ar, ai, br, bi) = (new double[n], new double[n], new double[n], new double[n]);
            PulseResponse.Rotation(selection.Pulse, scales, frequencies, new CayleyKleinLanes(ar, ai, br, bi));
            return new Rotation(ar, ai, br, bi);
        }

        public double A(int i) => ar[i] * ar[i] + ai[i] * ai[i];

        public double B(int i) => br[i] * br[i] + bi[i] * bi[i];

        public Complex Excited(int i) => 2 * new Complex(ar[i], -ai[i]) * new Complex(br[i], bi[i]);

        public Complex Refocused(int i) => -new Complex(br[i], bi[i]) * new Complex(br[i], bi[i]);
    }
}
