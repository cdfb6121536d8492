using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Findings;

/// <summary>All that an edit does on every scanner that runs the protocol: what the change report is made of.</summary>
/// <param name="Changes">Every changed parameter.</param>
/// <param name="Headlines">At most a handful of findings over all scanners, worst first: the first screen.</param>
/// <param name="Scanners">Scanner by scanner, worst first.</param>
/// <param name="LeftOut">What the prediction leaves out for this edit, in words.</param>
/// <param name="NextSteps">What must be done next, where, by whom.</param>
public sealed record ChangeAssessment(
    IReadOnlyList<ChangedParameter> Changes,
    IReadOnlyList<Finding> Headlines,
    IReadOnlyList<ScannerAssessment> Scanners,
    IReadOnlyList<string> LeftOut,
    IReadOnlyList<NextStep> NextSteps);

/// <summary>What an edit does on one scanner.</summary>
/// <param name="Scanner">Scanner identifier.</param>
/// <param name="Before">Prediction before.</param>
/// <param name="After">Prediction after.</param>
/// <param name="Difference">What moved and which verdicts changed.</param>
/// <param name="Attributions">For every observable that changed; nominal, and at the worst lane of each broken expectation.</param>
/// <param name="Findings">Worst first.</param>
public sealed record ScannerAssessment(
    string Scanner,
    EvaluationResult Before,
    EvaluationResult After,
    RunDifference Difference,
    IReadOnlyList<AttributionResult> Attributions,
    IReadOnlyList<Finding> Findings);

/// <summary>Something that must be done before or after approval.</summary>
/// <param name="What">In words.</param>
/// <param name="Where">Scanner identifier or place.</param>
/// <param name="Who">Role.</param>
public sealed record NextStep(string What, string Where, string Who);
