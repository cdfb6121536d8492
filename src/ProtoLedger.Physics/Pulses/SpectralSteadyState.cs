using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Pulses;

/// <summary>Steady state under a spectral pulse that recurs once per slice while each slice is excited once per repetition.</summary>
/// <remarks>
/// Pulses stand one slice interval (TR over the slices of a concatenation) apart. A slice therefore meets all pulses of a repetition but one excitation.
/// Closed form: composition of affine maps, fixed point over one repetition. Derived from the Bloch equations.
/// </remarks>
/// <param name="PulseDuration">Of the spectral pulse, ms.</param>
/// <param name="Delay">From the end of the pulse to the excitation centre, ms.</param>
/// <param name="EchoTime">From the excitation centre to the echo, ms.</param>
/// <param name="SliceInterval">From one spectral pulse to the next, ms; at least pulse + delay + echo.</param>
/// <param name="PulsesPerRepetition">Spectral pulses from one excitation of a slice to its next, ≥ 1: slices in a concatenation.</param>
/// <param name="ExcitationFlipAngle">Degrees, B1+ scale applied.</param>
/// <param name="RefocusingFlipAngle">Degrees, B1+ scale applied, at half the echo time with ideal crushers; null for a gradient echo.</param>
public sealed record SpectralSteadyState(
    double PulseDuration,
    double Delay,
    double EchoTime,
    double SliceInterval,
    int PulsesPerRepetition,
    double ExcitationFlipAngle,
    double? RefocusingFlipAngle)
{
    /// <summary>Signal of one spin species.</summary>
    /// <param name="pulse">What the spectral pulse does to its longitudinal magnetisation.</param>
    /// <param name="t1">ms.</param>
    /// <param name="t2">ms; T2* for a gradient echo.</param>
    public SpectralSignal Solve(LongitudinalMap pulse, double t1, double t2)
    {
        var toExcitation = LongitudinalMap.Wait(Delay, t1);
        var afterPulse = toExcitation
            .Then(Readout(t1))
            .Then(LongitudinalMap.Wait(SliceInterval - PulseDuration - Delay - EchoTime, t1))
            .Then(pulse.Then(LongitudinalMap.Wait(SliceInterval - PulseDuration, t1)).Repeat(PulsesPerRepetition - 1))
            .Then(pulse)
            .FixedPoint;
        var beforeExcitation = toExcitation.Apply(afterPulse);
        var excited = SinDegrees(ExcitationFlipAngle) * Elementary.Exp(-EchoTime / t2);
        if (RefocusingFlipAngle is { } angle)
            excited *= (1 - CosDegrees(angle)) / 2;
        return new SpectralSignal(afterPulse, beforeExcitation, beforeExcitation * excited);
    }

    private LongitudinalMap Readout(double t1)
    {
        var excitation = new LongitudinalMap(CosDegrees(ExcitationFlipAngle), 0);
        if (RefocusingFlipAngle is not { } angle)
            return excitation.Then(LongitudinalMap.Wait(EchoTime, t1));
        var half = LongitudinalMap.Wait(EchoTime / 2, t1);
        return excitation.Then(half).Then(new LongitudinalMap(CosDegrees(angle), 0)).Then(half);
    }

    private static double SinDegrees(double angle) => Elementary.Sin(angle * (Math.PI / 180));

    private static double CosDegrees(double angle) => Elementary.Cos(angle * (Math.PI / 180));
}

/// <summary>Steady state of one spin species under a spectral pulse, over M0 = 1.</summary>
/// <param name="AfterPulse">Mz at the end of the spectral pulse.</param>
/// <param name="BeforeExcitation">Mz immediately before the excitation.</param>
/// <param name="Signed">Signal at the echo, negative where Mz was.</param>
public readonly record struct SpectralSignal(double AfterPulse, double BeforeExcitation, double Signed);
