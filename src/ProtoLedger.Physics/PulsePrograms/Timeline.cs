using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>A preparation at its time.</summary>
/// <param name="Start">ms from the first excitation centre, negative before it.</param>
/// <param name="End">Where it ends.</param>
/// <param name="Preparation">The preparation.</param>
internal readonly record struct PreparationEvent(double Start, double End, Preparation Preparation);

/// <summary>Places the preparations of a series on the time axis, whose zero is the centre of the first excitation.</summary>
internal static class Timeline
{
    private const double Slack = 1e-9;

    /// <summary>Every preparation of one period in order of time, those that other slices play included.</summary>
    /// <param name="series">The series.</param>
    /// <param name="readoutEnd">End of the readout, ms.</param>
    internal static PreparationEvent[] Place(Series series, double readoutEnd)
    {
        var own = OwnEvents(series);
        var start = 0.0;
        var recurs = false;
        foreach (var e in own)
        {
            start = Math.Min(start, e.Start);
            recurs |= RecursPerSlice(e.Preparation);
        }

        var period = series.Readout.RepetitionTime;
        if (start + period < readoutEnd - Slack)
            throw new ArgumentException(
                $"RepetitionTime: {period} ms is too short, preparations and readout take {readoutEnd - start} ms.");

        var all = recurs ? [.. own.Concat(OfOtherSlices(series, own, start)).OrderBy(e => e.Start)] : own;
        for (var i = 0; i < all.Length; i++)
        {
            var (next, what) = i + 1 < all.Length ? (all[i + 1].Start, "the next preparation") : (start + period, "the next repetition");
            if (all[i].Start < 0 && all[i].End > Math.Min(next, 0) + Slack)
                throw new ArgumentException(
                    $"{Name(all[i].Preparation)}: it ends {-all[i].End} ms before the excitation and {next - all[i].End} ms before {what}; it must end before both.");
            if (all[i].Start >= 0 && (all[i].Start < readoutEnd - Slack || all[i].End > next + Slack))
                throw new ArgumentException(
                    $"{Name(all[i].Preparation)}: that of another slice falls into the readout; {series.Timing.Slices} slices in {series.Timing.Concatenations} "
                    + $"concatenations do not fit in a RepetitionTime of {period} ms.");
        }

        return all;
    }

    /// <summary>Slices that share a repetition time; spectral preparations recur once for each.</summary>
    internal static int SlicesPerRepetition(Series series) =>
        series.Geometry.Dimensions == 3 ? 1 : (series.Timing.Slices + series.Timing.Concatenations - 1) / series.Timing.Concatenations;

    private static PreparationEvent[] OwnEvents(Series series)
    {
        var preparations = series.Preparations;
        var events = new PreparationEvent[preparations.Count];
        for (var i = preparations.Count - 1; i >= 0; i--)
        {
            var next = i + 1 < events.Length ? events[i + 1].Start : 0;
            events[i] = preparations[i] switch
            {
                Inversion inversion => At(InversionStart(series, i, inversion, events), 0, inversion),
                SpectralInversion spectral => Centred(-spectral.InversionTime, Duration(spectral.Pulse), spectral),
                SpectralSaturation saturation => At(-saturation.Delay - Duration(saturation.Pulse), Duration(saturation.Pulse), saturation),
                T2Preparation t2 => At(next - t2.Delay - t2.PreparationTime, t2.PreparationTime, t2),
                var other => throw new ArgumentException($"Preparation {i}: {other.GetType().Name} is not known."),
            };
            if (i + 1 < events.Length && events[i].Start > events[i + 1].Start + Slack)
                throw new ArgumentException(
                    $"Preparations {i} and {i + 1}: {Name(preparations[i])} would play after {Name(preparations[i + 1])}, {events[i].Start} against {events[i + 1].Start} ms from the excitation.");
        }

        return events;
    }

    private static double InversionStart(Series series, int index, Inversion inversion, PreparationEvent[] events)
    {
        switch (inversion.End)
        {
            case InversionTimeEnd.Excitation:
                return -inversion.InversionTime;
            case InversionTimeEnd.KSpaceCentre:
                var centre = series.Readout is SpoiledGradientEchoTrain train ? train.CentreIndex * train.ReadoutSpacing : 0;
                return centre - inversion.InversionTime;
            default:
                for (var i = index + 1; i < events.Length; i++)
                    if (events[i].Preparation is Inversion or SpectralInversion)
                        return (events[i].Start + events[i].End) / 2 - inversion.InversionTime;
                throw new ArgumentException($"Preparation {index}: its InversionTime ends at the next inversion, but none follows.");
        }
    }

    private static IEnumerable<PreparationEvent> OfOtherSlices(Series series, PreparationEvent[] own, double start)
    {
        var slices = SlicesPerRepetition(series);
        var period = series.Readout.RepetitionTime;
        foreach (var e in own)
        {
            if (!RecursPerSlice(e.Preparation))
                continue;
            for (var k = 1; k < slices; k++)
            {
                var shift = k * period / slices;
                var folded = e.Start + shift >= start + period ? shift - period : shift;
                yield return e with { Start = e.Start + folded, End = e.End + folded };
            }
        }
    }

    private static bool RecursPerSlice(Preparation preparation) => preparation is SpectralSaturation or SpectralInversion;

    private static PreparationEvent At(double start, double duration, Preparation preparation) => new(start, start + duration, preparation);

    private static PreparationEvent Centred(double centre, double duration, Preparation preparation) =>
        new(centre - duration / 2, centre + duration / 2, preparation);

    private static double Duration(RfPulse pulse) => pulse switch
    {
        HardPulse hard => hard.Duration,
        WindowedSincPulse sinc => sinc.Duration,
        GaussianPulse gaussian => gaussian.Duration,
        HyperbolicSecantPulse secant => secant.Duration,
        SampledPulse sampled => sampled.Duration,
        _ => 0,
    };

    private static string Name(Preparation preparation) => preparation switch
    {
        Inversion i => $"Inversion with InversionTime {i.InversionTime} ms",
        SpectralInversion i => $"Spectral inversion with InversionTime {i.InversionTime} ms",
        T2Preparation t => $"T2 preparation of {t.PreparationTime} ms",
        SpectralSaturation s => $"Spectral saturation with a delay of {s.Delay} ms",
        _ => preparation.GetType().Name,
    };
}
