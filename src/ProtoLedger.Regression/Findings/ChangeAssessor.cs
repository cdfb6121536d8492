using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Findings;

/// <summary>Assesses an edit on every scanner that runs the protocol.</summary>
public static class ChangeAssessor
{
    private const int MostHeadlines = 12;

    /// <summary>Predicts before and after on every scanner, attributes what moved, and says it in plain words.</summary>
    /// <param name="evaluation">The run's evaluation.</param>
    /// <param name="scanners">The edit on each scanner, at least one.</param>
    public static ChangeAssessment Assess(VersionEvaluation evaluation, IReadOnlyList<EditOnScanner> scanners)
    {
        ArgumentNullException.ThrowIfNull(evaluation);
        ArgumentNullException.ThrowIfNull(scanners);
        var assessed = scanners.Select(edit => Assess(evaluation, edit)).OrderByDescending(s => s.Severity).ThenBy(s => s.ScannerId, StringComparer.Ordinal).ToArray();
        var changes = scanners.SelectMany(edit => new EditedInput(edit.Before, edit.After, evaluation.Mixtures).Changes).DistinctBy(c => (c.Document, c.DocumentId, c.Change.Pointer, c.Change.Kind)).ToArray();
        var headlines = assessed
            .SelectMany(s => s.Findings)
            .GroupBy(f => (f.SeriesId, f.Observable?.Observable, f.Subject, f.Reference, f.ExpectationId, f.Direction))
            .Select(group => group.MaxBy(f => Math.Abs(f.Severity))!)
            .OrderByDescending(f => f.Severity)
            .Take(MostHeadlines)
            .ToArray();
        var document = scanners[0].After.Protocol.Document;
        return new(changes, headlines, assessed, Omissions.For(changes, document), NextSteps.For(assessed, changes, document));
    }

    private static ScannerAssessment Assess(VersionEvaluation evaluation, EditOnScanner edit)
    {
        // Before the edit nothing has changed yet: a paired expectation compares that state with itself.
        var old = evaluation.Evaluate(edit.Before, edit.Before);
        var now = evaluation.Evaluate(edit.After, edit.Before);
        var difference = RunDifference.Between(old, now);
        var attributions = ChangeAttribution.Attribute(evaluation, edit.Before, edit.After, old, now);
        var shares = PairedShares.Of(evaluation, edit.Before, edit.After, difference);
        var evidence = new ScannerEvidence(edit, old, now, difference, attributions, shares);
        var findings = new List<Finding>();
        var balance = new List<BalanceLine>();
        var moved = difference.Moved.Select(m => m.Observable.Series).ToHashSet();
        foreach (var series in edit.After.Protocol.Document.Series.Where(s => moved.Contains(s.Id) && edit.Before.Protocol.Document.Series.Any(o => o.Id == s.Id)))
        {
            var (told, pairs) = ExpectationFindings.Of(evidence, series);
            findings.AddRange(told);
            findings.AddRange(PairFindings.Of(evidence, series, pairs));
            findings.AddRange(CostFindings.Findings(evidence, series));
            balance.AddRange(CostFindings.Balance(evidence, series));
            findings.AddRange(InversionReach.Findings(evidence, series));
            balance.AddRange(InversionReach.Balance(evidence, series));
        }

        findings.AddRange(SeriesFindings.Of(evidence));
        findings.Sort((a, b) => b.Severity.CompareTo(a.Severity));
        return new(
            edit.After.Scanner.Document.Id, Math.Max(0, findings.Count == 0 ? 0 : findings[0].Severity), old, now, difference, attributions, shares, findings, balance);
    }
}
