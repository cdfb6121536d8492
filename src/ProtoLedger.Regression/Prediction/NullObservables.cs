using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Regression.Prediction;

/// <summary>Null time, its distance from the inversion time that is set, and the window in which a tissue stays dark.</summary>
internal static class NullObservables
{
    /// <summary>Residual over reference below which a tissue counts as dark, for the window.</summary>
    internal const double DarkRatio = 0.25;

    private const int WindowSteps = 96;

    private const int Nodes = 7;

    /// <summary>Up to so many lanes the root finder itself is quick enough.</summary>
    private const int Few = 8;

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

    /// <summary>Null time, ms.</summary>
    internal static ObservableValues Times(SignalCells cells, ObservableRequest request)
    {
        var context = cells.Context;
        var index = LastInversion(context.Acquisition);
        if (index < 0)
            return ObservableValues.Missing("The series has no inversion.");
        var found = Find(context, index, cells.Lanes(request.Tissue!, request.Point));
        if (found.Any(double.IsNaN))
            return ObservableValues.Missing($"No inversion time that fits nulls {request.Tissue} for every draw.");
        return ObservableValues.Of(found);
    }

    /// <summary>Null time of every lane, ms, NaN where there is none; the first lane by the engine's root finder, many lanes by interpolation on the engine's signals.</summary>
    /// <remarks>
    /// The signal after an inversion is nearly linear in u = exp(−TI/T1), so three nodes around the sign change give u at zero by Lagrange's inverse
    /// interpolation to far below a millisecond, also somewhat beyond the nodes. Lanes without a null there go to the root finder.
    /// </remarks>
    internal static double[] Find(SeriesContext context, int index, LaneTable lanes)
    {
        var nulls = new double[lanes.Count];
        Array.Fill(nulls, double.NaN);
        if (lanes.Count > Few && Exact(context, index, lanes, [0])[0] is var first && double.IsFinite(first))
        {
            Interpolate(context, index, lanes, first, nulls);
            nulls[0] = first;
        }

        int[] open = [.. Enumerable.Range(0, lanes.Count).Where(i => double.IsNaN(nulls[i]))];
        var exact = Exact(context, index, lanes, open);
        for (var i = 0; i < open.Length; i++)
            nulls[open[i]] = exact[i];
        return nulls;
    }

    private static double[] Exact(SeriesContext context, int index, LaneTable lanes, int[] which) => which.Length == 0
        ? []
        : Array.ConvertAll(NullTimes.Find(context.Acquisition, index, context.Setting, lanes.Select(which)), time => time ?? double.NaN);

    private static void Interpolate(SeriesContext context, int index, LaneTable lanes, double around, double[] nulls)
    {
        var nodes = new List<(double Time, double[] Signed)>();
        for (var node = 0; node <= Nodes; node++)
        {
            var time = around * (0.55 + 0.9 * node / Nodes);
            try
            {
                nodes.Add((time, SignalPredictor.Predict(WithInversionTime(context.Acquisition, index, time), context.Setting, lanes).Signed));
            }
            catch (ArgumentException)
            {
                // This inversion time leaves no room for the pulses or the readout.
                continue;
            }
        }

        for (var lane = 0; lane < nulls.Length && nodes.Count >= 3; lane++)
        {
            // The nearest three nodes to the sign change; beyond the ends the near-linear curve is continued.
            var above = 0;
            while (above < nodes.Count && nodes[above].Signed[lane] < 0)
                above++;
            var nearer = above > 0 && above < nodes.Count && -nodes[above - 1].Signed[lane] < nodes[above].Signed[lane] ? above - 1 : above;
            var time = AtZero(nodes, Math.Clamp(nearer, 1, nodes.Count - 2), lane, lanes.T1[lane]);
            if (time > 0.3 * around && time < 2.5 * around)
                nulls[lane] = time;
        }
    }

    private static double AtZero(List<(double Time, double[] Signed)> nodes, int middle, int lane, double t1)
    {
        var u = 0.0;
        for (var i = middle - 1; i <= middle + 1; i++)
        {
            var weight = Math.Exp(-nodes[i].Time / t1);
            for (var j = middle - 1; j <= middle + 1; j++)
            {
                if (j != i)
                    weight *= nodes[j].Signed[lane] / (nodes[j].Signed[lane] - nodes[i].Signed[lane]);
            }

            u += weight;
        }

        return -t1 * Math.Log(u);
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
        var nulls = Find(context, index, tissue);
        if (nulls.Any(double.IsNaN))
            return ObservableValues.Missing($"No inversion time that fits nulls {request.Tissue} for every draw.");
        var (low, high) = (0.6 * nulls.Min(), 1.4 * nulls.Max());
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

        return ObservableValues.Of([.. nulls.Select((time, draw) => Width(ratios, draw, time))]);
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
