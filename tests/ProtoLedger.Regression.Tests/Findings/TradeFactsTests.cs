using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Tests.Fixtures;

namespace ProtoLedger.Regression.Tests.Findings;

/// <summary>Facts of the trade through the whole prediction. All of them: common practice, no source.</summary>
public sealed class TradeFactsTests
{
    private static readonly VersionEvaluation Evaluation = new();

    private static string Expectation(string condition) => $$"""
        format: 1
        kind: expectations
        id: brain
        title: Brain
        protocol: brain
        expectations:
          - {id: e, title: e, why: e, series: axial-fluid-nulled-t2, observable: {name: residualRatio, tissue: csf, reference: white-matter}, conditions: [{{condition}}], basis: absolute, relation: atMost, limit: 0.5}
        """;

    private static readonly string FieldConditions = """
        format: 1
        kind: conditions
        id: brain
        title: Head
        conditions:
          - {name: cortex, title: sulci at the convexity, offResonance: {low: 0, high: 0}, b1Scale: {low: 0.85, high: 0.85}}
          - {name: ventricles, title: ventricles, offResonance: {low: 0, high: 0}, b1Scale: {low: 1.1, high: 1.1}}
          - {name: far, title: far from metal, offResonance: {low: 20, high: 20}, b1Scale: {low: 1, high: 1}}
          - {name: near-metal, title: near metal, offResonance: {low: 900, high: 900}, b1Scale: {low: 1, high: 1}}
          - {name: at-metal, title: at metal, offResonance: {low: 1600, high: 1600}, b1Scale: {low: 1, high: 1}}
        """;

    private static double Residual(string condition, EvaluationInput input) => Evaluation.Evaluate(input with
    {
        Conditions = Documents.Read<ProtoLedger.Protocols.Documents.ConditionsDocument>(FieldConditions),
        Expectations = Documents.Read<ProtoLedger.Protocols.Documents.ExpectationsDocument>(Expectation(condition)),
    }).Expectations[0].Nominal;

    [Fact]
    public void WrongRepetitionTime_LightsUpEveryFluidSpaceAlike()
    {
        var (right, wrong) = (Documents.Input(), Documents.Input().With(("/series/0/readout/RepetitionTime", 6000)));
        var (cortex, ventricles) = (Residual("cortex", wrong), Residual("ventricles", wrong));
        Assert.True(Residual("cortex", right) < 0.1 && Residual("ventricles", right) < 0.1);
        Assert.True(cortex > 0.5 && ventricles > 0.5);
        Assert.InRange(cortex / ventricles, 0.75, 1.33);
    }

    [Fact]
    public void OffResonanceNearMetal_LightsUpFluidLocally()
    {
        // A slab-selective adiabatic inversion a little wider than the slice: off resonance the slab shifts away from the slice.
        var protocol = Documents.Brain.Replace("InversionTime: 2404}", "InversionTime: 2404, pulse: slab, slabThickness: 1.3}", StringComparison.Ordinal);
        var scanner = Documents.Three.Replace(
            "pulses: {}", "pulses: {slab: {kind: hyperbolicSecant, duration: 10, beta: 800, mu: 4.9, peakB1: 700}}", StringComparison.Ordinal);
        var input = Documents.Input(scanner, protocol);
        var (far, near, at) = (Residual("far", input), Residual("near-metal", input), Residual("at-metal", input));
        Assert.True(far < 0.3, $"{far}");
        Assert.True(near > far + 0.3, $"{far} {near}");
        Assert.True(at > near, $"{near} {at}");
    }

    [Fact]
    public void LongRepetitionAndEchoTime_ShowT2_ShortOnesShowT1()
    {
        var result = Evaluation.Evaluate(Documents.Input().With(("/series/0/readout/RepetitionTime", 9500)));
        double At(string key) => result.Nominal[result.IndexOf(ObservableKey.Parse(key))];
        Assert.True(Math.Abs(At("axial-t1/weightingT1(white-matter)@nominal")) > 2 * Math.Abs(At("axial-t1/weightingT2(white-matter)@nominal")));
        Assert.True(Math.Abs(At("axial-fluid-nulled-t2/weightingT2(white-matter)@nominal")) > 2 * Math.Abs(At("axial-fluid-nulled-t2/weightingT1(white-matter)@nominal")));
    }
}
