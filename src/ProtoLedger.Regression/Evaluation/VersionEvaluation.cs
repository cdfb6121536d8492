using System.Collections.Concurrent;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Prediction;
using ProtoLedger.Regression.Sampling;

namespace ProtoLedger.Regression.Evaluation;

/// <summary>Predicts protocol versions on scanners. Thread safe; within one instance a series that is equal in all that counts is computed once.</summary>
/// <remarks>One instance belongs to one run: it keeps every series result.</remarks>
public sealed class VersionEvaluation
{
    private readonly ConcurrentDictionary<string, Lazy<SeriesResult>> results = new();
    private readonly ConcurrentDictionary<SamplePlan, TissueDraws> draws = new();
    private int asked;

    /// <summary>Mixtures of old and new documents that attribution has made in this run.</summary>
    internal ConcurrentDictionary<string, LedgerDocument?> Mixtures { get; } = new();

    /// <summary>Number of series computed so far.</summary>
    public int ComputedSeries => results.Count;

    /// <summary>Number of series taken from an earlier computation so far.</summary>
    public int SharedSeries => asked - results.Count;

    /// <summary>Whether the outcome depends on an earlier state: an expectation compares new with old.</summary>
    /// <param name="input">The input.</param>
    public static bool NeedsBefore(EvaluationInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        return input.Expectations?.Document.Expectations.Any(ExpectationJudge.IsPaired) ?? false;
    }

    /// <summary>Hash of everything the result depends on; equal hashes mean equal results.</summary>
    /// <param name="input">What to predict.</param>
    /// <param name="before">As for <see cref="Evaluate"/>.</param>
    public static string InputHash(EvaluationInput input, EvaluationInput? before = null)
    {
        ArgumentNullException.ThrowIfNull(input);
        return input.Hash(ModelIdentity.Current, NeedsBefore(input) ? before : null);
    }

    /// <summary>Predicts one protocol version on one scanner.</summary>
    /// <param name="input">What to predict; the protocol need not name the scanner.</param>
    /// <param name="before">The state that paired expectations compare with: the base version of a proposal, the version before of a stored one, or the same version under the documents before the edit; null where there is none.</param>
    /// <returns>A result for every series; what cannot be predicted is listed with its reason.</returns>
    public EvaluationResult Evaluate(EvaluationInput input, EvaluationInput? before = null)
    {
        ArgumentNullException.ThrowIfNull(input);
        var earlier = NeedsBefore(input) ? before : null;
        var series = input.Protocol.Document.Series;
        var parts = new SeriesResult[series.Count];
        Parallel.For(0, series.Count, i => parts[i] = EvaluateSeries(input, series[i], earlier));

        var numbers = parts.SelectMany(p => p.Numbers).Select(n => (Text: n.Key.ToString(), Number: n)).ToArray();
        Array.Sort(numbers, (a, b) => string.CompareOrdinal(a.Text, b.Text));
        return new(
            ModelIdentity.Current,
            InputHash(input, before),
            [.. numbers.Select(n => n.Number.Key)],
            [.. numbers.Select(n => n.Number.Nominal)],
            [.. numbers.Select(n => n.Number.Low)],
            [.. numbers.Select(n => n.Number.High)],
            Outcomes(input, parts),
            [.. parts.SelectMany(p => p.Missing).OrderBy(m => m.Observable)],
            [.. parts.SelectMany(p => p.Assumptions).Distinct()],
            [.. parts.SelectMany(p => p.WeakSources).Distinct()]);
    }

    /// <summary>Context of a series, with the draws that this instance shares.</summary>
    internal SeriesContext Context(EvaluationInput input, ProtocolSeries series) =>
        SeriesContext.Create(input, series, draws.GetOrAdd(input.Sampling, plan => new TissueDraws(plan)));

    private SeriesResult EvaluateSeries(EvaluationInput input, ProtocolSeries series, EvaluationInput? before)
    {
        var context = Context(input, series);
        var expectations = Applicable(input).Where(e => e.Series == series.Id).ToArray();
        var old = before is not null && expectations.Any(ExpectationJudge.IsPaired) && before.Protocol.Document.Series.FirstOrDefault(s => s.Id == series.Id) is { } earlier
            ? (before, Context: Context(before, earlier))
            : default;
        var key = string.Join(
            '\n',
            context.Text(),
            input.Catalogue.Sha256,
            input.Conditions.Sha256,
            expectations.Length == 0 ? "" : input.Expectations!.Sha256,
            input.Scanner.Document.Id,
            input.Sampling,
            old.Context is null ? "" : old.Context.Text() + old.before!.Catalogue.Sha256 + old.before.Conditions.Sha256);
        Interlocked.Increment(ref asked);
        return results.GetOrAdd(key, _ => new(() => SeriesEvaluation.Evaluate(context, expectations, old.Context))).Value;
    }

    private static IEnumerable<Expectation> Applicable(EvaluationInput input) =>
        (input.Expectations?.Document.Expectations ?? []).Where(e => e.Scanners.Count == 0 || e.Scanners.Contains(input.Scanner.Document.Id));

    /// <summary>In the order of the document; an expectation on a series that this version lacks cannot be predicted.</summary>
    private static List<ExpectationOutcome> Outcomes(EvaluationInput input, SeriesResult[] parts)
    {
        var found = parts.SelectMany(p => p.Expectations).ToDictionary(o => o.Expectation.Id);
        return
        [
            .. Applicable(input).Select(e => found.GetValueOrDefault(e.Id) ?? ExpectationJudge.NotPredictable(
                e,
                new(e.Series, e.Observable.Name, e.Observable.Tissue, e.Observable.Reference, e.Conditions[0]),
                $"This version has no series \"{e.Series}\".")),
        ];
    }
}
