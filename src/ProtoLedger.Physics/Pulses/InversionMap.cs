using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Pulses;

/// <summary>How well an inversion inverts what is imaged, over off-resonance and B1+, and where it fails.</summary>
/// <remarks>
/// Efficiency f: the mean Mz over the slice becomes −f · Mz, without relaxation during the pulse. For a selective slab off-resonance shifts the slab against
/// the slice; for a non-selective pulse it moves the spin out of the pulse's band. An inversion known by its efficiency alone has that value everywhere.
/// </remarks>
/// <param name="Inversion">The inversion.</param>
/// <param name="Readout">What images the slice, which decides how it is selected; null for an excitation alone.</param>
public sealed record InversionMap(Inversion Inversion, Readout? Readout = null)
{
    /// <summary>Efficiency below which an inversion counts as failed where no other limit is given.</summary>
    public const double DefaultLimit = 0.9;

    private readonly InversionSlab? slab = InversionSlab.Of(Inversion, Readout);

    /// <summary>Efficiency over lanes.</summary>
    /// <param name="b1Scale">n values.</param>
    /// <param name="offResonanceHz">n values, Hz.</param>
    /// <param name="efficiency">n values in [−1, 1]; 1 is a perfect inversion, −1 an inversion that does nothing.</param>
    public void Efficiency(ReadOnlySpan<double> b1Scale, ReadOnlySpan<double> offResonanceHz, Span<double> efficiency)
    {
        if (slab is null)
            PulseResponse.Longitudinal(Inversion.Pulse, b1Scale, offResonanceHz, efficiency);
        else
            slab.MeanMultiplier(b1Scale, offResonanceHz, efficiency);
        foreach (ref var value in efficiency)
            value = -value;
    }

    /// <summary>Efficiency over a grid: value of B1+ scale i and off-resonance j at i · (number of off-resonances) + j.</summary>
    /// <param name="b1Scale">Rows.</param>
    /// <param name="offResonanceHz">Columns, Hz.</param>
    public double[] Grid(ReadOnlySpan<double> b1Scale, ReadOnlySpan<double> offResonanceHz)
    {
        var (scales, frequencies) = (new double[b1Scale.Length * offResonanceHz.Length], new double[b1Scale.Length * offResonanceHz.Length]);
        for (var i = 0; i < scales.Length; i++)
            (scales[i], frequencies[i]) = (b1Scale[i / offResonanceHz.Length], offResonanceHz[i % offResonanceHz.Length]);
        var result = new double[scales.Length];
        Efficiency(scales, frequencies, result);
        return result;
    }

    /// <summary>Efficiency at one point of the fields.</summary>
    /// <param name="b1Scale">Actual over nominal amplitude.</param>
    /// <param name="offResonanceHz">Hz.</param>
    public double At(double b1Scale, double offResonanceHz)
    {
        double result = 0;
        Efficiency([b1Scale], [offResonanceHz], new Span<double>(ref result));
        return result;
    }

    /// <summary>Why the inversion falls short at a point; <see cref="InversionFailure.None"/> where it does not.</summary>
    /// <param name="b1Scale">Actual over nominal amplitude.</param>
    /// <param name="offResonanceHz">Hz.</param>
    /// <param name="limit">Efficiency that is wanted.</param>
    public InversionFailure WhyAt(double b1Scale, double offResonanceHz, double limit = DefaultLimit)
    {
        if (At(b1Scale, offResonanceHz) >= limit)
            return InversionFailure.None;

        // What the pulse does in the middle of its own band at this B1+: only then is its amplitude to blame.
        double middle = 0;
        PulseResponse.Longitudinal(Inversion.Pulse, [b1Scale], [0], new Span<double>(ref middle));
        return -middle < limit ? InversionFailure.Amplitude : slab is null ? InversionFailure.Bandwidth : InversionFailure.Shift;
    }

    /// <summary>Where the inversion starts to fail: off-resonance at nominal B1+ on either side, and B1+ scale on resonance.</summary>
    /// <param name="limit">Efficiency that is wanted.</param>
    /// <param name="reachHz">How far off resonance to look, Hz.</param>
    /// <returns>Edges to 0.1 Hz and 10⁻⁴; null where there is none within reach (B1+ scale from 0.2 to 2).</returns>
    public InversionLimits Limits(double limit = DefaultLimit, double reachHz = 3000)
    {
        if (At(1, 0) < limit)
            return new InversionLimits(limit, false, null, null, null, null);
        return new InversionLimits(
            limit,
            true,
            Edge(0, -reachHz, 25, 0.1, limit, offResonance: true),
            Edge(0, reachHz, 25, 0.1, limit, offResonance: true),
            Edge(1, 0.2, 0.02, 1e-4, limit, offResonance: false),
            Edge(1, 2, 0.02, 1e-4, limit, offResonance: false));
    }

    /// <summary>First point, seen from where the limit holds, beyond which it does not.</summary>
    private double? Edge(double from, double to, double step, double precision, double limit, bool offResonance)
    {
        var points = new double[(int)Math.Ceiling(Math.Abs(to - from) / step - 1e-9) + 1];
        for (var i = 0; i < points.Length; i++)
            points[i] = from + (to - from) * i / (points.Length - 1);
        var along = offResonance ? Grid([1], points) : Grid(points, [0]);
        var first = Array.FindIndex(along, value => value < limit);
        if (first < 0)
            return null;
        var (inside, outside) = (points[Math.Max(0, first - 1)], points[first]);
        while (Math.Abs(outside - inside) > precision)
        {
            var middle = (inside + outside) / 2;
            if ((offResonance ? At(1, middle) : At(middle, 0)) >= limit)
                inside = middle;
            else
                outside = middle;
        }

        return inside;
    }
}

/// <summary>Why an inversion falls short.</summary>
public enum InversionFailure
{
    /// <summary>It does not.</summary>
    None,

    /// <summary>Off-resonance has moved the slab away from the slice.</summary>
    Shift,

    /// <summary>Off-resonance lies outside the band of a non-selective pulse.</summary>
    Bandwidth,

    /// <summary>The B1+ field is too weak or, for a pulse that is not adiabatic, too strong.</summary>
    Amplitude,
}

/// <summary>Where an inversion starts to fail.</summary>
/// <param name="Efficiency">Efficiency that is wanted.</param>
/// <param name="HoldsNominally">Whether it holds at nominal B1+ on resonance; where it does not, the others are null.</param>
/// <param name="LowestHz">Lowest off-resonance at nominal B1+ at which it still holds, Hz; null where it holds as far as was looked.</param>
/// <param name="HighestHz">Highest off-resonance, Hz; null likewise.</param>
/// <param name="LowestB1Scale">Lowest B1+ scale on resonance; null likewise.</param>
/// <param name="HighestB1Scale">Highest B1+ scale on resonance; null likewise.</param>
public readonly record struct InversionLimits(
    double Efficiency, bool HoldsNominally, double? LowestHz, double? HighestHz, double? LowestB1Scale, double? HighestB1Scale);
