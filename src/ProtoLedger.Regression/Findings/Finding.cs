using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Findings;

/// <summary>One thing that an edit does, said in plain words.</summary>
/// <param name="Kind">What sort of finding.</param>
/// <param name="Direction">Whether it is for the better.</param>
/// <param name="Severity">Larger is worse; findings are listed by it.</param>
/// <param name="Scanner">Scanner identifier.</param>
/// <param name="Series">Series identifier.</param>
/// <param name="Sentence">The verdict in one sentence, with old, new and the cause.</param>
/// <param name="Observable">The number behind it, or null.</param>
/// <param name="Old">Before, in the observable's unit.</param>
/// <param name="New">After.</param>
/// <param name="OldWord">Brightness word before, or null.</param>
/// <param name="NewWord">Brightness word after, or null.</param>
/// <param name="Causes">Parameters that did it, largest first.</param>
/// <param name="WorseShare">Share of the tissue draws for which it is worse than before, in [0, 1]; NaN where no tissue enters.</param>
/// <param name="Expectation">Identifier of the expectation that it breaks or mends, or null.</param>
public sealed record Finding(
    FindingKind Kind,
    FindingDirection Direction,
    double Severity,
    string Scanner,
    string Series,
    string Sentence,
    ObservableKey? Observable,
    double Old,
    double New,
    string? OldWord,
    string? NewWord,
    IReadOnlyList<AttributionShare> Causes,
    double WorseShare,
    string? Expectation);

/// <summary>Sorts of findings.</summary>
public enum FindingKind
{
    /// <summary>A written expectation changed its verdict.</summary>
    Expectation,

    /// <summary>A tissue changed its brightness against a reference.</summary>
    Suppression,

    /// <summary>Two tissues are told apart better or worse.</summary>
    Contrast,

    /// <summary>Scan time, noise, RF power, sharpness, slices.</summary>
    Cost,
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
