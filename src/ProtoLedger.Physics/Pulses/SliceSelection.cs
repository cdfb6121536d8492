using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Pulses;

/// <summary>How a slice is selected: a pulse under a gradient. Position z is in units of the slice thickness, nominal edges at ±½.</summary>
/// <param name="Pulse">A shaped pulse.</param>
/// <param name="Polarity">Sign of the gradient.</param>
/// <param name="Thickness">Nominal thickness of what the pulse selects over the slice thickness, &gt; 0.</param>
public sealed record SliceSelection(RfPulse Pulse, GradientPolarity Polarity = GradientPolarity.Positive, double Thickness = 1)
{
    /// <summary>Excitation that a prediction assumes where a document describes none: windowed sinc, 90°, 2.56 ms, time-bandwidth product 4 (common practice, no source).</summary>
    public static SliceSelection DefaultExcitation { get; } = new(new WindowedSincPulse("assumed excitation", 90, 2.56, 4));

    /// <summary>Refocusing that a prediction assumes where a document describes none: as the excitation, 180°.</summary>
    public static SliceSelection DefaultRefocusing { get; } = new(new WindowedSincPulse("assumed refocusing", 180, 2.56, 4));

    /// <summary>Frequency that the gradient spans over one slice thickness, Hz, signed.</summary>
    public double HzPerSlice => (int)Polarity * PulseBandwidth.Hz(Pulse) / Thickness;

    /// <summary>Off-resonance at which the pulse meets a spin at position z: gradient and field error together.</summary>
    /// <param name="z">Position, slice thicknesses.</param>
    /// <param name="offResonanceHz">Field error, Hz.</param>
    public double FrequencyAt(double z, double offResonanceHz) => HzPerSlice * z + offResonanceHz;

    /// <summary>Position of the middle of what is selected under a field error, slice thicknesses: −Δf / <see cref="HzPerSlice"/>.</summary>
    public double ShiftAt(double offResonanceHz) => -offResonanceHz / HzPerSlice;
}
