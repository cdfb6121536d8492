using ProtoLedger.Regression.Findings;

namespace ProtoLedger.Reports.Model;

/// <summary>The smallest change that makes a broken expectation hold.</summary>
/// <param name="ExpectationTitle">The expectation in words.</param>
/// <param name="ScannerId">Scanner.</param>
/// <param name="SeriesTitle">Series.</param>
/// <param name="Changes">Parameters to change, from the proposal's value.</param>
/// <param name="ProbabilityHolds">Probability that it holds then, in [0, 1].</param>
/// <param name="Costs">What the repair costs elsewhere, the largest first.</param>
public sealed record ReportRepair(
    string ExpectationTitle,
    string ScannerId,
    string SeriesTitle,
    IReadOnlyList<RepairChange> Changes,
    double ProbabilityHolds,
    IReadOnlyList<RepairCost> Costs);

/// <summary>A parameter that a repair changes.</summary>
/// <param name="Parameter">Keyword.</param>
/// <param name="From">Value of the proposal.</param>
/// <param name="To">Value of the repair.</param>
/// <param name="Unit">Unit of both.</param>
public sealed record RepairChange(string Parameter, double From, double To, string Unit);

/// <summary>What a repair costs in one observable, against the base version.</summary>
/// <param name="Observable">Name of the observable.</param>
/// <param name="Subject">Tissue in plain words, or null.</param>
/// <param name="Reference">Second tissue, or null.</param>
/// <param name="Before">Base version.</param>
/// <param name="After">With the repair.</param>
/// <param name="Unit">Unit, empty for ratios and relative numbers.</param>
/// <param name="Direction">Better, worse, the same or different.</param>
public sealed record RepairCost(
    string Observable, string? Subject, string? Reference, double Before, double After, string Unit, FindingDirection Direction);
