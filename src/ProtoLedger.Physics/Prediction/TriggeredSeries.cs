using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;

namespace ProtoLedger.Physics.Prediction;

/// <summary>What a trigger makes of a series.</summary>
public static class TriggeredSeries
{
    /// <summary>The series at its shortest and at its longest repetition time over its range of rates.</summary>
    /// <param name="series">The series.</param>
    /// <returns>Two series that differ in repetition time only; the series alone where nothing triggers it or both are the same.</returns>
    /// <remarks>The repetition times are those of <see cref="RepetitionPeriod.Range"/>; signals between the two ends lie between theirs for one inversion or none.</remarks>
    public static IReadOnlyList<Series> OverRates(Series series)
    {
        ArgumentNullException.ThrowIfNull(series);
        var (shortest, longest) = RepetitionPeriod.Range(series);
        return shortest == longest ? [At(series, shortest)] : [At(series, shortest), At(series, longest)];
    }

    private static Series At(Series series, double repetition) => series with { Readout = series.Readout with { RepetitionTime = repetition } };
}
