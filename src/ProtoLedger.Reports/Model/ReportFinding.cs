using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;

namespace ProtoLedger.Reports.Model;

/// <summary>One thing that the edit does on one scanner. The report joins findings that differ by scanner only.</summary>
/// <param name="ScannerId">Scanner.</param>
/// <param name="SeriesId">Series.</param>
/// <param name="SeriesTitle">Title of the series.</param>
/// <param name="Sentence">The verdict in plain words, with old, new and the cause.</param>
/// <param name="Severity">Larger is worse.</param>
/// <param name="Observable">Name of the observable, such as <c>residualRatio</c>, or null.</param>
/// <param name="Subject">The tissue in plain words, such as "ventricles and sulci"; null for observables of the whole series.</param>
/// <param name="Reference">The second tissue in plain words, such as "white matter"; null where there is none.</param>
/// <param name="Direction">Whether the department would call it better or worse.</param>
/// <param name="Before">Nominal value of the base version, in <paramref name="Unit"/>; null for a new series.</param>
/// <param name="After">Nominal value of the proposal; null for a removed series.</param>
/// <param name="Unit">ms, Hz, px, s; empty for ratios and relative numbers.</param>
/// <param name="Causes">Parameters that did it, the largest first.</param>
/// <param name="Share">Share of plausible tissue values for which the change has this direction, in [0, 1]; null where no tissue value enters.</param>
/// <param name="Condition">Title of the B0/B1 condition at which the numbers stand.</param>
/// <param name="Transition">What happened to the written expectation; null where none speaks of it.</param>
/// <param name="ExpectationTitle">The expectation in words, or null.</param>
/// <param name="Limit">Its limit in <paramref name="Unit"/>, or null.</param>
/// <param name="ProbabilityHolds">Probability that it holds after the edit, in [0, 1], or null.</param>
/// <param name="ReferenceMoved">True where the reference tissue itself changed, so that the ratio alone misleads.</param>
public sealed record ReportFinding(
    string ScannerId,
    string SeriesId,
    string SeriesTitle,
    string Sentence,
    double Severity,
    string? Observable,
    string? Subject,
    string? Reference,
    FindingDirection Direction,
    double? Before,
    double? After,
    string Unit,
    IReadOnlyList<Cause> Causes,
    double? Share,
    string Condition,
    Transition? Transition,
    string? ExpectationTitle,
    double? Limit,
    double? ProbabilityHolds,
    bool ReferenceMoved);

/// <summary>A parameter that brought a finding about.</summary>
/// <param name="Parameter">Keyword, or the name of a block.</param>
/// <param name="Old">Value before with unit, as text; empty for an added block.</param>
/// <param name="New">Value after with unit; empty for a removed block.</param>
/// <param name="Part">Its share of the change of the signed number, as a fraction; may be negative or above 1.</param>
public sealed record Cause(string Parameter, string Old, string New, double Part);
