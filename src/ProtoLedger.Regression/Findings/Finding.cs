using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Findings;

/// <summary>One thing that an edit does on one scanner, said in plain words.</summary>
/// <param name="Kind">What sort of finding.</param>
/// <param name="Direction">Whether it is for the better.</param>
/// <param name="Severity">Larger is worse; findings are listed by it.</param>
/// <param name="ScannerId">Scanner.</param>
/// <param name="SeriesId">Series.</param>
/// <param name="SeriesTitle">Title of the series.</param>
/// <param name="Sentence">The verdict in one sentence, with old, new and the cause; it names neither series nor scanner.</param>
/// <param name="Observable">The number behind it, or null.</param>
/// <param name="Subject">The tissue in plain words, or null.</param>
/// <param name="Reference">The second tissue in plain words, or null.</param>
/// <param name="Before">Nominal value before, in <paramref name="Unit"/>; null where there was none.</param>
/// <param name="After">Nominal value after; null where there is none.</param>
/// <param name="Unit">ms, px, s; empty for ratios and relative numbers.</param>
/// <param name="Causes">Parameters that did it, largest first.</param>
/// <param name="Change">Signed change that the causes' shares add up to; NaN where there is none.</param>
/// <param name="Share">Share of the tissue draws for which the change has this direction, in [0, 1]; null where no tissue enters.</param>
/// <param name="Condition">Title of the B0/B1 condition at which the numbers stand; empty for the nominal one.</param>
/// <param name="Transition">What happened to the written expectation; null where none speaks of it.</param>
/// <param name="ExpectationId">The expectation, or null.</param>
/// <param name="ExpectationTitle">In words, or null.</param>
/// <param name="Limit">Its limit, or null.</param>
/// <param name="ProbabilityHolds">Probability that it holds after the edit, or null.</param>
/// <param name="ReferenceMoved">True where the reference tissue itself changed by more than 5 %, so that the ratio alone misleads.</param>
public sealed record Finding(
    FindingKind Kind,
    FindingDirection Direction,
    double Severity,
    string ScannerId,
    string SeriesId,
    string SeriesTitle,
    string Sentence,
    ObservableKey? Observable,
    string? Subject,
    string? Reference,
    double? Before,
    double? After,
    string Unit,
    IReadOnlyList<AttributionShare> Causes,
    double Change,
    double? Share,
    string Condition,
    Transition? Transition,
    string? ExpectationId,
    string? ExpectationTitle,
    double? Limit,
    double? ProbabilityHolds,
    bool ReferenceMoved);

/// <summary>Sorts of findings.</summary>
public enum FindingKind
{
    /// <summary>A tissue changed its brightness against a reference, or a written expectation on it its verdict.</summary>
    Suppression,

    /// <summary>Two tissues are told apart better or worse.</summary>
    Contrast,

    /// <summary>The reference tissue itself gets brighter or darker.</summary>
    Signal,

    /// <summary>Scan time, noise, RF power, sharpness, slices.</summary>
    Cost,

    /// <summary>A series was added or removed, or can no longer be predicted.</summary>
    Series,
}

/// <summary>Whether a change is for the better.</summary>
public enum FindingDirection
{
    /// <summary>Better.</summary>
    Better,

    /// <summary>Worse.</summary>
    Worse,

    /// <summary>No change that counts.</summary>
    Same,

    /// <summary>Different, neither better nor worse by itself.</summary>
    Different,
}
