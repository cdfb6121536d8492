using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Sampling;

namespace ProtoLedger.Regression.Tests.Sampling;

public sealed class TissueDrawsTests
{
    private static readonly MeasuredValue Value = new(850, 120, "", Evidence.Seen);

    // Standard normal tables, e.g. Abramowitz and Stegun table 26.5, and 16 digits from memory of the same constants.
    [Theory]
    [InlineData(0.5, 0)]
    [InlineData(0.95, 1.6448536269514722)]
    [InlineData(0.975, 1.9599639845400545)]
    [InlineData(0.05, -1.6448536269514722)]
    [InlineData(1e-10, -6.361340902404056)]
    public void NormalQuantile_KnownProbability_GivesTabulatedValue(double p, double z) =>
        Assert.Equal(z, NormalQuantile.At(p), 12);

    [Fact]
    public void LogNormal_ManyDraws_HaveTheCataloguesMeanAndSpread()
    {
        var draws = new TissueDraws(new SamplePlan(4096, 9)).LogNormal("white-matter", DrawnParameter.T1, Value);
        var mean = draws.Average();
        Assert.Equal(850, mean, 0.5);
        Assert.Equal(120, Math.Sqrt(draws.Average(d => (d - mean) * (d - mean))), 1.0);
    }

    [Fact]
    public void LogNormal_SameTissueOnAnotherScanner_MovesByItsMeanAlone()
    {
        var draws = new TissueDraws(SamplePlan.Default);
        var here = draws.LogNormal("white-matter", DrawnParameter.T1, Value);
        var there = draws.LogNormal("white-matter", DrawnParameter.T1, Value with { Mean = 1700, Sd = 240 });
        Assert.All(here.Zip(there), pair => Assert.Equal(2, pair.Second / pair.First, 12));
    }

    [Fact]
    public void LogNormal_TwoTissues_AreDrawnApart()
    {
        var draws = new TissueDraws(new SamplePlan(4096, 3));
        var (a, b) = (draws.LogNormal("a", DrawnParameter.T1, Value), draws.LogNormal("b", DrawnParameter.T1, Value));
        var correlation = a.Zip(b).Average(p => (p.First - 850) * (p.Second - 850)) / (120 * 120);
        Assert.InRange(correlation, -0.05, 0.05);
    }

    [Fact]
    public void Efficiency_WideSpread_StaysWithinZeroAndOne() =>
        Assert.All(new TissueDraws(SamplePlan.Default).Efficiency("adiabatic", 0.96, 0.1), f => Assert.InRange(f, 0, 1));

    [Fact]
    public void SamplePlan_TooFewDraws_IsRefused() =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new SamplePlan(255, 1));
}
