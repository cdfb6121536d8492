using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Findings;

/// <summary>An edit on one scanner: the state before and the state after.</summary>
/// <param name="Before">Base version, or the same version under the documents before the edit.</param>
/// <param name="After">Proposal, or the same version under the edited documents; the same scanner.</param>
public sealed record EditOnScanner(EvaluationInput Before, EvaluationInput After);

/// <summary>Everything that findings on one scanner are written from.</summary>
internal sealed class ScannerEvidence(
    EditOnScanner edit,
    EvaluationResult old,
    EvaluationResult now,
    RunDifference difference,
    IReadOnlyList<AttributionResult> attributions,
    IReadOnlyDictionary<ObservableKey, double> shares)
{
    private readonly Dictionary<ObservableKey, AttributionResult> nominal =
        attributions.Where(a => a.Lane == "nominal").ToDictionary(a => a.Observable);

    internal EditOnScanner Edit => edit;

    internal EvaluationResult Old => old;

    internal EvaluationResult Now => now;

    internal RunDifference Difference => difference;

    internal string ScannerId => edit.After.Scanner.Document.Id;

    internal string Region => edit.After.Protocol.Document.BodyRegion;

    internal string Words(string tissue) => PlainWords.Tissue(tissue, Region, edit.After.Catalogue.Document);

    /// <summary>Old and new nominal value; null where one side lacks it.</summary>
    internal (double Old, double Now)? Values(ObservableKey key)
    {
        var (i, k) = (old.IndexOf(key), now.IndexOf(key));
        return i < 0 || k < 0 || !double.IsFinite(old.Nominal[i]) || !double.IsFinite(now.Nominal[k]) ? null : (old.Nominal[i], now.Nominal[k]);
    }

    internal AttributionResult? Attribution(ObservableKey key) => nominal.GetValueOrDefault(key);

    /// <summary>Attribution at the worst lane of a broken expectation.</summary>
    internal AttributionResult? WorstAttribution(ObservableKey key) => attributions.FirstOrDefault(a => a.Lane == "worst" && a.Observable == key);

    internal double? Rising(ObservableKey key) => shares.TryGetValue(key, out var share) ? share : null;

    internal ExpectationOutcome? OldOutcome(string id) => old.Expectations.FirstOrDefault(o => o.Expectation.Id == id);
}
