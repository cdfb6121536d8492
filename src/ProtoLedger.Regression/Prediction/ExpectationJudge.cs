using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Sampling;

namespace ProtoLedger.Regression.Prediction;

/// <summary>Judges one expectation over its conditions and the draws.</summary>
internal sealed class ExpectationJudge
{
    private readonly Expectation expectation;
    private readonly List<(string Condition, IReadOnlyList<FieldPoint> Points)> conditions = [];
    private readonly string? because;

    internal ExpectationJudge(Expectation expectation, SeriesContext context)
    {
        this.expectation = expectation;
        foreach (var name in expectation.Conditions)
        {
            if (name == ObservableKey.NominalCondition)
                conditions.Add((name, [ConditionPoints.Nominal]));
            else if (context.Conditions.Conditions.FirstOrDefault(c => c.Name == name) is { } condition)
                conditions.Add((name, ConditionPoints.Of(condition, context.FieldStrength)));
            else
                because = $"The conditions document {context.Conditions.Id} has no condition \"{name}\".";
        }
    }

    /// <summary>Whether new is compared with old: the paired kind, and numbers that are only known relative to another state.</summary>
    internal static bool IsPaired(Expectation expectation) =>
        expectation.Basis == ExpectationBasis.Paired || expectation.Observable.Name is "relativeNoise" or "relativeRfPower";

    internal bool Paired => IsPaired(expectation);

    internal Expectation Expectation => expectation;

    private bool AtMost => expectation.Relation == LimitRelation.AtMost;

    internal IEnumerable<ObservableRequest> Requests() =>
        from condition in conditions from point in condition.Points select Request(point);

    /// <summary>The observables over each condition that the result stores.</summary>
    internal IEnumerable<(ObservableKey Key, ObservableValues Values)> Observables(ObservableComputer computer)
    {
        foreach (var (condition, points) in conditions)
        {
            var values = points.Select(point => computer.Read(Request(point))).ToArray();
            yield return (Key(condition, points), values.FirstOrDefault(v => v.Because is not null) ?? ObservableValues.Of(Worst(values)));
        }
    }

    /// <summary>Worst value over all conditions, draw by draw; null where it is not predictable.</summary>
    /// <param name="computer">The state that is judged.</param>
    /// <param name="before">The state that a paired expectation compares with, at the same draws.</param>
    internal (double[]? Worst, List<(string Condition, FieldPoint Point, double[] Values)> Points, string? Because) Judge(
        ObservableComputer computer, ObservableComputer? before)
    {
        var points = new List<(string, FieldPoint, double[] Values)>();
        if (because is not null)
            return (null, points, because);
        if (Paired && before is null)
            return (null, points, "There is no earlier state with this series to compare with.");
        foreach (var (condition, of) in conditions)
        {
            foreach (var point in of)
            {
                var now = computer.Read(Request(point));
                var old = Paired ? before!.Read(Request(point)) : null;
                if ((now.Because ?? old?.Because) is { } reason)
                    return (null, points, reason);
                points.Add((condition, point, old is null ? now.Shown : [.. now.Shown.Zip(old.Shown, (n, o) => n / o)]));
            }
        }

        var worst = Worst(points.Select(p => p.Values));
        return worst.Any(double.IsNaN) ? (null, points, "The number is undefined for some of the tissue draws.") : (worst, points, null);
    }

    /// <summary>The outcome; the first draw is the mean.</summary>
    internal ExpectationOutcome Outcome(ObservableComputer computer, ObservableComputer? before, AllowedRangeOutcome? allowed)
    {
        var (worst, points, reason) = Judge(computer, before);
        if (worst is null)
            return NotPredictable(expectation, conditions.Count == 0 ? Key(expectation.Conditions[0], []) : Key(conditions[0].Condition, conditions[0].Points), reason!);
        var draws = worst.AsSpan(1).ToArray();
        var probability = (double)draws.Count(value => VerdictRule.Meets(value, expectation.Relation, expectation.Limit)) / draws.Length;
        var lane = WorstLane(points);
        var (low, high) = Quantiles.Interval(draws);
        return new(
            expectation,
            Key(lane.Condition, conditions.First(c => c.Condition == lane.Condition).Points),
            VerdictRule.Decide(probability, draws.Length),
            VerdictRule.Decide(worst[0], expectation.Relation, expectation.Limit),
            probability,
            VerdictRule.StandardError(draws.Length),
            worst[0],
            low,
            high,
            lane,
            allowed,
            null);
    }

    internal static ExpectationOutcome NotPredictable(Expectation expectation, ObservableKey key, string because) => new(
        expectation, key, Verdict.NotPredictable, Verdict.NotPredictable, double.NaN, double.NaN, double.NaN, double.NaN, double.NaN, null, null, because);

    internal ObservableKey Key(string condition, IReadOnlyList<FieldPoint> points) => new(
        expectation.Series,
        expectation.Observable.Name,
        expectation.Observable.Tissue,
        expectation.Observable.Reference,
        condition,
        points.Count <= 1 ? RangeExtreme.None : AtMost ? RangeExtreme.Highest : RangeExtreme.Lowest);

    private ObservableRequest Request(FieldPoint point) =>
        new(expectation.Observable.Name, expectation.Observable.Tissue, expectation.Observable.Reference, point);

    private double[] Worst(IEnumerable<ObservableValues> values) => Worst(values.Select(v => v.Shown));

    private double[] Worst(IEnumerable<double[]> values)
    {
        double[]? worst = null;
        foreach (var next in values)
        {
            if (worst is null)
            {
                worst = [.. next];
                continue;
            }

            for (var i = 0; i < worst.Length; i++)
                worst[i] = AtMost ? Math.Max(worst[i], next[i]) : Math.Min(worst[i], next[i]);
        }

        return worst ?? [];
    }

    private WorstLane WorstLane(List<(string Condition, FieldPoint Point, double[] Values)> points)
    {
        WorstLane? worst = null;
        foreach (var (condition, point, values) in points)
        {
            for (var i = 1; i < values.Length; i++)
            {
                if (worst is null || (AtMost ? values[i] > worst.Value : values[i] < worst.Value))
                    worst = new(condition, point, i - 1, values[i]);
            }
        }

        return worst!;
    }
}
