using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Pulses;

/// <summary>A slice-selective inversion seen by the slice that is imaged: off-resonance shifts the slab against the slice and weakens the inversion.</summary>
/// <remarks>
/// Both pulses are evaluated at z and off-resonance with their own gradient and polarity; nothing is assumed to cancel. Shift of the slab against the slice:
/// −Δf · (1/slab Hz per slice − 1/slice Hz per slice) slice thicknesses. The mean over the slice weighs each z with the transverse magnetisation that the
/// excitation makes of it and, in a spin echo, with the share that is refocused; it is signed, since prepared and unprepared spins of one voxel add before the magnitude is taken.
/// </remarks>
/// <param name="Inversion">Inversion pulse, polarity, slab thickness over slice thickness.</param>
/// <param name="Excitation">Excitation of the slice.</param>
/// <param name="Refocusing">Refocusing of the slice; null for a gradient echo.</param>
public sealed record InversionSlab(SliceSelection Inversion, SliceSelection Excitation, SliceSelection? Refocusing = null)
{
    private const int Intervals = 64;
    private const double Reach = 1.5;

    /// <summary>Slab of an inversion of a series; null where the inversion is not selective or known by its efficiency alone.</summary>
    /// <param name="inversion">The preparation.</param>
    /// <param name="readout">What images the slice: a spin echo selects it twice; null for an excitation alone. Pulses are the assumed ones of <see cref="SliceSelection"/>.</param>
    public static InversionSlab? Of(Inversion inversion, Readout? readout = null) =>
        inversion is { SlabThickness: { } thickness, Pulse: not (EfficiencyInversion or HardPulse { Duration: 0 }) }
            ? new InversionSlab(
                new SliceSelection(inversion.Pulse, GradientPolarity.Positive, thickness),
                SliceSelection.DefaultExcitation,
                readout is SpinEcho or EchoTrain or DiffusionSpinEcho ? SliceSelection.DefaultRefocusing : null)
            : null;

    /// <summary>Shift of the middle of the slab against the middle of the slice, slice thicknesses.</summary>
    public double ShiftAt(double offResonanceHz) => Inversion.ShiftAt(offResonanceHz) - Excitation.ShiftAt(offResonanceHz);

    /// <summary>Mz → multiplier · Mz of the inversion at positions across the slice, without relaxation.</summary>
    /// <param name="b1Scale">One scale for all positions.</param>
    /// <param name="offResonanceHz">One field error for all positions, Hz.</param>
    /// <param name="z">n positions, slice thicknesses.</param>
    /// <param name="multiplier">n values in [−1, 1].</param>
    public void Profile(double b1Scale, double offResonanceHz, ReadOnlySpan<double> z, Span<double> multiplier)
    {
        var (scales, frequencies) = (new double[z.Length], new double[z.Length]);
        for (var i = 0; i < z.Length; i++)
            (scales[i], frequencies[i]) = (b1Scale, Inversion.FrequencyAt(z[i], offResonanceHz));
        PulseResponse.Longitudinal(Inversion.Pulse, scales, frequencies, multiplier);
    }

    /// <summary>Mean multiplier over the slice, without relaxation during the pulse: −1 is a perfect inversion of all that is imaged.</summary>
    /// <param name="b1Scale">n values.</param>
    /// <param name="offResonanceHz">n values, Hz.</param>
    /// <param name="multiplier">n values in [−1, 1].</param>
    /// <exception cref="ArgumentException">Lengths differ.</exception>
    public void MeanMultiplier(ReadOnlySpan<double> b1Scale, ReadOnlySpan<double> offResonanceHz, Span<double> multiplier)
    {
        if (offResonanceHz.Length != b1Scale.Length || multiplier.Length != b1Scale.Length)
            throw new ArgumentException($"Lanes differ in number: {b1Scale.Length} B1+ scales, {offResonanceHz.Length} off-resonances, {multiplier.Length} results.");
        var points = FieldPoints.Distinct(b1Scale, offResonanceHz);
        var means = new double[points.Count];
        for (var i = 0; i < means.Length; i++)
            means[i] = MeanMultiplier(points.B1Scale[i], points.OffResonanceHz[i]);
        for (var lane = 0; lane < multiplier.Length; lane++)
            multiplier[lane] = means[points.PointOf[lane]];
    }

    private double MeanMultiplier(double b1Scale, double offResonanceHz)
    {
        // The integration follows the slice that is imaged, wherever off-resonance puts it.
        var z = SliceProfile.Positions(Reach, Intervals);
        var middle = Excitation.ShiftAt(offResonanceHz);
        for (var i = 0; i < z.Length; i++)
            z[i] += middle;
        var (weight, rest, inverted) = (new double[z.Length], new double[z.Length], new double[z.Length]);
        SliceProfile.Excitation(Excitation, b1Scale, offResonanceHz, z, weight, rest);
        if (Refocusing is not null)
        {
            var refocused = new double[z.Length];
            SliceProfile.Refocusing(Refocusing, b1Scale, offResonanceHz, z, refocused, rest);
            for (var i = 0; i < z.Length; i++)
                weight[i] *= refocused[i];
        }

        Profile(b1Scale, offResonanceHz, z, inverted);
        double sum = 0, total = 0;
        for (var i = 0; i < z.Length; i++)
        {
            var share = SliceProfile.Simpson(i, z.Length) * weight[i];
            sum += share * inverted[i];
            total += share;
        }

        return sum / total;
    }
}
