using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Regression.Prediction;

/// <summary>Null time, its distance from the inversion time that is set, and the window in which a tissue stays dark.</summary>
internal static class NullObservables
{
    /// <summary>Residual over reference below which a tissue counts as dark, for the window.</summary>
    internal const double DarkRatio = 0.25;

    private const int WindowSteps = 96;

    /// <summary>Index of the last inversion of a series, or −1: it is the one whose time nulls.</summary>
    internal static int LastInversion(Series series)
    {
        for (var i = series.Preparations.Count - 1; i >= 0; i--)
        {
            if (series.Preparations[i] is Inversion or SpectralInversion)
                return i;
        }

        return -1;
    }

    internal static double InversionTime(Series series, int index) => series.Preparations[index] switch
    {
        Inversion inversion => inversion.InversionTime,
        SpectralInversion inversion => inversion.InversionTime,
        var other => throw new ArgumentException($"A {other.GetType().Name} has no inversion time."),
    };

    internal static Series WithInversionTime(Series series, int index, double time) => series with
    {
        Preparations =
        [
            .. series.Preparations.Select((preparation, i) => i != index ? preparation : preparation switch
            {
                Inversion inversion => inversion with { InversionTime = time },
                SpectralInversion inversion => inversion with { InversionTime = time },
                _ => preparation,
            }),
        ],
    };

    /// <summary>nullTime, ms, or nullDistance, ms: positive where the set time is too long.</summary>
    internal static ObservableValues Times(SignalCells cells, ObservableRequest request)
    {
        var context = cells.Context;
        var index = LastInversion(context.Acquisition);
        if (index < 0)
            return ObservableValues.Missing("The series has no inversion.");
        var found = NullTimes.Find(context.Acquisition, index, context.Setting, cells.Lanes(request.Tissue!, request.Point));
        if (found.Any(time => time is null))
            return ObservableValues.Missing($"No inversion time that fits nulls {request.Tissue} for every draw.");
        var set = InversionTime(context.Acquisition, index);
        return ObservableValues.Of(Array.ConvertAll(found, time => request.Name == "nullTime" ? time!.Value : set - time!.Value));
    }

    /// <summary>Width, ms, of the connected window of inversion times around the null in which |tissue| / |reference| stays below <see cref="DarkRatio"/>.</summary>
    /// <remarks>On a grid of 96 steps from half to one and a half times the null time of the means, ends by linear interpolation.</remarks>
    internal static ObservableValues Window(SignalCells cells, ObservableRequest request)
    {
        var context = cells.Context;
        var index = LastInversion(context.Acquisition);
        if (index < 0)
            return ObservableValues.Missing("The series has no inversion.");
        var (tissue, reference) = (cells.Lanes(request.Tissue!, request.Point), cells.Lanes(request.Reference!, request.Point));
        var nulls = NullTimes.Find(context.Acquisition, index, context.Setting, tissue);
        if (nulls.Any(time => time is null))
            return ObservableValues.Missing($"No inversion time that fits nulls {request.Tissue} for every draw.");
        var (low, high) = (0.6 * nulls.Min()!.Value, 1.4 * nulls.Max()!.Value);
        var ratios = new List<(double Time, double[] Ratio)>();
        for (var step = 0; step <= WindowSteps; step++)
        {
            var time = low + (high - low) * step / WindowSteps;
            try
            {
                var series = WithInversionTime(context.Acquisition, index, time);
                var (a, b) = (SignalPredictor.Predict(series, context.Setting, tissue), SignalPredictor.Predict(series, context.Setting, reference));
                ratios.Add((time, [.. a.Magnitude.Zip(b.Magnitude, (x, y) => x / y)]));
            }
            catch (ArgumentException)
            {
                // This inversion time no longer leaves room for the readout: the window ends before it.
                break;
            }
        }

        return ObservableValues.Of([.. nulls.Select((time, draw) => Width(ratios, draw, time!.Value))]);
    }

    private static double Width(List<(double Time, double[] Ratio)> ratios, int draw, double nullTime)
    {
        var start = ratios.FindLastIndex(r => r.Time <= nullTime);
        double End(int from, int step)
        {
            for (var i = from; i >= 0 && i < ratios.Count; i += step)
            {
                if (ratios[i].Ratio[draw] <= DarkRatio)
                    continue;
                // The side towards the null is below the limit; at the null itself the ratio is 0.
                var inner = i - step;
                var (t, r) = inner >= 0 && inner < ratios.Count && (step > 0 ? inner > start : inner <= start)
                    ? (ratios[inner].Time, ratios[inner].Ratio[draw])
                    : (nullTime, 0);
                return t + (ratios[i].Time - t) * (DarkRatio - r) / (ratios[i].Ratio[draw] - r);
            }

            return step < 0 ? ratios[0].Time : ratios[^1].Time;
        }

        return End(start + 1, 1) - End(start, -1);
    }
}
