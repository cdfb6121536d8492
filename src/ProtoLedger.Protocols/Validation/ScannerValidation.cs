using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Validation;

/// <summary>A scanner's pulses must be playable by it.</summary>
internal static class ScannerValidation
{
    public static IReadOnlyList<DocumentError> Validate(ScannerDocument scanner)
    {
        var errors = new ErrorList();
        foreach (var (name, pulse) in scanner.Pulses)
            CheckPulse(pulse, JsonPointer.Append("/pulses", name), scanner.Limits.MaximumB1Hz, errors);
        return errors.All;
    }

    public static void CheckPulse(RfPulse pulse, string pointer, double maximumB1Hz, ErrorList errors)
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
                pointer + member, peak, $"≤ {ShownValue.Of(maximumB1Hz)} Hz",
                "The pulse needs a higher peak B1 (Hz) than the scanner's limit allows.");
    }
}
