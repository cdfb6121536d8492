using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Regression.Repair;
using ProtoLedger.Reports.Model;

namespace ProtoLedger.Application.Reporting;

/// <summary>Findings, balance, changes, effects, attribution, verdicts and repairs.</summary>
internal sealed partial class ReportAssembly
{
    private IEnumerable<ReportFinding> FindingsOf(AssessedProtocol one) =>
        one.Assessment.Scanners.SelectMany(part => part.Findings).Select(finding => new ReportFinding(
            finding.ScannerId, finding.SeriesId, Title(one, finding.SeriesId), finding.Sentence, finding.Severity, finding.Observable?.Observable,
            finding.Subject, finding.Reference, finding.Direction, finding.Before, finding.After, finding.Unit,
            [.. finding.Causes.Select(cause => CauseOf(cause, finding.Change))], finding.Share, finding.Condition, finding.Transition,
            finding.ExpectationTitle, finding.Limit, finding.ProbabilityHolds, finding.ReferenceMoved));

    private static Cause CauseOf(AttributionShare share, double change) => new(
        Name(share),
        string.Join(", ", share.Changes.Select(changed => WithUnit(changed.Change.Old, changed.Change))),
        string.Join(", ", share.Changes.Select(changed => WithUnit(changed.Change.New, changed.Change))),
        double.IsFinite(change) && change != 0 ? share.Share / change : 0);

    private static string Name(AttributionShare share) =>
        string.Join(" with ", share.Changes.Select(changed => changed.Change.Keyword ?? changed.Change.Label).Distinct());

    private static string WithUnit(System.Text.Json.Nodes.JsonNode? value, ParameterChange change) =>
        value is null ? "" : change.Unit is { Length: > 0 } unit ? $"{PlainWords.Setting(value)} {unit}" : PlainWords.Setting(value);

    private IEnumerable<BalanceItem> BalanceOf(AssessedProtocol one) =>
        one.Assessment.Scanners
            .SelectMany(part => part.Balance.Select(line => (part.ScannerId, Line: line)))
            .GroupBy(pair => pair.Line)
            .Select(group => new BalanceItem(
                group.Key.Direction, group.Key.What, Title(one, group.Key.SeriesId),
                group.Count() == one.Assessment.Scanners.Count ? [] : [.. group.Select(pair => pair.ScannerId)],
                group.Key.Before, group.Key.After, group.Key.Unit, group.Key.Note));

    /// <summary>Every difference between base and proposal, predicted or not.</summary>
    private IReadOnlyList<ReportChange> Changes()
    {
        if (material.Base is not { } stood)
            return [];
        var scanners = assessed.SelectMany(one => one.Edit.Scanners).Select(edit => edit.After.Scanner.Document).DistinctBy(scanner => scanner.Id).ToList();
        return [.. DocumentDifference.Between(stood.Bytes, material.Request.Bytes).Changes.Select(change => new ReportChange(
            change.SeriesTitle, change.Pointer, change.Keyword ?? change.Label, Meaning(change),
            change.Old is null ? null : PlainWords.Setting(change.Old), change.New is null ? null : PlainWords.Setting(change.New), change.Unit ?? "",
            [.. scanners.Select(scanner => Wording(scanner, change))]))];
    }

    private string? Meaning(ParameterChange change) =>
        (material.Document as ProtocolDocument)?.Series.FirstOrDefault(series => series.Id == change.SeriesId)?.Meanings.GetValueOrDefault(change.Name);

    private static ConsoleWording Wording(ScannerDocument scanner, ParameterChange change) =>
        Parameters.ConsoleWording(scanner, change.Name) is { } word
            ? new ConsoleWording(scanner.Id, word.Word, word.Meaning)
            : new ConsoleWording(scanner.Id, change.Keyword ?? change.Label, null);

    /// <summary>Numbers at the nominal field that moved.</summary>
    private IEnumerable<PredictedEffect> EffectsOf(AssessedProtocol one)
    {
        foreach (var part in one.Assessment.Scanners)
        {
            var edit = Edit(one, part.ScannerId);
            foreach (var key in part.Difference.Moved.Select(moved => moved.Observable).Where(key => key.Condition == ObservableKey.NominalCondition))
            {
                var (before, after) = (Value(part.Before, key), Value(part.After, key));
                if (before is null && after is null)
                    continue;
                var finding = part.Findings.FirstOrDefault(found => found.Observable == key);
                var rises = after?.Nominal > before?.Nominal;
                double? share = part.Shares.TryGetValue(key, out var rising) ? (rises ? rising : 1 - rising) : null;
                yield return new PredictedEffect(
                    part.ScannerId, Title(one, key.Series), key.Observable, Words(one, key.Tissue), Words(one, key.Reference),
                    Condition(edit, key.Condition), Unit(key.Observable), before, after, finding?.Direction ?? FindingDirection.Different, share);
            }
        }
    }

    private static PredictedValue? Value(EvaluationResult result, ObservableKey key) =>
        result.IndexOf(key) is >= 0 and var i && double.IsFinite(result.Nominal[i]) && double.IsFinite(result.Low[i]) && double.IsFinite(result.High[i])
            ? new PredictedValue(result.Nominal[i], result.Low[i], result.High[i])
            : null;

    private IEnumerable<AttributionTable> AttributionsOf(AssessedProtocol one) =>
        one.Assessment.Scanners.SelectMany(part => part.Attributions
            .Where(table => double.IsFinite(table.OldSigned) && double.IsFinite(table.NewSigned) && table.Shares.All(share => double.IsFinite(share.Share)))
            .Select(table => new AttributionTable(
                part.ScannerId, Title(one, table.Observable.Series), table.Observable.Observable, Words(one, table.Observable.Tissue),
                Words(one, table.Observable.Reference), table.Lane, Unit(table.Observable.Observable), table.OldSigned, table.NewSigned,
                table.OldMagnitude, table.NewMagnitude,
                [.. table.Shares.Select(share => new Contribution(Name(share), string.Join(", ", share.Changes.Select(changed => PlainWords.Change(changed.Change))), share.Share, share.StandardError))],
                table.Orders == 0)));

    private IEnumerable<VerdictLine> VerdictsOf(AssessedProtocol one)
    {
        foreach (var part in one.Assessment.Scanners)
        {
            var edit = Edit(one, part.ScannerId);
            foreach (var outcome in part.After.Expectations)
            {
                var expectation = outcome.Expectation;
                var earlier = part.Before.Expectations.FirstOrDefault(candidate => candidate.Expectation.Id == expectation.Id);
                yield return new VerdictLine(
                    expectation.Id, expectation.Title, expectation.Why, part.ScannerId, Title(one, expectation.Series),
                    string.Join(", ", expectation.Conditions.Select(name => Condition(edit, name))),
                    expectation.Basis == ExpectationBasis.Paired, expectation.Relation == LimitRelation.AtMost, expectation.Limit,
                    expectation.Basis == ExpectationBasis.Paired ? "" : Unit(expectation.Observable.Name),
                    State(earlier), State(outcome),
                    part.Difference.Transitions.FirstOrDefault(change => change.ExpectationId == expectation.Id)?.Transition ?? Transition.NotComparable);
            }
        }
    }

    private static VerdictState? State(ExpectationOutcome? outcome) => outcome is null
        ? null
        : new VerdictState(outcome.Verdict, outcome.NominalVerdict == Verdict.Holds, Finite(outcome.Probability), Finite(outcome.Nominal));

    /// <summary>Offers for expectations that the edit of a protocol breaks, on the scanner where they do worst.</summary>
    private IEnumerable<ReportRepair> RepairsOf(AssessedProtocol one)
    {
        if (material.Document is not ProtocolDocument)
            yield break;
        var broken = one.Assessment.Scanners
            .SelectMany(part => part.Difference.Transitions
                .Where(change => change.Transition == Transition.NewlyFails)
                .Select(change => (part, change.ExpectationId, Probability: change.New?.Probability ?? 0)))
            .GroupBy(entry => entry.ExpectationId)
            .Select(group => group.MinBy(entry => entry.Probability));
        foreach (var (part, id, _) in broken)
        {
            var edit = Edit(one, part.ScannerId);
            foreach (var offer in RepairSearch.Offers(evaluation, edit.After, edit.Before, id))
                yield return Repair(one, part, offer);
        }
    }

    private ReportRepair Repair(AssessedProtocol one, ScannerAssessment part, RepairOffer offer)
    {
        var costs = offer.Cost.Moved
            .Where(moved => moved.Observable.Condition == ObservableKey.NominalCondition && double.IsFinite(moved.NewNominal))
            .Select(moved => (moved.Observable, Before: At(part.Before, moved.Observable), After: moved.NewNominal))
            .Where(cost => cost.Before is { } before && RunDifference.HasMoved(before, cost.After))
            .OrderByDescending(cost => Math.Abs(cost.After - cost.Before!.Value) / (Math.Abs(cost.Before.Value) + Math.Abs(cost.After) + 1e-12))
            .Take(12);
        return new ReportRepair(
            offer.Outcome.Expectation.Title, part.ScannerId, Title(one, offer.Series),
            [.. offer.Settings.Select(setting => new RepairChange(
                setting.Pointer.Split('/')[^1], setting.Old, setting.New, RepairUnit(setting.Pointer)))],
            Finite(offer.Outcome.Probability) ?? 0,
            [.. costs.Select(cost => new RepairCost(
                cost.Observable.Observable, Words(one, cost.Observable.Tissue), Words(one, cost.Observable.Reference), cost.Before!.Value, cost.After,
                Unit(cost.Observable.Observable), FindingDirection.Different))]);
    }

    private string RepairUnit(string pointer)
    {
        var index = ((ProtocolDocument)material.Document).Series.Count > 0 ? "/series/0" + pointer : pointer;
        return Parameters.Describe(DocumentKind.Protocol, index)?.Unit ?? "";
    }
}
