using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports.Model;

namespace ProtoLedger.Application.Reporting;

/// <summary>Observables over off-resonance and B1+ scale.</summary>
internal sealed partial class ReportAssembly
{
    private const int MapColumns = 13;
    private const int MapRows = 7;
    private const int MostMaps = 3;

    /// <summary>Maps of the written expectations on tissues that moved, on the scanner where the edit does worst, over all named conditions.</summary>
    private IEnumerable<FieldMap> MapsOf(AssessedProtocol one)
    {
        if (one.Assessment.Scanners.Count == 0)
            yield break;
        var part = one.Assessment.Scanners[0];
        var edit = Edit(one, part.ScannerId);
        var moved = part.Difference.Moved.Select(change => change.Observable).ToHashSet();
        var outcomes = part.After.Expectations
            .Where(outcome => outcome.Expectation.Observable.Tissue is not null && outcome.Worst is not null && moved.Contains(outcome.Observable))
            .DistinctBy(outcome => (outcome.Expectation.Series, outcome.Expectation.Observable))
            .Take(MostMaps);
        var (offResonance, b1Scale) = FieldSweep.Ranges(edit.After);
        var (columns, rows) = (Steps(offResonance, MapColumns), Steps(b1Scale, MapRows));
        foreach (var outcome in outcomes)
        {
            if (FieldSweep.Map(evaluation, edit.After, outcome.Observable, columns, rows) is not { } after)
                continue;
            var expectation = outcome.Expectation;
            yield return new FieldMap(
                part.ScannerId, Title(one, expectation.Series), expectation.Observable.Name,
                Words(one, expectation.Observable.Tissue), Words(one, expectation.Observable.Reference), Unit(expectation.Observable.Name),
                columns, rows, FieldSweep.Map(evaluation, edit.Before, outcome.Observable, columns, rows) ?? [], after,
                expectation.Basis == ExpectationBasis.Absolute ? expectation.Limit : null, expectation.Relation == LimitRelation.AtMost);
        }
    }

    /// <summary>Relative change of a tissue's signal per relative change of the B1+ scale, around 1.</summary>
    private double B1Slope(EvaluationInput input, ObservableKey key)
    {
        const double step = 0.05;
        return FieldSweep.Values(evaluation, input, key, [new FieldPoint(1 - step), new FieldPoint(), new FieldPoint(1 + step)]) is [var low, var at and not 0, var high]
            ? Math.Clamp((high - low) / (2 * step * at), -3, 3)
            : 0;
    }

    /// <summary>The signed signal at the far end of the off-resonance that the conditions name.</summary>
    private double? OffResonant(EvaluationInput input, ObservableKey key)
    {
        var (range, _) = FieldSweep.Ranges(input);
        var far = Math.Abs(range.Low) > Math.Abs(range.High) ? range.Low : range.High;
        return FieldSweep.Values(evaluation, input, key, [new FieldPoint(1, far)]) is [var value] ? value : null;
    }

    private static double[] Steps(ValueRange range, int count) =>
        range.High > range.Low ? [.. Enumerable.Range(0, count).Select(i => Math.Round(range.Low + (range.High - range.Low) * i / (count - 1), 6))] : [range.Low];
}
