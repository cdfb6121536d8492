using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Drift;

/// <summary>A prediction as it is stored: arrays against lists of observables and expectations.</summary>
/// <param name="Observables">n keys, in any order.</param>
/// <param name="Nominal">n values at the means; NaN where not predictable.</param>
/// <param name="Low">n 5 % quantiles.</param>
/// <param name="High">n 95 % quantiles.</param>
/// <param name="Expectations">m identifiers.</param>
/// <param name="Verdicts">m verdicts.</param>
public sealed record PackedPrediction(
    IReadOnlyList<ObservableKey> Observables,
    double[] Nominal,
    double[] Low,
    double[] High,
    IReadOnlyList<string> Expectations,
    IReadOnlyList<VerdictRecord> Verdicts)
{
    /// <summary>Packs a fresh result.</summary>
    /// <param name="result">The result; its arrays are shared.</param>
    public static PackedPrediction Of(EvaluationResult result)
    {
        ArgumentNullException.ThrowIfNull(result);
        return new(
            result.Observables,
            result.Nominal,
            result.Low,
            result.High,
            [.. result.Expectations.Select(outcome => outcome.Expectation.Id)],
            [.. result.Expectations.Select(outcome => new VerdictRecord(outcome.Verdict, outcome.NominalVerdict, outcome.Probability))]);
    }
}
