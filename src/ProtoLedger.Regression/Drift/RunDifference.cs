using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Drift;

/// <summary>What differs between two predictions: of one protocol version in two runs, or of two versions.</summary>
/// <param name="Moved">Observables that both have and whose nominal value or interval moved, then those that only one has; ordinal order of the keys.</param>
/// <param name="Transitions">One for each expectation of either side, those of the newer first.</param>
public sealed record RunDifference(IReadOnlyList<MovedObservable> Moved, IReadOnlyList<ExpectationTransition> Transitions)
{
    /// <summary>A difference up to this much counts as none, absolute part.</summary>
    public const double AbsoluteTolerance = 1e-9;

    /// <summary>A difference up to this share of the larger magnitude counts as none, in addition.</summary>
    public const double RelativeTolerance = 1e-9;

    /// <summary>True when any number or verdict moved.</summary>
    public bool AnyMoved => Moved.Count > 0 || Transitions.Any(t => t.Old != t.New);

    /// <summary>Whether two numbers differ by more than 1e-9 absolute plus 1e-9 relative; NaN equals NaN alone.</summary>
    /// <param name="old">One number.</param>
    /// <param name="now">The other.</param>
    public static bool HasMoved(double old, double now) => double.IsNaN(old) || double.IsNaN(now)
        ? double.IsNaN(old) != double.IsNaN(now)
        : old != now && !(Math.Abs(old - now) <= AbsoluteTolerance + RelativeTolerance * Math.Max(Math.Abs(old), Math.Abs(now)));

    /// <summary>Compares two predictions.</summary>
    /// <param name="old">The older.</param>
    /// <param name="now">The newer.</param>
    public static RunDifference Between(PackedPrediction old, PackedPrediction now)
    {
        ArgumentNullException.ThrowIfNull(old);
        ArgumentNullException.ThrowIfNull(now);
        var moved = new List<MovedObservable>();
        var oldAt = new Dictionary<ObservableKey, int>(old.Observables.Count);
        for (var i = 0; i < old.Observables.Count; i++)
            oldAt[old.Observables[i]] = i;
        for (var i = 0; i < now.Observables.Count; i++)
        {
            if (!oldAt.Remove(now.Observables[i], out var k))
                moved.Add(new(now.Observables[i], double.NaN, now.Nominal[i]));
            else if (HasMoved(old.Nominal[k], now.Nominal[i]) || HasMoved(old.Low[k], now.Low[i]) || HasMoved(old.High[k], now.High[i]))
                moved.Add(new(now.Observables[i], old.Nominal[k], now.Nominal[i]));
        }

        moved.AddRange(oldAt.Select(gone => new MovedObservable(gone.Key, old.Nominal[gone.Value], double.NaN)));
        return new([.. moved.OrderBy(m => m.Observable)], Follow(old, now));
    }

    /// <summary>Compares two fresh results.</summary>
    /// <param name="old">The older.</param>
    /// <param name="now">The newer.</param>
    public static RunDifference Between(EvaluationResult old, EvaluationResult now) =>
        Between(PackedPrediction.Of(old), PackedPrediction.Of(now));

    private static List<ExpectationTransition> Follow(PackedPrediction old, PackedPrediction now)
    {
        var oldVerdicts = old.Expectations.Zip(old.Verdicts).ToDictionary(pair => pair.First, pair => pair.Second);
        var transitions = new List<ExpectationTransition>();
        foreach (var (id, verdict) in now.Expectations.Zip(now.Verdicts))
        {
            oldVerdicts.Remove(id, out var before);
            transitions.Add(new(id, VerdictRule.Between(before?.Verdict, verdict.Verdict), before, verdict));
        }

        transitions.AddRange(oldVerdicts.Select(gone => new ExpectationTransition(gone.Key, Transition.NotComparable, gone.Value, null)));
        return transitions;
    }
}

/// <summary>A number that moved.</summary>
/// <param name="Observable">Which.</param>
/// <param name="OldNominal">NaN where the older side has none.</param>
/// <param name="NewNominal">NaN where the newer side has none.</param>
public sealed record MovedObservable(ObservableKey Observable, double OldNominal, double NewNominal);

/// <summary>What became of the verdict on one expectation.</summary>
/// <param name="ExpectationId">Identifier within its document.</param>
/// <param name="Transition">What became of it.</param>
/// <param name="Old">Null where the expectation is new.</param>
/// <param name="New">Null where the expectation is gone.</param>
public sealed record ExpectationTransition(string ExpectationId, Transition Transition, VerdictRecord? Old, VerdictRecord? New);

/// <summary>A stored verdict.</summary>
/// <param name="Verdict">Over the draws.</param>
/// <param name="NominalVerdict">At the means.</param>
/// <param name="Probability">Of holding; NaN where not predictable.</param>
public sealed record VerdictRecord(Verdict Verdict, Verdict NominalVerdict, double Probability);
