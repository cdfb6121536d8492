using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;

namespace ProtoLedger.Reports.Wording;

/// <summary>A verdict as a shape and a word, so that it is read without colour.</summary>
/// <param name="Shape">One character.</param>
/// <param name="Word">The verdict.</param>
/// <param name="Tone">Style class: bad, good, open or plain.</param>
internal sealed record Mark(string Shape, string Word, string Tone)
{
    private static readonly Mark Worse = new("▼", "worse", "bad");
    private static readonly Mark Better = new("▲", "better", "good");
    private static readonly Mark Same = new("=", "the same", "plain");
    private static readonly Mark Different = new("◆", "different", "plain");
    private static readonly Mark NewlyFails = new("✕", "newly fails", "bad");
    private static readonly Mark StillFails = new("✕", "still fails", "bad");
    private static readonly Mark NewlyUncertain = new("?", "newly uncertain", "open");
    private static readonly Mark StillUncertain = new("?", "still uncertain", "open");
    private static readonly Mark NewlyHolds = new("✓", "newly holds", "good");
    private static readonly Mark StillHolds = new("✓", "still holds", "good");
    private static readonly Mark NotComparable = new("–", "not comparable", "plain");
    private static readonly Mark HoldsNow = new("✓", "holds", "good");
    private static readonly Mark FailsNow = new("✕", "fails", "bad");
    private static readonly Mark UncertainNow = new("?", "uncertain", "open");
    private static readonly Mark NotPredictable = new("–", "not predictable", "plain");

    /// <summary>A value of weak evidence.</summary>
    public static Mark Weak { get; } = new("?", "weak", "open");

    /// <summary>Every mark that a report can show.</summary>
    public static IReadOnlyList<Mark> All { get; } =
    [
        Worse, Better, Same, Different, NewlyFails, StillFails, NewlyUncertain, StillUncertain, NewlyHolds, StillHolds,
        NotComparable, HoldsNow, FailsNow, UncertainNow, NotPredictable, Weak,
    ];

    /// <summary>Mark of a direction.</summary>
    public static Mark Of(FindingDirection direction) => direction switch
    {
        FindingDirection.Worse => Worse,
        FindingDirection.Better => Better,
        FindingDirection.Same => Same,
        _ => Different,
    };

    /// <summary>Mark of a transition.</summary>
    public static Mark Of(Transition transition) => transition switch
    {
        Transition.NewlyFails => NewlyFails,
        Transition.StillFails => StillFails,
        Transition.NewlyUncertain => NewlyUncertain,
        Transition.StillUncertain => StillUncertain,
        Transition.NewlyHolds => NewlyHolds,
        Transition.StillHolds => StillHolds,
        _ => NotComparable,
    };

    /// <summary>Mark of a verdict.</summary>
    public static Mark Of(Verdict verdict) => verdict switch
    {
        Verdict.Holds => HoldsNow,
        Verdict.Fails => FailsNow,
        Verdict.Uncertain => UncertainNow,
        _ => NotPredictable,
    };

    /// <summary>The mark in Markdown.</summary>
    public override string ToString() => $"**{Shape} {Word}**";
}
