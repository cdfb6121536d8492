using ProtoLedger.Regression.Sampling;

namespace ProtoLedger.Regression.Tests.Sampling;

public sealed class ScrambledSobolTests
{
    // Sobol's first two dimensions form a (0, 2)-sequence in base 2 and Owen's scrambling keeps that
    // (Owen, J. Complexity 1998;14:466): each of 256 equal boxes of every shape holds exactly one of 256 points.
    [Fact]
    public void Fill_TwoDimensions_PutOnePointInEveryElementaryBox()
    {
        var (x, y) = (new double[256], new double[256]);
        ScrambledSobol.Fill(77, 0, x);
        ScrambledSobol.Fill(77, 1, y);
        for (var bits = 0; bits <= 8; bits++)
        {
            var boxes = x.Zip(y).Select(p => ((int)(p.First * (1 << bits)), (int)(p.Second * (1 << (8 - bits))))).Distinct();
            Assert.Equal(256, boxes.Count());
        }
    }

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Fill_FurtherDimensions_AreStratified(int dimension)
    {
        var x = new double[512];
        ScrambledSobol.Fill(5, dimension, x);
        Assert.Equal(512, x.Select(v => (int)(v * 512)).Distinct().Count());
    }

    [Fact]
    public void Fill_OtherSeed_GivesOtherPointsInOtherOrder()
    {
        var (a, b) = (new double[64], new double[64]);
        ScrambledSobol.Fill(1, 0, a);
        ScrambledSobol.Fill(2, 0, b);
        Assert.NotEqual(a, b);
        Assert.Empty(a.Intersect(b));
    }
}
