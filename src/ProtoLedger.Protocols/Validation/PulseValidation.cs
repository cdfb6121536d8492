using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Validation;

/// <summary>A pulse must be whole, and within the peak B1 of the scanner where that is known.</summary>
internal static class PulseValidation
{
    /// <param name="pulse">The pulse.</param>
    /// <param name="pointer">Where it stands.</param>
    /// <param name="maximumB1Hz">Highest γB1/2π of the scanner, Hz; null where no scanner is in view.</param>
    /// <param name="errors">Takes what is found.</param>
    public static void Check(RfPulse pulse, string pointer, double? maximumB1Hz, ErrorList errors)
    {
        if (pulse is SampledPulse sampled && sampled.AmplitudeHz.Count != sampled.PhaseDegrees.Count)
            errors.Add(
                pointer + "/phase", $"{sampled.PhaseDegrees.Count} samples", $"{sampled.AmplitudeHz.Count} samples",
                "A sampled pulse needs as many phases as amplitudes.");
        var (peak, member) = pulse switch
        {
            HyperbolicSecantPulse secant => (secant.PeakB1Hz, "/peakB1"),
            SampledPulse samples => (samples.AmplitudeHz.Max(Math.Abs), "/amplitude"),
            HardPulse { Duration: > 0 } hard => (hard.FlipAngle / 360 / (hard.Duration / 1000), "/duration"),
            _ => (0, ""),
        };
        if (peak > maximumB1Hz)
            errors.Add(
                pointer + member, peak, $"≤ {ShownValue.Of(maximumB1Hz.Value)} Hz",
                "The pulse needs a higher peak B1 (Hz) than the scanner's limit allows.");
    }
}
