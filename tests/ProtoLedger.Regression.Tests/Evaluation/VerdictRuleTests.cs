using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Tests.Evaluation;

public sealed class VerdictRuleTests
{
    // Binomial standard error at 5 % with 400 draws: sqrt(0.05 · 0.95 / 400) = 0.010897; two of them 0.021794.
    [Theory]
    [InlineData(1, Verdict.Holds)]
    [InlineData(0.9719, Verdict.Holds)]
    [InlineData(0.9717, Verdict.Uncertain)]
    [InlineData(0.95, Verdict.Uncertain)]
    [InlineData(0.5, Verdict.Uncertain)]
    [InlineData(0.0283, Verdict.Uncertain)]
    [InlineData(0.0281, Verdict.Fails)]
    [InlineData(0, Verdict.Fails)]
    [InlineData(double.NaN, Verdict.NotPredictable)]
    public void Decide_Probability_LeavesTwoStandardErrorsAroundTheThresholds(double probability, Verdict verdict) =>
        Assert.Equal(verdict, VerdictRule.Decide(probability, 400));

    [Theory]
    [InlineData(0.6, LimitRelation.AtMost, Verdict.Holds)]
    [InlineData(0.61, LimitRelation.AtMost, Verdict.Fails)]
    [InlineData(0.6, LimitRelation.AtLeast, Verdict.Holds)]
    [InlineData(0.59, LimitRelation.AtLeast, Verdict.Fails)]
    [InlineData(double.NaN, LimitRelation.AtLeast, Verdict.NotPredictable)]
    public void Decide_Value_TheLimitItselfIsGood(double value, LimitRelation relation, Verdict verdict) =>
        Assert.Equal(verdict, VerdictRule.Decide(value, relation, 0.6));

    [Theory]
    [InlineData("s/residualRatio(csf,white-matter)@near-metal^")]
    [InlineData("s/signal(fat)@nominal")]
    [InlineData("s-2/scanTime@nominal")]
    [InlineData("s/signal(fat)@shim-edge_")]
    public void ObservableKey_TextForm_ReadsBack(string text) => Assert.Equal(text, ObservableKey.Parse(text).ToString());

    [Theory]
    [InlineData("")]
    [InlineData("s/signal")]
    [InlineData("signal@nominal")]
    [InlineData("s/@nominal")]
    public void ObservableKey_OtherText_IsRefused(string text) => Assert.Throws<FormatException>(() => ObservableKey.Parse(text));
}
