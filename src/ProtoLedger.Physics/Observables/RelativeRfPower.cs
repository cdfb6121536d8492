using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Observables;

/// <summary>Radio-frequency power of a series relative to another: no safety limit, and no statement on any patient or implant.</summary>
public static class RelativeRfPower
{
    /// <summary>Pulse that stands for an inversion known by its efficiency alone: hyperbolic secant, 10 ms, β 800 rad/s, μ 4.9, 600 Hz (assumed).</summary>
    public static HyperbolicSecantPulse AssumedInversion { get; } = new("assumed inversion", 10, 800, 4.9, 600);

    /// <summary>Power of a series over that of another: 1 is unchanged.</summary>
    /// <param name="before">The old series.</param>
    /// <param name="beforeField">Its B0, T.</param>
    /// <param name="after">The new series.</param>
    /// <param name="afterField">Its B0, T.</param>
    /// <remarks>
    /// B0² times mean square of B1+ over time, every inversion, saturation, excitation, refocusing and flip-back pulse counted.
    /// Source: absorbed power goes with σ r² B0² α² times duty cycle below the high-frequency limit (derived).
    /// </remarks>
    public static double Between(Series before, double beforeField, Series after, double afterField) =>
        afterField * afterField * MeanSquare(after) / (beforeField * beforeField * MeanSquare(before));

    /// <summary>Mean of (γ̄B1)² over a repetition, Hz².</summary>
    /// <param name="series">The series; excitation and refocusing have the shapes of <see cref="SliceSelection"/>'s defaults, scaled to their angles.</param>
    public static double MeanSquare(Series series)
    {
        ArgumentNullException.ThrowIfNull(series);
        var slices = series.Geometry.Dimensions == 3 ? 1 : (double)series.Timing.Slices / series.Timing.Concatenations;
        return slices * (series.Preparations.Sum(Energy) + Energy(series.Readout)) / (series.Readout.RepetitionTime * 1e-3);
    }

    /// <summary>∫ (γ̄B1)² dt of one pulse at B1+ scale 1, Hz²·s.</summary>
    /// <param name="pulse">A pulse; an efficiency counts as <see cref="AssumedInversion"/>, an instantaneous rotation as a hard pulse of 1 ms.</param>
    public static double Energy(RfPulse pulse) => pulse switch
    {
        EfficiencyInversion => Energy(AssumedInversion),
        HardPulse { Duration: 0 } p => Energy(p with { Duration = 1 }),
        _ => PulseSteps.Of(pulse).Energy,
    };

    private static double Energy(Preparation preparation) => preparation switch
    {
        Inversion p => Energy(p.Pulse),
        SpectralSaturation p => Energy(p.Pulse),
        SpectralInversion p => Energy(p.Pulse),
        T2Preparation p => Hard(90) * 2 + Hard(180) * p.RefocusingPulses,
        _ => throw new ArgumentException($"Preparation {preparation.GetType().Name} is not known here."),
    };

    private static double Energy(Readout readout) => readout switch
    {
        SpinEcho r => Excitation(r.ExcitationFlipAngle) + Refocusing(r.RefocusingFlipAngle),
        DiffusionSpinEcho r => Excitation(r.ExcitationFlipAngle) + Refocusing(r.RefocusingFlipAngle),
        EchoTrain r => Excitation(r.ExcitationFlipAngle)
            + (r.RefocusingFlipAngles.Count == 1 ? r.EchoTrainLength * Refocusing(r.RefocusingFlipAngles[0]) : r.RefocusingFlipAngles.Sum(Refocusing))
            + Excitation(r.FlipBackAngle ?? 0),
        SpoiledGradientEchoTrain r => r.ReadoutTrainLength * Excitation(r.ExcitationFlipAngle),
        _ => Excitation(readout.ExcitationFlipAngle),
    };

    private static double Hard(double flipAngle) => flipAngle * flipAngle / (360 * 360 * 1e-3);

    private static double Excitation(double flipAngle) => Scaled(SliceSelection.DefaultExcitation.Pulse, flipAngle / 90);

    private static double Refocusing(double flipAngle) => Scaled(SliceSelection.DefaultRefocusing.Pulse, flipAngle / 180);

    private static double Scaled(RfPulse pulse, double scale) => scale * scale * Energy(pulse);
}
