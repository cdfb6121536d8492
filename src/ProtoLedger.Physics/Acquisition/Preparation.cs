namespace ProtoLedger.Physics.Acquisition;

/// <summary>A block of RF and waiting played before the readout.</summary>
public abstract record Preparation;

/// <summary>Inversion of the longitudinal magnetisation of water and fat alike.</summary>
/// <param name="InversionTime">ms, &gt; 0, from the centre of the inversion pulse to what <paramref name="End"/> says.</param>
/// <param name="End">End point of <paramref name="InversionTime"/>.</param>
/// <param name="Pulse">The pulse; never an ideal 180° unless the document says so.</param>
/// <param name="SlabThickness">Thickness of a selective slab over the slice thickness; null for a non-selective pulse.</param>
public sealed record Inversion(
    double InversionTime,
    InversionTimeEnd End,
    RfPulse Pulse,
    double? SlabThickness = null) : Preparation;

/// <summary>Where an inversion time ends.</summary>
public enum InversionTimeEnd
{
    /// <summary>Centre of the excitation pulse. The default.</summary>
    Excitation,

    /// <summary>Centre of the pulse whose echo fills the centre of k-space.</summary>
    KSpaceCentre,

    /// <summary>Centre of the next inversion pulse.</summary>
    NextInversion,
}

/// <summary>T2 preparation: tip down, refocus, tip up.</summary>
/// <param name="PreparationTime">From tip-down to tip-up, ms, &gt; 0.</param>
/// <param name="RefocusingPulses">Number of refocusing pulses, ≥ 1.</param>
/// <param name="Delay">From tip-up to the excitation or the next preparation, ms, ≥ 0.</param>
public sealed record T2Preparation(double PreparationTime, int RefocusingPulses = 4, double Delay = 5) : Preparation;

/// <summary>Spectrally selective saturation of fat, once per slice.</summary>
/// <param name="Pulse">The saturation pulse; its carrier stands on the fat resonance plus <paramref name="CarrierDetuneHz"/>.</param>
/// <param name="Delay">From the end of the pulse to the excitation centre, ms, ≥ 0.</param>
/// <param name="CarrierDetuneHz">Hz from the fat resonance.</param>
public sealed record SpectralSaturation(RfPulse Pulse, double Delay, double CarrierDetuneHz = 0) : Preparation;

/// <summary>Inversion of fat alone, once per slice.</summary>
/// <param name="InversionTime">ms, &gt; 0, from the pulse centre to the excitation centre.</param>
/// <param name="Pulse">The spectrally selective pulse.</param>
/// <param name="CarrierDetuneHz">Hz from the fat resonance.</param>
public sealed record SpectralInversion(double InversionTime, RfPulse Pulse, double CarrierDetuneHz = 0) : Preparation;
