using System.Globalization;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Repair;

/// <summary>Looks for the smallest change that makes a broken expectation hold.</summary>
public static class RepairSearch
{
    private const int GridSteps = 24;
    private const int PairSteps = 10;
    private const int MostOffers = 4;

    /// <summary>Offers, the smallest change first after the exact null; empty where nothing within the limits makes it hold.</summary>
    /// <param name="evaluation">The run's evaluation.</param>
    /// <param name="broken">The state in which the expectation does not hold.</param>
    /// <param name="before">The state that a paired expectation compares with, or null.</param>
    /// <param name="expectationId">The expectation.</param>
    /// <param name="allowed">Parameters that may change; null for <see cref="RepairParameters.Usual"/>.</param>
    /// <remarks>
    /// The inversion time that nulls the tissue comes from the engine's root finder. Then each parameter alone, outward from its value;
    /// two at a time where none suffices alone. The size of a change is the sum of |ln(new / old)|. Only documents that validate are offered.
    /// </remarks>
    public static IReadOnlyList<RepairOffer> Offers(
        VersionEvaluation evaluation, EvaluationInput broken, EvaluationInput? before, string expectationId, IReadOnlyList<RepairParameter>? allowed = null)
    {
        ArgumentNullException.ThrowIfNull(evaluation);
        ArgumentNullException.ThrowIfNull(broken);
        var expectation = broken.Expectations?.Document.Expectations.FirstOrDefault(e => e.Id == expectationId)
            ?? throw new ArgumentException($"There is no expectation \"{expectationId}\".", nameof(expectationId));
        if (broken.Protocol.Document.Series.FirstOrDefault(s => s.Id == expectation.Series) is not { } series)
            return [];
        var trial = new Trial(evaluation, broken, before, expectation);
        var parameters = (allowed ?? RepairParameters.Usual(series.Acquisition)).Where(p => SeriesParameters.Get(series.Acquisition, p.Pointer) is not null).ToArray();
        var found = new List<(string Pointer, double Value)[]>();
        if (Null(evaluation, broken, series, expectation, parameters) is { } exact && trial.Holds([exact]))
            found.Add([exact]);
        var alone = parameters.Select(p => Alone(trial, series, p)).Where(s => s is not null).Select(s => new[] { s!.Value }).OrderBy(s => Size(series, s)).ToArray();
        found.AddRange(alone);
        if (found.Count == 0)
            found.AddRange(Pairs(trial, series, parameters).OrderBy(s => Size(series, s)).Take(1));
        return [.. found.DistinctBy(Text).Take(MostOffers).Select(settings => Offer(evaluation, broken, before, expectation, series, settings)).OfType<RepairOffer>()];
    }

    /// <summary>The inversion time that nulls the expectation's tissue at its mean values; null where there is none that may be set.</summary>
    /// <param name="evaluation">The run's evaluation.</param>
    /// <param name="input">The state.</param>
    /// <param name="seriesId">Series with an inversion.</param>
    /// <param name="tissue">Catalogue name.</param>
    /// <returns>ms, exact; and the pointer of the inversion time below the series.</returns>
    public static (string Pointer, double InversionTime)? NullingInversionTime(VersionEvaluation evaluation, EvaluationInput input, string seriesId, string tissue)
    {
        ArgumentNullException.ThrowIfNull(evaluation);
        ArgumentNullException.ThrowIfNull(input);
        if (input.Protocol.Document.Series.FirstOrDefault(s => s.Id == seriesId) is not { } series)
            return null;
        var context = evaluation.Context(input, series);
        var index = NullObservables.LastInversion(context.Acquisition);
        var cells = new SignalCells(context, [-1]);
        if (index < 0 || cells.Tissue(tissue).Tissue is null)
            return null;
        try
        {
            return NullTimes.Find(context.Acquisition, index, context.Setting, cells.Lanes(tissue, ConditionPoints.Nominal))[0] is { } time
                ? (string.Create(CultureInfo.InvariantCulture, $"/preparations/{index}/InversionTime"), time)
                : null;
        }
        catch (ArgumentException)
        {
            // The engine refuses the series as it stands: there is no null to speak of.
            return null;
        }
    }

    private static (string Pointer, double Value)? Null(
        VersionEvaluation evaluation, EvaluationInput broken, ProtocolSeries series, Expectation expectation, RepairParameter[] parameters)
    {
        if (expectation.Observable.Tissue is not { } tissue || expectation.Observable.Name is not ("residualRatio" or "signal" or "nullDistance" or "signedSignal")
            || NullingInversionTime(evaluation, broken, series.Id, tissue) is not { } exact
            || parameters.FirstOrDefault(p => p.Pointer == exact.Pointer) is not { } parameter)
            return null;
        var value = RepairParameters.Snap(parameter with { Step = Math.Min(1, parameter.Step) }, exact.InversionTime);
        return value == SeriesParameters.Get(series.Acquisition, exact.Pointer) ? null : (exact.Pointer, value);
    }

    /// <summary>The nearest value of one parameter that makes it hold: a grid outward on both sides, then bisection to the step.</summary>
    private static (string Pointer, double Value)? Alone(Trial trial, ProtocolSeries series, RepairParameter parameter)
    {
        var old = SeriesParameters.Get(series.Acquisition, parameter.Pointer)!.Value;
        (string, double)? best = null;
        foreach (var end in (double[])[parameter.Low, parameter.High])
        {
            var inner = old;
            for (var i = 1; i <= GridSteps; i++)
            {
                var value = RepairParameters.Snap(parameter, old + (end - old) * i / GridSteps);
                if (value == inner || value == old)
                    continue;
                if (!trial.Holds([(parameter.Pointer, value)]))
                {
                    inner = value;
                    continue;
                }

                var holds = Bisect(trial, parameter, inner, value);
                if (best is not var (_, known) || Distance(holds, old) < Distance(known, old))
                    best = (parameter.Pointer, holds);
                break;
            }
        }

        return best;
    }

    private static double Bisect(Trial trial, RepairParameter parameter, double fails, double holds)
    {
        while (Math.Abs(holds - fails) > 1.5 * parameter.Step)
        {
            var middle = RepairParameters.Snap(parameter, (holds + fails) / 2);
            if (middle == holds || middle == fails)
                break;
            if (trial.Holds([(parameter.Pointer, middle)]))
                holds = middle;
            else
                fails = middle;
        }

        return holds;
    }

    private static IEnumerable<(string Pointer, double Value)[]> Pairs(Trial trial, ProtocolSeries series, RepairParameter[] parameters)
    {
        for (var i = 0; i < parameters.Length; i++)
        {
            for (var j = 0; j < i; j++)
            {
                var candidates =
                    from a in Grid(series, parameters[i]) from b in Grid(series, parameters[j])
                    select new[] { (parameters[i].Pointer, a), (parameters[j].Pointer, b) };
                // Smallest first, so the first that holds is the smallest on the grid.
                if (candidates.OrderBy(c => Size(series, c)).FirstOrDefault(trial.Holds) is { } found)
                    yield return found;
            }
        }
    }

    private static IEnumerable<double> Grid(ProtocolSeries series, RepairParameter parameter)
    {
        var old = SeriesParameters.Get(series.Acquisition, parameter.Pointer)!.Value;
        return Enumerable.Range(0, PairSteps + 1)
            .Select(i => RepairParameters.Snap(parameter, parameter.Low + (parameter.High - parameter.Low) * i / PairSteps))
            .Where(value => value != old).Distinct();
    }

    private static RepairOffer? Offer(
        VersionEvaluation evaluation, EvaluationInput broken, EvaluationInput? before, Expectation expectation, ProtocolSeries series, (string Pointer, double Value)[] settings)
    {
        if (SeriesEdit.Apply(broken.Protocol, series.Id, settings) is not { } proposal)
            return null;
        var repaired = broken with { Protocol = proposal };
        var (old, now) = (evaluation.Evaluate(broken, before), evaluation.Evaluate(repaired, before));
        var outcome = now.Expectations.First(o => o.Expectation.Id == expectation.Id);
        var cost = RunDifference.Between(old, now);
        var changes = settings.Select(s => new RepairSetting(s.Pointer, SeriesParameters.Get(series.Acquisition, s.Pointer)!.Value, s.Value)).ToArray();
        var text = string.Join(" and ", changes.Select(c => string.Create(CultureInfo.InvariantCulture, $"{Name(c.Pointer)} {c.Old} to {c.New}")));
        return new(
            expectation.Id, series.Id, changes, proposal.Document, outcome, cost,
            $"{text}: {PlainWords.ForShare($"\u201C{expectation.Title}\u201D holds", outcome.Probability)}{CostText(evaluation, broken, repaired, series)}");
    }

    /// <summary>What a repair makes worse, in words.</summary>
    private static string CostText(VersionEvaluation evaluation, EvaluationInput broken, EvaluationInput repaired, ProtocolSeries series)
    {
        var edit = new EditOnScanner(broken with { Expectations = null }, repaired with { Expectations = null });
        var assessment = ChangeAssessor.Assess(evaluation, [edit]).Scanners[0];
        var worse = assessment.Balance.Where(b => b.SeriesId == series.Id && b.Direction == FindingDirection.Worse).Take(4)
            .Select(b => b.Unit == "s" ? $"{b.What} {PlainWords.Minutes(b.Before!.Value)} to {PlainWords.Minutes(b.After!.Value)}" : $"{b.What} {PlainWords.Ratio(b.Before!.Value)} to {PlainWords.Ratio(b.After!.Value)}")
            .ToArray();
        return worse.Length == 0 ? "; it costs nothing that counts elsewhere" : $"; it costs: {string.Join(", ", worse)}";
    }

    private static string Name(string pointer)
    {
        var parts = pointer.Split('/');
        return int.TryParse(parts[^1], out _) ? parts[^2] : parts[^1];
    }

    private static double Size(ProtocolSeries series, (string Pointer, double Value)[] settings) =>
        settings.Sum(s => Distance(s.Value, SeriesParameters.Get(series.Acquisition, s.Pointer)!.Value));

    private static double Distance(double value, double old) => value > 0 && old > 0 ? Math.Abs(Math.Log(value / old)) : Math.Abs(value - old);

    private static string Text((string Pointer, double Value)[] settings) => string.Join(';', settings);

    /// <summary>Tries settings: whether the document validates and the expectation holds then.</summary>
    private sealed class Trial(VersionEvaluation evaluation, EvaluationInput broken, EvaluationInput? before, Expectation expectation)
    {
        private readonly int[] all = [.. Enumerable.Range(-1, broken.Sampling.Samples + 1)];

        internal bool Holds((string Pointer, double Value)[] settings)
        {
            if (SeriesEdit.Apply(broken.Protocol, expectation.Series, settings) is not { } proposal)
                return false;
            var context = evaluation.Context(broken with { Protocol = proposal }, proposal.Document.Series.First(s => s.Id == expectation.Series));
            // What fails at the means cannot hold for 95 % of draws around them: most candidates end here.
            return Outcome(context, [-1, -1]).NominalVerdict == Verdict.Holds && Outcome(context, all).Verdict == Verdict.Holds;
        }

        private ExpectationOutcome Outcome(SeriesContext context, int[] draws)
        {
            var judge = new ExpectationJudge(expectation, context);
            var computer = SeriesEvaluation.Compute(context, draws, [], [judge]);
            var old = judge.Paired && before?.Protocol.Document.Series.FirstOrDefault(s => s.Id == expectation.Series) is { } earlier
                ? SeriesEvaluation.Compute(evaluation.Context(before, earlier), draws, [], [judge])
                : null;
            return judge.Outcome(computer, old, null);
        }
    }
}
