using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Findings;

/// <summary>All that an edit does on every scanner that runs the protocol: what the change report is made of.</summary>
/// <param name="Changes">Every changed parameter.</param>
/// <param name="Headlines">The findings of the first screen, one for each thing that happens, on the scanner where it is worst; worst first.</param>
/// <param name="Scanners">Scanner by scanner, worst first.</param>
/// <param name="LeftOut">What the prediction leaves out for this edit.</param>
/// <param name="NextSteps">What must be done next.</param>
public sealed record ChangeAssessment(
    IReadOnlyList<ChangedParameter> Changes,
    IReadOnlyList<Finding> Headlines,
    IReadOnlyList<ScannerAssessment> Scanners,
    IReadOnlyList<Omission> LeftOut,
    IReadOnlyList<NextStep> NextSteps);

/// <summary>What an edit does on one scanner.</summary>
/// <param name="ScannerId">Scanner.</param>
/// <param name="Severity">That of its worst finding; 0 where nothing gets worse.</param>
/// <param name="Before">Prediction before.</param>
/// <param name="After">Prediction after.</param>
/// <param name="Difference">What moved and which verdicts changed.</param>
/// <param name="Attributions">For every observable that changed; nominal, and at the worst lane of each broken expectation.</param>
/// <param name="Shares">For every observable at the nominal point that changed: share of the tissue draws for which it rose.</param>
/// <param name="Findings">Worst first.</param>
/// <param name="Balance">What gets better, worse, stays.</param>
public sealed record ScannerAssessment(
    string ScannerId,
    double Severity,
    EvaluationResult Before,
    EvaluationResult After,
    RunDifference Difference,
    IReadOnlyList<AttributionResult> Attributions,
    IReadOnlyDictionary<ObservableKey, double> Shares,
    IReadOnlyList<Finding> Findings,
    IReadOnlyList<BalanceLine> Balance);

/// <summary>A line of what gets better, gets worse, stays.</summary>
/// <param name="Direction">Which.</param>
/// <param name="What">In words, such as "scan time".</param>
/// <param name="SeriesId">Series.</param>
/// <param name="SeriesTitle">Its title.</param>
/// <param name="Before">Before, in <paramref name="Unit"/>; null where there was none.</param>
/// <param name="After">After; null where there is none.</param>
/// <param name="Unit">s, ms, px; empty for relative numbers (old = 1).</param>
/// <param name="Note">What belongs to the number; may be empty.</param>
public sealed record BalanceLine(
    FindingDirection Direction, string What, string SeriesId, string SeriesTitle, double? Before, double? After, string Unit, string Note);

/// <summary>Something that the prediction does not hold, because of what the edit touches.</summary>
/// <param name="Effect">Name of the effect, such as "magnetisation transfer".</param>
/// <param name="Text">What follows for this edit.</param>
/// <param name="Because">Parameters that make it matter.</param>
public sealed record Omission(string Effect, string Text, IReadOnlyList<string> Because);

/// <summary>Something that must be done before or after approval.</summary>
/// <param name="What">The task.</param>
/// <param name="Where">Scanner identifier or place.</param>
/// <param name="ByWhom">Role.</param>
/// <param name="When">Before or after what.</param>
public sealed record NextStep(string What, string Where, string ByWhom, string When);
