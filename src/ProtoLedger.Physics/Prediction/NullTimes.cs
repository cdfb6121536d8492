using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Physics.Prediction;

/// <summary>Inversion times at which the signed signal vanishes, by root finding on the engine itself.</summary>
public static class NullTimes
{
    private const int GridPoints = 64;

    /// <summary>Finds, lane by lane, the inversion time of one preparation that nulls the signal while everything else, the repetition time included, stays.</summary>
    /// <param name="series">The series.</param>
    /// <param name="preparation">Index of an <see cref="Inversion"/> or <see cref="SpectralInversion"/> among the preparations.</param>
    /// <param name="setting">Field strength and treatment of pulses.</param>
    /// <param name="lanes">The lanes.</param>
    /// <returns>
    /// ms, to 10⁻⁶ ms, one value a lane, in the document's meaning of that inversion time; of several the one nearest to the series' own;
    /// null where no time that fits nulls the lane.
    /// </returns>
    /// <exception cref="ArgumentException">The index does not name an inversion, or as <see cref="SignalPredictor.Predict"/>.</exception>
    public static double?[] Find(Series series, int preparation, PredictionSetting setting, LaneTable lanes)
    {
        ArgumentNullException.ThrowIfNull(series);
        ArgumentNullException.ThrowIfNull(lanes);
        if (preparation < 0 || preparation >= series.Preparations.Count || InversionTime(series.Preparations[preparation]) is not { } own)
            throw new ArgumentException($"preparations/{preparation}: no inversion stands there.", nameof(preparation));

        // The series itself must be predictable, so that a wrong tissue is refused here and not taken for a time that does not fit.
        SignalPredictor.Predict(series, setting, lanes);
        var grid = Enumerable.Range(1, GridPoints)
            .Select(i => series.Readout.RepetitionTime * i / GridPoints)
            .Append(own)
            .Order()
            .Where(time => Fits(At(series, preparation, time)))
            .Select(time => (Time: time, SignalPredictor.Predict(At(series, preparation, time), setting, lanes).Signed))
            .ToArray();

        var result = new double?[lanes.Count];
        for (var lane = 0; lane < lanes.Count; lane++)
        {
            var one = lanes.Select([lane]);
            double Signal(double time) => SignalPredictor.Predict(At(series, preparation, time), setting, one).Signed[0];
            for (var i = 0; i + 1 < grid.Length; i++)
            {
                var (left, right) = (grid[i].Signed[lane], grid[i + 1].Signed[lane]);
                if (left == 0 ? i > 0 : left > 0 == right > 0)
                    continue;
                var root = Roots.Find(Signal, grid[i].Time, left, grid[i + 1].Time, right);
                if (result[lane] is not { } other || Math.Abs(root - own) < Math.Abs(other - own))
                    result[lane] = root;
            }
        }

        return result;
    }

    /// <summary>Finds the pair of inversion times of a double inversion that nulls two tissues at once.</summary>
    /// <param name="series">A series with exactly two inversions.</param>
    /// <param name="setting">Field strength and treatment of pulses.</param>
    /// <param name="lanes">Two lanes, one for each tissue.</param>
    /// <returns>Intervals first to second inversion and second inversion to excitation, ms; null where there is no such pair.</returns>
    /// <exception cref="ArgumentException">Not two inversions or not two lanes, or as <see cref="SignalPredictor.Predict"/>.</exception>
    /// <remarks>For each second interval the first one that nulls the lane of longer T1 is found; among them the other lane's null is looked for.</remarks>
    public static NullPair? FindPair(Series series, PredictionSetting setting, LaneTable lanes)
    {
        ArgumentNullException.ThrowIfNull(series);
        ArgumentNullException.ThrowIfNull(lanes);
        if (series.Preparations is not [Inversion first, Inversion second])
            throw new ArgumentException("preparations: a pair of inversion times needs exactly two inversions.", nameof(series));
        if (lanes.Count != 2)
            throw new ArgumentException($"lanes: a pair of nulls needs two lanes, not {lanes.Count}.", nameof(lanes));

        var (longer, shorter) = lanes.T1[0] >= lanes.T1[1] ? (lanes.Select([0]), lanes.Select([1])) : (lanes.Select([1]), lanes.Select([0]));
        var period = series.Readout.RepetitionTime;
        Series With(double firstToSecond, double secondToExcitation) => series with
        {
            Preparations =
            [
                first with { InversionTime = firstToSecond + secondToExcitation, End = InversionTimeEnd.Excitation },
                second with { InversionTime = secondToExcitation, End = InversionTimeEnd.Excitation },
            ],
        };
        double Signal(LaneTable lane, double a, double b) => SignalPredictor.Predict(With(a, b), setting, lane).Signed[0];
        double? FirstInterval(double b) => Bracketed(a => Fits(With(a, b)) ? Signal(longer, a, b) : null, b, period);
        double? Rest(double b) => FirstInterval(b) is { } a ? Signal(shorter, a, b) : null;

        return Bracketed(Rest, 0, period / 2) is { } found && FirstInterval(found) is { } interval ? new NullPair(interval, found) : null;
    }

    /// <summary>First root between two bounds of a function that may be undefined in parts.</summary>
    private static double? Bracketed(Func<double, double?> function, double low, double high)
    {
        double? before = null;
        var beforeAt = low;
        for (var i = 1; i <= GridPoints; i++)
        {
            var at = low + (high - low) * i / GridPoints;
            var value = function(at);
            if (before is { } left && value is { } right && left > 0 != right > 0)
                return Roots.Find(x => function(x) ?? throw new InvalidOperationException("The signal is not defined between two times at which it is."), beforeAt, left, at, right);
            (before, beforeAt) = (value, at);
        }

        return null;
    }

    private static double? InversionTime(Preparation preparation) => preparation switch
    {
        Inversion inversion => inversion.InversionTime,
        SpectralInversion inversion => inversion.InversionTime,
        _ => null,
    };

    private static Series At(Series series, int preparation, double time)
    {
        var preparations = series.Preparations.ToArray();
        preparations[preparation] = preparations[preparation] switch
        {
            Inversion inversion => inversion with { InversionTime = time },
            SpectralInversion inversion => inversion with { InversionTime = time },
            var other => other,
        };
        return series with { Preparations = preparations };
    }

    private static bool Fits(Series series)
    {
        try
        {
            SeriesCompiler.Compile(series);
            return true;
        }
        catch (ArgumentException)
        {
            return false;
        }
    }
}

/// <summary>Two intervals that null two tissues.</summary>
/// <param name="FirstToSecond">First to second inversion centre, ms.</param>
/// <param name="SecondToExcitation">Second inversion centre to excitation centre, ms.</param>
public sealed record NullPair(double FirstToSecond, double SecondToExcitation);
