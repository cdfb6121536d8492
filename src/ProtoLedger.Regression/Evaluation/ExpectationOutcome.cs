using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Regression.Evaluation;

/// <summary>What the prediction says about one expectation.</summary>
/// <param name="Expectation">The written limit.</param>
/// <param name="Observable">The number that it limits; for several conditions that of the worst.</param>
/// <param name="Verdict">Over the tissue draws.</param>
/// <param name="NominalVerdict">At the catalogue's mean values: holds, fails or not predictable.</param>
/// <param name="Probability">Share of the draws for which the limit holds at every point of every named condition, in [0, 1]; NaN where not predictable.</param>
/// <param name="StandardError">Standard error of a probability of 5 % or 95 % with this many draws.</param>
/// <param name="Nominal">Worst value over the points, at the catalogue's mean values; for a paired expectation new over old.</param>
/// <param name="Low">5 % quantile over the draws of the worst value over the points.</param>
/// <param name="High">95 % quantile.</param>
/// <param name="Worst">The lane that is worst, or null where not predictable.</param>
/// <param name="AllowedRanges">Worst value when the console stays within the allowed ranges, or null where there are none.</param>
/// <param name="Because">Why it is not predictable, or null.</param>
public sealed record ExpectationOutcome(
    Expectation Expectation,
    ObservableKey Observable,
    Verdict Verdict,
    Verdict NominalVerdict,
    double Probability,
    double StandardError,
    double Nominal,
    double Low,
    double High,
    WorstLane? Worst,
    AllowedRangeOutcome? AllowedRanges,
    string? Because);

/// <summary>The lane on which an expectation does worst.</summary>
/// <param name="Condition">Condition name.</param>
/// <param name="Point">Point of its ranges.</param>
/// <param name="Sample">Number of the tissue draw, from 0.</param>
/// <param name="Value">The observable there.</param>
public sealed record WorstLane(string Condition, FieldPoint Point, int Sample, double Value);

/// <summary>Worst case when a technologist stays within the allowed ranges.</summary>
/// <param name="Settings">Parameter pointer below the series → value at the worst corner.</param>
/// <param name="Nominal">Worst value there at the catalogue's mean values.</param>
/// <param name="Verdict">Whether the limit holds there at the catalogue's mean values.</param>
public sealed record AllowedRangeOutcome(IReadOnlyDictionary<string, double> Settings, double Nominal, Verdict Verdict);
