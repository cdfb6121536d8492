namespace ProtoLedger.Physics.Pulses;

/// <summary>A spin echo with selective pulses, to be integrated through the slice.</summary>
/// <param name="Excitation">Excitation pulse and gradient.</param>
/// <param name="Refocusing">Refocusing pulse and its own gradient.</param>
/// <param name="EchoTime">ms, &gt; 0.</param>
/// <param name="RepetitionTime">ms, &gt; <paramref name="EchoTime"/>; null for full recovery.</param>
/// <param name="B1Scale">Scales both pulses.</param>
/// <param name="OffResonanceHz">Field error, Hz.</param>
/// <param name="Reach">Integration runs over |z| ≤ this many slice thicknesses.</param>
/// <param name="Intervals">Intervals of the integration, even.</param>
public sealed record SelectiveSpinEcho(
    SliceSelection Excitation,
    SliceSelection Refocusing,
    double EchoTime,
    double? RepetitionTime = null,
    double B1Scale = 1,
    double OffResonanceHz = 0,
    double Reach = 3,
    int Intervals = 1200);

/// <summary>Echo through the slice, over that of a perfect rectangular slice.</summary>
/// <param name="Coherent">Magnitude of the sum: dephasing across the slice counts.</param>
/// <param name="MagnitudeIntegral">Sum of magnitudes.</param>
public readonly record struct SelectiveEchoSignal(double Coherent, double MagnitudeIntegral);
