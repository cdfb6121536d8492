using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Tests.Drift;

public sealed class RunDifferenceTests
{
    private static readonly ObservableKey A = new("s", "signal", "csf", null, "nominal");
    private static readonly ObservableKey B = new("s", "scanTime", null, null, "nominal");

    private static PackedPrediction Prediction(ObservableKey[] keys, double[] values, params (string, Verdict)[] verdicts) => new(
        keys, values, [.. values], [.. values], [.. verdicts.Select(v => v.Item1)], [.. verdicts.Select(v => new VerdictRecord(v.Item2, v.Item2, 0.5))]);

    [Theory]
    [InlineData(1, 1, false)]
    [InlineData(1, 1 + 1.9e-9, false)]
    [InlineData(1, 1 + 2.1e-9, true)]
    [InlineData(0, 0.9e-9, false)]
    [InlineData(0, 1.1e-9, true)]
    [InlineData(1e6, 1e6 + 0.0005, false)]
    [InlineData(double.NaN, double.NaN, false)]
    [InlineData(double.NaN, 0, true)]
    public void HasMoved_AroundTheTolerance_IsExact(double old, double now, bool moved) =>
        Assert.Equal(moved, RunDifference.HasMoved(old, now));

    [Fact]
    public void Between_ChangedAddedAndGone_AreAllMoved()
    {
        var difference = RunDifference.Between(
            Prediction([A, B], [0.1, 180]),
            Prediction([A, new("s", "signal", "csf", null, "near-metal")], [0.2, 0.3]));
        Assert.Equal(["s/scanTime@nominal", "s/signal(csf)@near-metal", "s/signal(csf)@nominal"], difference.Moved.Select(m => m.Observable.ToString()));
        Assert.True(double.IsNaN(difference.Moved[0].NewNominal));
    }

    [Fact]
    public void Between_SameNumbersInOtherOrder_NothingMoved() =>
        Assert.False(RunDifference.Between(Prediction([A, B], [1, 2]), Prediction([B, A], [2, 1])).AnyMoved);

    [Theory]
    [InlineData(Verdict.Holds, Verdict.Holds, Transition.StillHolds)]
    [InlineData(Verdict.Holds, Verdict.Fails, Transition.NewlyFails)]
    [InlineData(Verdict.Uncertain, Verdict.Fails, Transition.NewlyFails)]
    [InlineData(Verdict.Fails, Verdict.Holds, Transition.NewlyHolds)]
    [InlineData(Verdict.Uncertain, Verdict.Holds, Transition.NewlyHolds)]
    [InlineData(Verdict.Fails, Verdict.Fails, Transition.StillFails)]
    [InlineData(Verdict.Holds, Verdict.Uncertain, Transition.NewlyUncertain)]
    [InlineData(Verdict.Fails, Verdict.Uncertain, Transition.NewlyUncertain)]
    [InlineData(Verdict.Uncertain, Verdict.Uncertain, Transition.StillUncertain)]
    [InlineData(Verdict.Holds, Verdict.NotPredictable, Transition.NotComparable)]
    public void Between_Verdicts_GiveTheTransition(Verdict old, Verdict now, Transition transition) =>
        Assert.Equal(transition, RunDifference.Between(Prediction([], [], ("e", old)), Prediction([], [], ("e", now))).Transitions[0].Transition);

    [Fact]
    public void Between_NewAndGoneExpectations_AreNotComparable() =>
        Assert.All(
            RunDifference.Between(Prediction([], [], ("a", Verdict.Fails)), Prediction([], [], ("b", Verdict.Fails))).Transitions,
            t => Assert.Equal(Transition.NotComparable, t.Transition));
}
