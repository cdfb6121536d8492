using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Validation;

/// <summary>How long one slice keeps the scanner busy, and whether all slices of a pass fit in the repetition time.</summary>
/// <remarks>
/// A long inversion time is shared: while one slice recovers, others are inverted and read out, so that only the pulse and
/// the readout count. An inversion time too short to hold another slice's readout is spent waiting and counts in full.
/// This is a necessary condition; a console may need more.
/// </remarks>
public static class SliceTiming
{
    /// <summary>Taken for a pulse whose length the documents do not say, ms; common practice for adiabatic inversions, no source.</summary>
    public const double DefaultPreparationPulse = 10;

    /// <summary>Taken for excitation, refocusing and flip-back pulses, ms; common practice, no source.</summary>
    public const double ReadoutPulse = 2;

    /// <summary>Length of a pulse, ms; <see cref="DefaultPreparationPulse"/> where it is known by efficiency or name alone.</summary>
    /// <param name="pulse">The pulse.</param>
    public static double Duration(RfPulse pulse) => pulse switch
    {
        HardPulse hard => hard.Duration,
        WindowedSincPulse sinc => sinc.Duration,
        GaussianPulse gaussian => gaussian.Duration,
        HyperbolicSecantPulse secant => secant.Duration,
        SampledPulse sampled => sampled.Duration,
        _ => DefaultPreparationPulse,
    };

    /// <summary>From the excitation centre to the end of the last echo and of a flip-back, ms.</summary>
    /// <param name="readout">The readout.</param>
    public static double ReadoutLength(Readout readout) => readout switch
    {
        EchoTrain train => (train.EchoTrainLength + 0.5) * train.EchoSpacing + (train.FlipBackAngle is null ? 0 : ReadoutPulse / 2),
        SpoiledGradientEchoTrain train => train.ReadoutSpacing * train.ReadoutTrainLength,
        SpoiledGradientEcho gradient => gradient.FurtherEchoTimes.Append(gradient.EchoTime).Max(),
        _ => readout.EchoTime,
    };

    /// <summary>Time for which one slice keeps the scanner from serving another, ms.</summary>
    /// <param name="series">The series.</param>
    public static double Busy(Series series)
    {
        var readout = ReadoutPulse / 2 + ReadoutLength(series.Readout);
        return readout + series.Preparations.Sum(preparation => preparation switch
        {
            Inversion block when block.InversionTime < readout + Duration(block.Pulse) => block.InversionTime + Duration(block.Pulse) / 2,
            Inversion block => Duration(block.Pulse),
            T2Preparation block => block.PreparationTime + block.Delay,
            SpectralSaturation block => Duration(block.Pulse) + block.Delay,
            SpectralInversion block => Duration(block.Pulse) / 2 + block.InversionTime,
            _ => 0,
        });
    }

    /// <summary>Slices that share one repetition time: all of a pass for 2D, the slab alone for 3D.</summary>
    /// <param name="series">The series.</param>
    /// <param name="concatenations">Number of passes, ≥ 1.</param>
    public static int SlicesPerPass(Series series, int concatenations) =>
        series.Geometry.Dimensions == 3 ? 1 : (series.Timing.Slices + concatenations - 1) / concatenations;

    /// <summary>Fewest passes in which the slices fit, or null where even one slice does not.</summary>
    /// <param name="series">The series.</param>
    public static int? NeededConcatenations(Series series)
    {
        var capacity = (int)Math.Min(Math.Floor(series.Readout.RepetitionTime / Busy(series) + 1e-9), int.MaxValue);
        if (capacity < 1)
            return null;
        return series.Geometry.Dimensions == 3 ? 1 : (series.Timing.Slices + capacity - 1) / capacity;
    }

    /// <summary>True when all slices of a pass fit in the repetition time.</summary>
    /// <param name="series">The series.</param>
    public static bool SlicesFit(Series series) => NeededConcatenations(series) is { } needed && needed <= series.Timing.Concatenations;

}
