using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Findings;

/// <summary>Series that come or go, and numbers that can no longer be predicted.</summary>
internal static class SeriesFindings
{
    internal static IEnumerable<Finding> Of(ScannerEvidence evidence)
    {
        var (before, after) = (evidence.Edit.Before.Protocol.Document.Series, evidence.Edit.After.Protocol.Document.Series);
        foreach (var series in after.Where(s => before.All(o => o.Id != s.Id)))
            yield return Make(evidence, series, FindingDirection.Different, 10, $"the series \"{series.Title}\" is new");
        foreach (var series in before.Where(s => after.All(n => n.Id != s.Id)))
            yield return Make(evidence, series, FindingDirection.Worse, 45, $"the series \"{series.Title}\" is gone, and with it what its expectations watch");
        foreach (var series in after)
        {
            var lost = evidence.Now.NotPredictable.Where(m => m.Observable.Series == series.Id && evidence.Old.IndexOf(m.Observable) is >= 0 and var i && double.IsFinite(evidence.Old.Nominal[i])).ToArray();
            if (lost.Length > 0)
                yield return Make(evidence, series, FindingDirection.Worse, 65, $"{(lost.Length == 1 ? "a number" : "numbers")} could be predicted before and cannot any more: {lost[0].Because.TrimEnd('.')}");
        }
    }

    private static Finding Make(ScannerEvidence evidence, ProtocolSeries series, FindingDirection direction, double severity, string sentence) => new(
        FindingKind.Series, direction, severity, evidence.ScannerId, series.Id, series.Title, sentence,
        null, null, null, null, null, "", [], double.NaN, null, "", null, null, null, null, null, false);
}
