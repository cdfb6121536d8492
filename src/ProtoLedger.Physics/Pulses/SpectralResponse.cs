using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;

namespace ProtoLedger.Physics.Pulses;

/// <summary>Spectrally selective pulse seen by water and by each peak of fat.</summary>
/// <remarks>The carrier stands on <see cref="FatSpectrum.CarrierPpm"/> plus the detuning; a field error shifts water and fat alike.</remarks>
/// <param name="Pulse">Saturation or fat-selective inversion pulse.</param>
/// <param name="CarrierDetuneHz">Hz from the fat resonance.</param>
/// <param name="FieldStrength">T.</param>
public sealed record SpectralResponse(RfPulse Pulse, double CarrierDetuneHz, double FieldStrength)
{
    /// <summary>Off-resonance from the carrier of a spin species, Hz.</summary>
    /// <param name="shiftPpm">Chemical shift from water, ppm; 0 is water.</param>
    /// <param name="offResonanceHz">Field error, Hz.</param>
    public double FrequencyOf(double shiftPpm, double offResonanceHz) =>
        Proton.ShiftHz(shiftPpm - FatSpectrum.CarrierPpm, FieldStrength) + offResonanceHz - CarrierDetuneHz;

    /// <summary>Mz → multiplier · Mz + recovery of one spin species with relaxation during the pulse.</summary>
    /// <param name="shiftPpm">Chemical shift from water, ppm; 0 is water.</param>
    /// <param name="b1Scale">n values.</param>
    /// <param name="offResonanceHz">n values, Hz.</param>
    /// <param name="t1">n values, ms.</param>
    /// <param name="t2">n values, ms.</param>
    /// <param name="multiplier">n values.</param>
    /// <param name="recovery">n values.</param>
    public void Longitudinal(
        double shiftPpm,
        ReadOnlySpan<double> b1Scale,
        ReadOnlySpan<double> offResonanceHz,
        ReadOnlySpan<double> t1,
        ReadOnlySpan<double> t2,
        Span<double> multiplier,
        Span<double> recovery)
    {
        var frequencies = new double[offResonanceHz.Length];
        for (var i = 0; i < frequencies.Length; i++)
            frequencies[i] = FrequencyOf(shiftPpm, offResonanceHz[i]);
        PulseResponse.Longitudinal(Pulse, b1Scale, frequencies, t1, t2, multiplier, recovery);
    }

    /// <summary>The same for one lane.</summary>
    /// <param name="shiftPpm">Chemical shift from water, ppm; 0 is water.</param>
    /// <param name="b1Scale">Actual over nominal amplitude.</param>
    /// <param name="offResonanceHz">Field error, Hz.</param>
    /// <param name="t1">ms.</param>
    /// <param name="t2">ms.</param>
    public LongitudinalMap Longitudinal(double shiftPpm, double b1Scale, double offResonanceHz, double t1, double t2)
    {
        double multiplier = 0, recovery = 0;
        Longitudinal(shiftPpm, [b1Scale], [offResonanceHz], [t1], [t2], new Span<double>(ref multiplier), new Span<double>(ref recovery));
        return new LongitudinalMap(multiplier, recovery);
    }
}
