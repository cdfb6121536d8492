using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Regression.Prediction;

/// <summary>What a technologist can reach within the allowed ranges, and what a trigger makes of the repetition time.</summary>
internal static class AllowedCorners
{
    private const int FullRanges = 5;

    /// <summary>Every combination of the ends of up to five ranges; beyond five, one range at a time and all together.</summary>
    internal static IEnumerable<(IReadOnlyDictionary<string, double> Settings, Series Series)> Of(Series series, IReadOnlyList<AllowedRange> ranges)
    {
        foreach (var corner in Corners([.. ranges.Where(r => SeriesParameters.Get(series, r.Parameter) is not null)]))
        {
            var set = corner.Aggregate(series, (s, setting) => SeriesParameters.With(s, setting.Key, setting.Value));
            yield return (corner, set);
        }
    }

    /// <summary>The document's ranges, and for a triggered series the repetition times that its rates lead to.</summary>
    internal static IReadOnlyList<AllowedRange> WithTrigger(IReadOnlyList<AllowedRange> ranges, Series series)
    {
        const string Pointer = "/readout/RepetitionTime";
        if (series.Timing.Trigger == SeriesTrigger.None)
            return ranges;
        var (shortest, longest) = RepetitionPeriod.Range(series);
        var set = ranges.FirstOrDefault(r => r.Parameter == Pointer);
        return
        [
            .. ranges.Where(r => r != set),
            new AllowedRange(Pointer, Math.Min(shortest, set?.Low ?? shortest), Math.Max(longest, set?.High ?? longest)),
        ];
    }

    private static IEnumerable<Dictionary<string, double>> Corners(AllowedRange[] ranges)
    {
        if (ranges.Length == 0)
            yield break;
        if (ranges.Length <= FullRanges)
        {
            for (var bits = 0; bits < 1 << ranges.Length; bits++)
                yield return ranges.Select((r, i) => (r.Parameter, (bits >> i & 1) == 0 ? r.Low : r.High)).ToDictionary(p => p.Parameter, p => p.Item2);
            yield break;
        }

        foreach (var range in ranges)
        {
            yield return new() { [range.Parameter] = range.Low };
            yield return new() { [range.Parameter] = range.High };
        }

        yield return ranges.ToDictionary(r => r.Parameter, r => r.Low);
        yield return ranges.ToDictionary(r => r.Parameter, r => r.High);
    }
}
