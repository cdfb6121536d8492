using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Regression.Evaluation;

/// <summary>From a probability to a verdict, and from two verdicts to a transition.</summary>
public static class VerdictRule
{
    /// <summary>Probability of holding from which an expectation holds; that of failing is its complement.</summary>
    public const double Holding = 0.95;

    /// <summary>Standard error of a probability of 5 % or 95 % counted over so many independent draws; low-discrepancy draws do better.</summary>
    /// <param name="samples">Number of draws, ≥ 1.</param>
    public static double StandardError(int samples) => Math.Sqrt(Holding * (1 - Holding) / samples);

    /// <summary>Holds above 95 %, fails below 5 %, each by more than two standard errors; uncertain otherwise.</summary>
    /// <param name="probability">Share of the draws for which the limit holds, in [0, 1]; NaN where it cannot be predicted.</param>
    /// <param name="samples">Number of draws.</param>
    public static Verdict Decide(double probability, int samples)
    {
        if (double.IsNaN(probability))
            return Verdict.NotPredictable;
        var margin = 2 * StandardError(samples);
        if (probability > Holding + margin)
            return Verdict.Holds;
        return probability < 1 - Holding - margin ? Verdict.Fails : Verdict.Uncertain;
    }

    /// <summary>Whether one value meets a limit; NaN is not predictable.</summary>
    /// <param name="value">The value.</param>
    /// <param name="relation">Which side of the limit is good; the limit itself is.</param>
    /// <param name="limit">The limit.</param>
    public static Verdict Decide(double value, LimitRelation relation, double limit) =>
        double.IsNaN(value) ? Verdict.NotPredictable : Meets(value, relation, limit) ? Verdict.Holds : Verdict.Fails;

    /// <summary>What became of a verdict; null where the expectation was not there.</summary>
    /// <param name="old">Before.</param>
    /// <param name="now">After.</param>
    public static Transition Between(Verdict? old, Verdict? now) => (old, now) switch
    {
        (null or Verdict.NotPredictable, _) or (_, null or Verdict.NotPredictable) => Transition.NotComparable,
        (Verdict.Holds, Verdict.Holds) => Transition.StillHolds,
        (Verdict.Fails, Verdict.Fails) => Transition.StillFails,
        (Verdict.Uncertain, Verdict.Uncertain) => Transition.StillUncertain,
        (_, Verdict.Fails) => Transition.NewlyFails,
        (_, Verdict.Holds) => Transition.NewlyHolds,
        _ => Transition.NewlyUncertain,
    };

    internal static bool Meets(double value, LimitRelation relation, double limit) =>
        relation == LimitRelation.AtMost ? value <= limit : value >= limit;
}
