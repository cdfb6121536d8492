using ProtoLedger.Physics.Acquisition;
using static ProtoLedger.Physics.Tests.Predictions;

namespace ProtoLedger.Physics.Tests.Prediction;

/// <summary>
/// Check values of echo trains (F…), computed outside this project with isochromats and by phase graph, equal to 5·10⁻¹⁶ there.
/// Sources: Hennig, J Magn Reson 1988;78:397; Hennig, Scheffler, Magn Reson Med 2000;44:983; Alsop, Magn Reson Med 1997;37:176; Weigel,
/// J Magn Reson Imaging 2015;41:266 (all from memory).
/// </summary>
public sealed class EchoTrainCheckValues
{
    /// <summary>Relaxation times at which nothing decays within a train.</summary>
    private const double Endless = 1e6;

    public static TheoryData<string, double, double[]> Amplitudes() => new()
    {
        { "F1", 180, [1, 1, 1, 1, 1, 1, 1, 1] },
        { "F2", 150, [0.933013, 0.995513, 0.941386, 0.984355, 0.953909, 0.971975, 0.964786, 0.963611] },
        { "F3", 120, [0.750000, 0.937500, 0.843750, 0.855469, 0.884766, 0.856934, 0.862061, 0.875290] },
        { "F4", 90, [0.500000, 0.750000, 0.750000, 0.687500, 0.687500, 0.718750, 0.718750, 0.699219] },
        { "F5", 60, [0.250000, 0.437500, 0.531250, 0.542969, 0.513672, 0.485840, 0.480713, 0.493942] },
        { "F6", 30, [0.0669873, 0.129487, 0.183614, 0.226583, 0.257029, 0.275095, 0.282284, 0.281109] },
    };

    [Theory]
    [MemberData(nameof(Amplitudes))]
    public void Echoes_WithoutRelaxation_AreTheCheckValues(string number, double angle, double[] expected)
    {
        Assert.NotEmpty(number);
        var echoes = Echoes(Train(0.001, expected.Length, [angle]), Lane(Endless, Endless));
        for (var i = 0; i < expected.Length; i++)
            Close(expected[i], echoes[i]);
    }

    [Theory]
    [InlineData(150, 0.965926)]
    [InlineData(120, 0.866025)]
    [InlineData(90, 0.707107)]
    [InlineData(60, 0.500000)]
    [InlineData(30, 0.258819)]
    public void Echoes_F7LongTrain_SettleAtTheSineOfHalfTheAngle(double angle, double expected)
    {
        var echoes = Echoes(Train(0.0001, 400, [angle]), Lane(Endless, Endless));

        Assert.Equal(expected, echoes[200..].Average(), 2e-3);
    }

    [Theory]
    [InlineData(150, 0.982668)]
    [InlineData(120, 0.928203)]
    [InlineData(90, 0.828427)]
    [InlineData(60, 0.666667)]
    [InlineData(30, 0.411208)]
    public void Echoes_F8FirstPulseHalfway_SettleHigher(double angle, double expected)
    {
        var echoes = Echoes(Train(0.0001, 400, [90 + angle / 2, .. Enumerable.Repeat(angle, 399)]), Lane(Endless, Endless));

        Assert.Equal(expected, echoes[300..].Average(), 1e-3);
    }

    [Theory]
    [InlineData(120, 0.933013, 0.916266, 0.941386, 0.919406)]
    [InlineData(90, 0.853553, 0.780330, 0.853553, 0.835248)]
    [InlineData(60, 0.750000, 0.562500, 0.656250, 0.691406)]
    public void Echoes_F9FirstPulseHalfway_AreTheCheckValues(double angle, double e1, double e2, double e3, double e4)
    {
        var echoes = Echoes(Train(0.001, 4, [90 + angle / 2, angle, angle, angle]), Lane(Endless, Endless));

        Assert.All(echoes.Zip([e1, e2, e3, e4]), pair => Close(pair.Second, pair.First));
    }

    public static TheoryData<string, double, double, double, double, double[]> Relaxing() => new()
    {
        { "F20", 180, 1000, 100, 10, [0.904837, 0.818731, 0.740818, 0.670320, 0.606531, 0.548812, 0.496585, 0.449329, 0.406570, 0.367879] },
        { "F21", 120, 1000, 100, 10, [0.678628, 0.796474, 0.636915, 0.606876, 0.563645, 0.508612, 0.457692, 0.438324, 0.381906, 0.361844] },
        { "F22", 60, 1000, 100, 10, [0.226209, 0.387108, 0.434035, 0.423303, 0.368500, 0.332037, 0.302958, 0.298315, 0.284632, 0.273827] },
        {
            "F23", 120, 830, 80, 8,
            [0.678628, 0.796595, 0.636959, 0.607021, 0.563754, 0.508780, 0.457811, 0.438526, 0.382035, 0.362046, 0.325804, 0.303040]
        },
    };

    [Theory]
    [MemberData(nameof(Relaxing))]
    public void Echoes_WithRelaxation_AreTheCheckValues(string number, double angle, double t1, double t2, double spacing, double[] expected)
    {
        Assert.NotEmpty(number);
        var echoes = Echoes(Train(spacing, expected.Length, [angle]), Lane(t1, t2));
        for (var i = 0; i < expected.Length; i++)
            Close(expected[i], echoes[i]);
    }

    /// <summary>X4: at 180° the echoes decay with T2 alone, whatever T1 is. X6: only ratios of times enter.</summary>
    [Fact]
    public void Echoes_AllTimesDoubled_AreTheSame()
    {
        var once = Echoes(Series(new EchoTrain(900, 30, 90, 10, 6, [130]), Inversion(300)), Lane(700, 60));
        var twice = Echoes(Series(new EchoTrain(1800, 60, 90, 20, 6, [130]), Inversion(600)), Lane(1400, 120));

        Assert.All(once.Zip(twice), pair => Assert.Equal(pair.First, pair.Second, 1e-14));
        Assert.Equal(Math.Exp(-0.5), Echoes(Train(10, 5, [180]), Lane(300, 100))[4], 1e-14);
    }

    private static Series Train(double spacing, int count, double[] angles) =>
        FirstShot(new EchoTrain(count * spacing, spacing, 90, spacing, count, angles));
}
