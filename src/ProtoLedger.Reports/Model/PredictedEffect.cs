using ProtoLedger.Regression.Findings;

namespace ProtoLedger.Reports.Model;

/// <summary>One predicted number before and after.</summary>
/// <param name="ScannerId">Scanner.</param>
/// <param name="SeriesTitle">Series.</param>
/// <param name="Observable">Name of the observable.</param>
/// <param name="Subject">Tissue in plain words, or null.</param>
/// <param name="Reference">Second tissue in plain words, or null.</param>
/// <param name="Condition">Title of the B0/B1 condition.</param>
/// <param name="Unit">ms, Hz, px, s; empty for ratios and relative numbers.</param>
/// <param name="Before">Base version; null for a new series.</param>
/// <param name="After">Proposal; null for a removed series.</param>
/// <param name="Direction">Better, worse, the same or different.</param>
/// <param name="Share">Share of plausible tissue values that change in this direction, in [0, 1]; null where none enters.</param>
public sealed record PredictedEffect(
    string ScannerId,
    string SeriesTitle,
    string Observable,
    string? Subject,
    string? Reference,
    string Condition,
    string Unit,
    PredictedValue? Before,
    PredictedValue? After,
    FindingDirection Direction,
    double? Share);

/// <summary>A predicted number with its plausible range.</summary>
/// <param name="Nominal">At the catalogue's mean tissue values.</param>
/// <param name="Low">5th percentile over plausible tissue values; equals the nominal value where nothing varies.</param>
/// <param name="High">95th percentile.</param>
public sealed record PredictedValue(double Nominal, double Low, double High);
