using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Regression.Tests.Fixtures;

namespace ProtoLedger.Regression.Tests.Findings;

public sealed class InversionReachTests
{
    private const string Adiabatic = "pulse: {kind: hyperbolicSecant, duration: 10.24, beta: 800, mu: 4.9, peakB1: 700}, slabThickness: 1.6";
    private const string Sinc = "pulse: {kind: windowedSinc, flipAngle: 180, duration: 5.12, timeBandwidth: 4}, slabThickness: 1.6";

    private static readonly string NearMetal = Documents.Conditions.Replace(
        "offResonance: {low: -30, high: 30}, b1Scale: {low: 0.9, high: 1.1}", "offResonance: {low: -900, high: 900}, b1Scale: {low: 0.9, high: 1.1}", StringComparison.Ordinal);

    private static string With(string pulse) =>
        Documents.Brain.Replace("{kind: inversion, InversionTime: 2404}", $"{{kind: inversion, InversionTime: 2404, {pulse}}}", StringComparison.Ordinal);

    private static EvaluationInput Input(string pulse) => Documents.Input(protocol: With(pulse), conditions: NearMetal);

    private static ScannerAssessment Assess(EvaluationInput before, EvaluationInput after) =>
        ChangeAssessor.Assess(new VersionEvaluation(), [new(before, after)]).Scanners[0];

    /// <summary>The band of the secant is μβ/π = 1248 Hz; a windowed sinc of 5.12 ms and product 4 has 781 Hz and sloping edges.</summary>
    [Fact]
    public void Assess_AdiabaticSwappedForASinc_SaysWhereItFails()
    {
        var assessment = Assess(Input(Adiabatic), Input(Sinc));

        var finding = assessment.Findings.Single(f => f.Sentence.Contains("the inversion reaches less far", StringComparison.Ordinal));
        Assert.Equal(FindingDirection.Worse, finding.Direction);
        Assert.InRange(finding.Before!.Value, 400, 900);
        Assert.True(finding.After < finding.Before / 2);
        Assert.Contains("by shift of the slab at", finding.Sentence, StringComparison.Ordinal);
        Assert.Contains(assessment.Balance, b => b.What == "off-resonance that the inversion stands" && b.Unit == "Hz" && b.Direction == FindingDirection.Worse);
    }

    [Fact]
    public void Assess_AnotherInversionTimeWithTheSamePulse_SaysNothingOfIt() => Assert.DoesNotContain(
        Assess(Input(Adiabatic), Input(Adiabatic).With(("/series/0/preparations/0/InversionTime", 2300))).Balance, b => b.What == "off-resonance that the inversion stands");
}
