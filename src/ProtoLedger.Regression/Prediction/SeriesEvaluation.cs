using System.Globalization;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Sampling;

namespace ProtoLedger.Regression.Prediction;

/// <summary>All numbers and outcomes of one series.</summary>
internal sealed record SeriesResult(
    IReadOnlyList<PredictedNumber> Numbers,
    IReadOnlyList<ExpectationOutcome> Expectations,
    IReadOnlyList<MissingPrediction> Missing,
    IReadOnlyList<string> Assumptions,
    IReadOnlyList<WeakSource> WeakSources);

/// <summary>A number with its interval.</summary>
internal readonly record struct PredictedNumber(ObservableKey Key, double Nominal, double Low, double High);

/// <summary>Evaluates one series: standard observables at the nominal point, expectations over their conditions and the allowed ranges.</summary>
internal static class SeriesEvaluation
{
    internal static SeriesResult Evaluate(SeriesContext context, IReadOnlyList<Expectation> expectations, SeriesContext? before)
    {
        var draws = Enumerable.Range(-1, context.Draws.Count + 1).ToArray();
        var judges = expectations.Select(e => new ExpectationJudge(e, context)).ToArray();
        var standard = StandardObservables.Of(context, Tissues(expectations));
        var computer = Compute(context, draws, [.. standard.Where(k => !IsSlow(k) && !IsBlur(k)).Select(Request)], judges);
        var few = Compute(context, [.. draws.Take(SlowDraws + 1)], [.. standard.Where(IsSlow).Select(Request)], []);
        var old = before is not null && judges.Any(j => j.Paired) ? Compute(before, draws, [], [.. judges.Where(j => j.Paired)]) : null;

        var numbers = new Dictionary<ObservableKey, PredictedNumber>();
        var missing = new Dictionary<ObservableKey, MissingPrediction>();
        void Add(ObservableKey key, ObservableValues values)
        {
            var because = values.Because ?? (values.Shown.All(double.IsFinite) ? null : "The number is undefined for some of the tissue draws.");
            if (because is not null)
                missing[key] = new(key, because);
            numbers[key] = because is not null ? new(key, double.NaN, double.NaN, double.NaN) : Summarise(key, values.Shown);
        }

        foreach (var key in standard)
            Add(key, IsBlur(key) ? Blur(context, key) : (IsSlow(key) ? few : computer).Read(Request(key)));
        foreach (var (key, values) in judges.SelectMany(j => j.Observables(computer)))
            Add(key, values);

        var allowed = AllowedRanges(context, judges, before);
        return new(
            [.. numbers.Values],
            [.. judges.Select((judge, i) => judge.Outcome(computer, old, allowed[i]))],
            [.. missing.Values],
            Assumptions(context, computer),
            [.. computer.Cells.Tissues.SelectMany(t => t.WeakSources()).Distinct()]);
    }

    private const int SlowDraws = 128;

    /// <summary>Predicts requests and judges' requests in one batch.</summary>
    internal static ObservableComputer Compute(SeriesContext context, int[] draws, IReadOnlyList<ObservableRequest> requests, IReadOnlyList<ExpectationJudge> judges)
    {
        var computer = new ObservableComputer(context, draws);
        foreach (var request in requests.Concat(judges.SelectMany(j => j.Requests())))
            computer.Need(request);
        computer.Predict();
        return computer;
    }

    internal static ObservableRequest Request(ObservableKey key) => new(key.Observable, key.Tissue, key.Reference, ConditionPoints.Nominal);

    /// <summary>The blur of a train is slow to compute and hardly varies: it is predicted at the means and at the 5 % and 95 % draws of T2.</summary>
    private static bool IsBlur(ObservableKey key) => key.Observable == "blurWidth";

    /// <summary>Derivatives take eight predictions of every lane: their intervals rest on the first draws alone, which are a balanced set of their own.</summary>
    private static bool IsSlow(ObservableKey key) => key.Observable.StartsWith("weighting", StringComparison.Ordinal) || key.Observable == "contrastEquivalentEchoTime";

    private static ObservableValues Blur(SeriesContext context, ObservableKey key)
    {
        var all = new SignalCells(context, [.. Enumerable.Range(0, context.Draws.Count)]);
        if (all.Tissue(key.Tissue!).Because is { } because)
            return ObservableValues.Missing(because);
        var lanes = all.Lanes(key.Tissue!, ConditionPoints.Nominal);
        var byT2 = Enumerable.Range(0, lanes.Count).OrderBy(i => lanes.T2[i]).ToArray();
        int At(double share) => byT2[(int)Math.Round(share * (byT2.Length - 1))];
        var request = Request(key);
        return Compute(context, [-1, At(Quantiles.Low), At(Quantiles.High)], [request], []).Read(request);
    }

    private static PredictedNumber Summarise(ObservableKey key, double[] values)
    {
        var (low, high) = Quantiles.Interval(values.AsSpan(1).ToArray());
        return new(key, values[0], low, high);
    }

    private static AllowedRangeOutcome?[] AllowedRanges(SeriesContext context, ExpectationJudge[] judges, SeriesContext? before)
    {
        var outcomes = new AllowedRangeOutcome?[judges.Length];
        if (judges.Length == 0 || context.AllowedRanges.Count == 0)
            return outcomes;
        var old = before is null ? null : Compute(before, [-1], [], [.. judges.Where(j => j.Paired)]);
        foreach (var (settings, series) in AllowedCorners.Of(context.Acquisition, context.AllowedRanges))
        {
            var corner = Compute(context with { Acquisition = series }, [-1], [], judges);
            for (var i = 0; i < judges.Length; i++)
            {
                if (judges[i].Judge(corner, old).Worst is not [var value])
                    continue;
                var expectation = judges[i].Expectation;
                var worse = outcomes[i] is not { } known || (expectation.Relation == LimitRelation.AtMost ? value > known.Nominal : value < known.Nominal);
                if (worse)
                    outcomes[i] = new(settings, value, VerdictRule.Decide(value, expectation.Relation, expectation.Limit));
            }
        }

        return outcomes;
    }

    private static IEnumerable<string> Tissues(IEnumerable<Expectation> expectations) =>
        expectations.SelectMany(e => (string?[])[e.Observable.Tissue, e.Observable.Reference]).OfType<string>();

    private static List<string> Assumptions(SeriesContext context, ObservableComputer computer)
    {
        var series = context.Acquisition;
        var assumptions = computer.Cells.Assumptions.Select(a => a.Text).ToList();
        foreach (var pulse in series.Preparations.OfType<Inversion>().Select(i => i.Pulse).OfType<EfficiencyInversion>().Distinct())
            assumptions.Add(string.Create(CultureInfo.InvariantCulture, $"Inversion pulse \"{pulse.Name}\": efficiency {pulse.Efficiency} ± {pulse.EfficiencySd}."));
        assumptions.Add("Fat stands 3.5 ppm below water for shifts and phases.");
        if (series.Geometry.Acceleration > 1)
            assumptions.Add("The geometry factor of parallel imaging is taken as 1 in the relative noise.");
        if (context.ContrastConcentration is { } concentration)
        {
            assumptions.Add(string.Create(
                CultureInfo.InvariantCulture, $"Contrast agent of {concentration} mmol/l in tissue that takes it up; relaxivities of macrocyclic agents in general."));
        }

        if (computer.Cells.HasInflow)
            assumptions.Add("Unprepared inflow is counted for cerebrospinal fluid and blood alone.");
        return assumptions;
    }
}
