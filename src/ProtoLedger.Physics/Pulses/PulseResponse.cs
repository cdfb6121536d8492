using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Pulses;

/// <summary>What a radio-frequency pulse does to magnetisation, over lanes of B1+ scale and off-resonance, from the Bloch equation.</summary>
/// <remarks>
/// Off-resonance is spin frequency minus carrier, right-handed: M+ turns by +2πΔf·t. Pulse definitions stand with <see cref="RfPulse"/>.
/// Source: Bloch, Phys Rev 1946;70:460, integrated as in <see cref="PulseSteps"/>. Equal inputs give equal bits in any order of the lanes; with relaxation,
/// many lanes at one point of the fields share integrations (<see cref="RelaxationSurface"/>) and differ from single lanes by less than 10⁻¹⁰.
/// </remarks>
public static class PulseResponse
{
    /// <summary>Largest off-resonance that is integrated, Hz, either sign.</summary>
    public const double LargestOffResonanceHz = 20_000;

    /// <summary>Largest B1+ scale that is integrated.</summary>
    public const double LargestB1Scale = 4;

    /// <summary>Longitudinal magnetisation without relaxation during the pulse: Mz → multiplier · Mz, transverse zero before.</summary>
    /// <param name="pulse">Any pulse; an <see cref="EfficiencyInversion"/> gives −f, whatever B1+ and off-resonance are.</param>
    /// <param name="b1Scale">n values, actual over nominal amplitude, ≥ 0.</param>
    /// <param name="offResonanceHz">n values, within ±<see cref="LargestOffResonanceHz"/>.</param>
    /// <param name="multiplier">n values in [−1, 1].</param>
    /// <exception cref="ArgumentException">Lengths differ, or the pulse has no shape.</exception>
    /// <exception cref="ArgumentOutOfRangeException">Off-resonance or B1+ scale beyond the range.</exception>
    public static void Longitudinal(RfPulse pulse, ReadOnlySpan<double> b1Scale, ReadOnlySpan<double> offResonanceHz, Span<double> multiplier)
    {
        RequireLanes(b1Scale, offResonanceHz, multiplier.Length);
        if (pulse is EfficiencyInversion inversion)
        {
            multiplier.Fill(-inversion.Efficiency);
            return;
        }

        // Lanes that differ in tissue alone meet the same pulse: each pair of B1+ scale and off-resonance is integrated once.
        var points = FieldPoints.Distinct(b1Scale, offResonanceHz);
        var n = points.Count;
        var parts = new double[4 * n];
        var rotation = new CayleyKleinLanes(parts.AsSpan(0, n), parts.AsSpan(n, n), parts.AsSpan(2 * n, n), parts.AsSpan(3 * n));
        Rotation(pulse, points.B1Scale, points.OffResonanceHz, rotation);
        for (var i = 0; i < multiplier.Length; i++)
        {
            var (real, imaginary) = (rotation.BReal[points.PointOf[i]], rotation.BImaginary[points.PointOf[i]]);
            multiplier[i] = 1 - 2 * (real * real + imaginary * imaginary);
        }
    }

    /// <summary>Longitudinal magnetisation with T1 and T2 during the pulse: Mz → multiplier · Mz + recovery, over M0 = 1; transverse zero before, dephased after.</summary>
    /// <param name="pulse">Any pulse; an <see cref="EfficiencyInversion"/> and an instantaneous <see cref="HardPulse"/> give no recovery.</param>
    /// <param name="b1Scale">n values, ≥ 0.</param>
    /// <param name="offResonanceHz">n values, within ±<see cref="LargestOffResonanceHz"/>.</param>
    /// <param name="t1">n values, ms, &gt; 0.</param>
    /// <param name="t2">n values, ms, &gt; 0.</param>
    /// <param name="multiplier">n values in [−1, 1].</param>
    /// <param name="recovery">n values in [0, 1].</param>
    /// <exception cref="ArgumentException">Lengths differ, or the pulse has no shape.</exception>
    /// <exception cref="ArgumentOutOfRangeException">Off-resonance or B1+ scale beyond the range.</exception>
    public static void Longitudinal(
        RfPulse pulse,
        ReadOnlySpan<double> b1Scale,
        ReadOnlySpan<double> offResonanceHz,
        ReadOnlySpan<double> t1,
        ReadOnlySpan<double> t2,
        Span<double> multiplier,
        Span<double> recovery)
    {
        RequireLanes(b1Scale, offResonanceHz, multiplier.Length, t1.Length, t2.Length, recovery.Length);
        if (pulse is EfficiencyInversion or HardPulse { Duration: 0 })
        {
            Longitudinal(pulse, b1Scale, offResonanceHz, multiplier);
            recovery.Clear();
            return;
        }

        var points = FieldPoints.Distinct(b1Scale, offResonanceHz);
        var lanesOfPoint = new int[points.Count];
        foreach (var point in points.PointOf)
            lanesOfPoint[point]++;
        var steps = PulseSteps.Of(pulse);
        var alone = new List<int>();
        for (var i = 0; i < points.PointOf.Length; i++)
        {
            if (lanesOfPoint[points.PointOf[i]] >= RelaxationSurface.FewestLanes && RelaxationSurface.Covers(steps, t1[i], t2[i]))
                (multiplier[i], recovery[i]) = RelaxationSurface.Of(pulse, b1Scale[i], offResonanceHz[i]).At(t1[i], t2[i]);
            else
                alone.Add(i);
        }

        Integrate(steps, alone, b1Scale, offResonanceHz, t1, t2, multiplier, recovery);
    }

    private static void Integrate(
        PulseSteps steps,
        List<int> lanes,
        ReadOnlySpan<double> b1Scale,
        ReadOnlySpan<double> offResonanceHz,
        ReadOnlySpan<double> t1,
        ReadOnlySpan<double> t2,
        Span<double> multiplier,
        Span<double> recovery)
    {
        var n = lanes.Count;
        var columns = new double[6 * n];
        for (var i = 0; i < n; i++)
        {
            var lane = lanes[i];
            (columns[i], columns[n + i], columns[2 * n + i], columns[3 * n + i]) = (b1Scale[lane], offResonanceHz[lane], t1[lane], t2[lane]);
        }

        Span<double> Column(int number) => columns.AsSpan(number * n, n);
        RelaxingKernel.Run(steps, Column(0), Column(1), Column(2), Column(3), Column(4), Column(5));
        for (var i = 0; i < n; i++)
            (multiplier[lanes[i]], recovery[lanes[i]]) = (columns[4 * n + i], columns[5 * n + i]);
    }

    /// <summary>The whole rotation, without relaxation; the phase of the pulse is that at its first instant.</summary>
    /// <param name="pulse">A pulse with a shape.</param>
    /// <param name="b1Scale">n values, ≥ 0.</param>
    /// <param name="offResonanceHz">n values, within ±<see cref="LargestOffResonanceHz"/>.</param>
    /// <param name="result">n lanes; precession during the pulse is included.</param>
    /// <exception cref="ArgumentException">Lengths differ, or the pulse has no shape.</exception>
    /// <exception cref="ArgumentOutOfRangeException">Off-resonance or B1+ scale beyond the range.</exception>
    public static void Rotation(RfPulse pulse, ReadOnlySpan<double> b1Scale, ReadOnlySpan<double> offResonanceHz, CayleyKleinLanes result)
    {
        RequireLanes(b1Scale, offResonanceHz, result.Length);
        if (pulse is HardPulse { Duration: 0 } instant)
        {
            for (var i = 0; i < b1Scale.Length; i++)
            {
                var half = b1Scale[i] * instant.FlipAngle * (Math.PI / 360);
                (result.AReal[i], result.AImaginary[i], result.BReal[i], result.BImaginary[i]) = (Elementary.Cos(half), 0, 0, -Elementary.Sin(half));
            }

            return;
        }

        RotationKernel.Run(PulseSteps.Of(pulse), b1Scale, offResonanceHz, result);
    }

    private static void RequireLanes(ReadOnlySpan<double> b1Scale, ReadOnlySpan<double> offResonanceHz, params ReadOnlySpan<int> others)
    {
        foreach (var length in others)
        {
            if (offResonanceHz.Length != b1Scale.Length || length != b1Scale.Length)
                throw new ArgumentException($"Lanes differ in number: {b1Scale.Length} B1+ scales, {offResonanceHz.Length} off-resonances and {length} of another quantity.");
        }

        for (var i = 0; i < b1Scale.Length; i++)
        {
            if (!(Math.Abs(offResonanceHz[i]) <= LargestOffResonanceHz))
                throw new ArgumentOutOfRangeException(nameof(offResonanceHz), offResonanceHz[i], $"Pulses are integrated within ±{LargestOffResonanceHz} Hz.");
            if (!(b1Scale[i] is >= 0 and <= LargestB1Scale))
                throw new ArgumentOutOfRangeException(nameof(b1Scale), b1Scale[i], $"Pulses are integrated for B1+ scales from 0 to {LargestB1Scale}.");
        }
    }
}
