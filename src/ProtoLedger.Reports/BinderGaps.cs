using ProtoLedger.Reports.Model.Binders;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports;

/// <summary>Finds what a binder cannot say, so that it is said.</summary>
public static class BinderGaps
{
    /// <summary>Times without a record, in words: before the first record, between intervals, after a version ended without a successor; then the gaps that were stated.</summary>
    public static IReadOnlyList<string> Of(Binder binder)
    {
        ArgumentNullException.ThrowIfNull(binder);
        var id = binder.Identity;
        var gaps = new List<string>();
        if (id.FirstRecordAt is not { } first)
            gaps.Add("The ledger is empty: nothing was recorded.");
        else if (first > id.From)
            gaps.Add($"Recording began on {Numbers.Date(first)}. What is shown before that was stated later and not signed at its time.");
        if (binder.Effective.Count == 0)
            gaps.Add("No version is recorded as effective.");
        foreach (var place in BinderTimeline.Places(binder))
            gaps.AddRange(Of(place, id));
        gaps.AddRange(binder.Gaps);
        return gaps;
    }

    private static IEnumerable<string> Of(IGrouping<(string Protocol, string Scanner), EffectiveLine> place, BinderIdentity id)
    {
        var where = BinderTimeline.Label(place.First());
        var lines = place.OrderBy(e => e.From).ToList();
        if (lines[0].From > id.From)
            yield return $"{where}: no record before {Numbers.Date(lines[0].From)}.";
        for (var i = 0; i < lines.Count; i++)
        {
            if (lines[i].Until is not { } end || end >= id.Until)
                continue;
            if (i + 1 == lines.Count)
                yield return $"{where}: no record after {Numbers.Date(end)}.";
            else if (lines[i + 1].From > end)
                yield return $"{where}: no record from {Numbers.Date(end)} to {Numbers.Date(lines[i + 1].From)}.";
        }
    }
}
