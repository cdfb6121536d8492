using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Observables;

/// <summary>Whether the slices of a 2D series fit into its repetition time.</summary>
/// <param name="BusyTime">Time that one slice occupies the scanner in each repetition, ms.</param>
/// <param name="SlicesPerConcatenation">Slices that one repetition must hold.</param>
/// <param name="Needed">Time that they need, ms.</param>
/// <param name="Available">Repetition time, ms.</param>
/// <param name="ConcatenationsNeeded">Fewest concatenations that make the slices fit; 0 where not even one slice fits.</param>
public readonly record struct SliceFit(double BusyTime, int SlicesPerConcatenation, double Needed, double Available, int ConcatenationsNeeded)
{
    /// <summary>Length taken for an inversion pulse that is known by its efficiency alone, ms (common practice, no source).</summary>
    public const double AssumedInversionDuration = 10;

    /// <summary>Crushers, spoilers and gradient ramps around a readout, ms (common practice, no source).</summary>
    public const double GradientOverhead = 3;

    /// <summary>Whether the slices fit with the concatenations of the series.</summary>
    public bool Fits => Needed <= Available * (1 + 1e-9);

    /// <summary>Counts what one slice plays.</summary>
    /// <param name="series">The series; a 3D series holds one slab.</param>
    /// <remarks>
    /// While one slice waits for its inversion time, others are inverted or read, so an inversion counts with its pulse alone, unless its time is too short to
    /// hold another slice's readout: then it is spent waiting and counts whole, as do a T2 preparation and a spectral saturation or inversion.
    /// A necessary condition; a console may need more. Source: arithmetic (derived).
    /// </remarks>
    public static SliceFit Of(Series series)
    {
        ArgumentNullException.ThrowIfNull(series);
        var readout = ReadoutDuration(series);
        var busy = series.Preparations.Sum(preparation => Occupied(preparation, readout)) + readout;
        var slices = series.Geometry.Dimensions == 3 ? 1 : series.Timing.Slices;
        var each = (slices + series.Timing.Concatenations - 1) / series.Timing.Concatenations;
        var available = series.Readout.RepetitionTime;
        var atMost = (int)Math.Floor(available / busy * (1 + 1e-9));
        return new SliceFit(busy, each, each * busy, available, atMost == 0 ? 0 : (slices + atMost - 1) / atMost);
    }

    private static double Occupied(Preparation preparation, double readout) => preparation switch
    {
        Inversion p when p.InversionTime < readout + PulseDuration(p.Pulse) => PulseDuration(p.Pulse) / 2 + p.InversionTime,
        Inversion p => PulseDuration(p.Pulse),
        T2Preparation p => p.PreparationTime + p.Delay,
        SpectralSaturation p => PulseDuration(p.Pulse) + p.Delay,
        SpectralInversion p => PulseDuration(p.Pulse) / 2 + p.InversionTime,
        _ => throw new ArgumentException($"Preparation {preparation.GetType().Name} is not known here."),
    };

    /// <summary>From the excitation centre to the end of the last echo, its sampling and its gradients, ms.</summary>
    /// <param name="series">The series.</param>
    public static double ReadoutDuration(Series series)
    {
        var sampling = 1000 / series.Geometry.PixelBandwidth;
        return series.Readout switch
        {
            BalancedGradientEcho r => r.RepetitionTime,
            EchoTrain r => r.EchoSpacing * (r.EchoTrainLength + (r.FlipBackAngle is null ? 0.5 : 1)) + GradientOverhead,
            SpoiledGradientEchoTrain r => r.ReadoutSpacing * r.ReadoutTrainLength + GradientOverhead,
            SpoiledGradientEcho r => Math.Min(r.RepetitionTime, r.FurtherEchoTimes.Append(r.EchoTime).Max() + sampling / 2 + GradientOverhead),
            var r => r.EchoTime + sampling / 2 + GradientOverhead,
        };
    }

    /// <summary>Length of a pulse, ms; <see cref="AssumedInversionDuration"/> where it is known by its efficiency or its name alone.</summary>
    /// <param name="pulse">The pulse.</param>
    public static double PulseDuration(RfPulse pulse) => pulse switch
    {
        HardPulse p => p.Duration,
        WindowedSincPulse p => p.Duration,
        GaussianPulse p => p.Duration,
        HyperbolicSecantPulse p => p.Duration,
        SampledPulse p => p.Duration,
        _ => AssumedInversionDuration,
    };
}
