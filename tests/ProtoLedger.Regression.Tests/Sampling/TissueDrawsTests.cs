using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Sampling;

namespace ProtoLedger.Regression.Tests.Sampling;

public sealed class TissueDrawsTests
{
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
        var draws = new TissueDraws(new SamplePlan(4096, 9)).LogNormal("white-matter", DrawnParameter.T1, 850, 120);
        var mean = draws.Average();
        Assert.Equal(850, mean, 0.5);
        Assert.Equal(120, Math.Sqrt(draws.Average(d => (d - mean) * (d - mean))), 1.0);
    }

    [Fact]
    public void LogNormal_SameTissueOnAnotherScanner_MovesByItsMeanAlone()
    {
        var draws = new TissueDraws(SamplePlan.Default);
        var here = draws.LogNormal("white-matter", DrawnParameter.T1, 850, 120);
        var there = draws.LogNormal("white-matter", DrawnParameter.T1, 1700, 240);
        Assert.All(here.Zip(there), pair => Assert.Equal(2, pair.Second / pair.First, 12));
    }

    [Fact]
    public void LogNormal_TwoTissues_AreDrawnApart()
    {
        var draws = new TissueDraws(new SamplePlan(4096, 3));
        var (a, b) = (draws.LogNormal("a", DrawnParameter.T1, 850, 120), draws.LogNormal("b", DrawnParameter.T1, 850, 120));
        var correlation = a.Zip(b).Average(p => (p.First - 850) * (p.Second - 850)) / (120 * 120);
        Assert.InRange(correlation, -0.05, 0.05);
    }

    [Fact]
    public void EfficiencyOffset_OtherSpread_ScalesTheSameDraws()
    {
        var draws = new TissueDraws(SamplePlan.Default);
        Assert.All(draws.EfficiencyOffset("adiabatic", 0.02).Zip(draws.EfficiencyOffset("adiabatic", 0.04)), p => Assert.Equal(2 * p.First, p.Second, 15));
    }

    [Fact]
    public void SamplePlan_TooFewDraws_IsRefused() =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new SamplePlan(255, 1));
}
