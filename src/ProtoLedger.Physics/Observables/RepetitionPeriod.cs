using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Observables;

/// <summary>Repetition times that a triggered series really has.</summary>
public static class RepetitionPeriod
{
    /// <summary>Shortest and longest period over the rates of the series, ms; both the set repetition time where nothing triggers.</summary>
    /// <param name="series">The series.</param>
    /// <remarks>
    /// Cardiac: the set time is rounded up to whole beats of 60000/rate. Respiratory: one breath, or as many as the set time needs.
    /// Between two rates the number of beats changes, so the shortest period is looked for in the whole range.
    /// </remarks>
    public static (double Shortest, double Longest) Range(Series series)
    {
        ArgumentNullException.ThrowIfNull(series);
        var set = series.Readout.RepetitionTime;
        var rate = series.Timing.HeartRate;
        if (series.Timing.Trigger == SeriesTrigger.None || !(rate.High > 0) || !(rate.Low > 0))
            return (set, set);
        var (slow, fast) = (60_000 / rate.Low, 60_000 / rate.High);
        var (fewest, most) = (Math.Ceiling(set / slow), Math.Ceiling(set / fast));
        double shortest = double.PositiveInfinity, longest = 0;
        for (var beats = fewest; beats <= most; beats++)
        {
            // Beats for which this number is the first that reaches the set time.
            var low = Math.Max(fast, set / beats);
            var high = beats == 1 ? slow : Math.Min(slow, set / (beats - 1));
            shortest = Math.Min(shortest, beats * low);
            longest = Math.Max(longest, beats * high);
        }

        return (shortest, longest);
    }
}
