using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Reports.Model;

/// <summary>A written expectation on one scanner under one condition, before and after.</summary>
/// <param name="ExpectationId">Identifier.</param>
/// <param name="Title">In words.</param>
/// <param name="Why">Why the department wants it.</param>
/// <param name="ScannerId">Scanner.</param>
/// <param name="SeriesTitle">Series.</param>
/// <param name="Condition">Title of the B0/B1 condition.</param>
/// <param name="Paired">True where new is compared with old for the same tissue draw.</param>
/// <param name="AtMost">True where the value must not exceed the limit, false where it must reach it.</param>
/// <param name="Limit">In <paramref name="Unit"/>.</param>
/// <param name="Unit">Unit, empty for ratios.</param>
/// <param name="Before">Base version; null where it had no such series.</param>
/// <param name="After">Proposal; null where the series is gone.</param>
/// <param name="Transition">What happened.</param>
public sealed record VerdictLine(
    string ExpectationId,
    string Title,
    string Why,
    string ScannerId,
    string SeriesTitle,
    string Condition,
    bool Paired,
    bool AtMost,
    double Limit,
    string Unit,
    VerdictState? Before,
    VerdictState? After,
    Transition Transition);

/// <summary>A verdict with what it rests on.</summary>
/// <param name="Verdict">Over the tissue draws.</param>
/// <param name="NominalHolds">Whether the nominal value meets the limit.</param>
/// <param name="Probability">Probability that the expectation holds, in [0, 1]; null where it cannot be predicted.</param>
/// <param name="Value">Nominal value; null where it cannot be predicted.</param>
public sealed record VerdictState(Verdict Verdict, bool NominalHolds, double? Probability, double? Value);
