using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using static ProtoLedger.Physics.Tests.Predictions;

namespace ProtoLedger.Physics.Tests.Prediction;

/// <summary>
/// Check values of gradient echoes (G…), computed outside this project. Sources: Ernst, Anderson, Rev Sci Instrum 1966;37:93; Freeman, Hill,
/// J Magn Reson 1971;4:366; Scheffler, Lehnhardt, Eur Radiol 2003;13:2409 (from memory); Marques et al., NeuroImage 2010;49:1271, appendix (seen quoted).
/// </summary>
public sealed class GradientEchoCheckValues
{
    [Theory]
    [InlineData("G1", 10, 830, 8.87618, 0.0776146)]
    [InlineData("G2", 100, 830, 27.5642, 0.245292)]
    [InlineData("G3", 5, 1000, 5.72480, 0.0499999)]
    [InlineData("G4", 20, 4300, 5.52181, 0.0482242)]
    [InlineData("G5", 10, 260, 15.7893, 0.138667)]
    [InlineData("G6", 3.5, 1664, 3.71486, 0.0324297)]
    public void Spoiled_AtTheErnstAngle_IsLargestAndTheCheckValue(string number, double repetition, double t1, double angle, double expected)
    {
        double Signal(double flip) => Signed(Series(new SpoiledGradientEcho(repetition, 0, flip, [])), Lane(t1, 50));

        Assert.NotEmpty(number);
        Close(expected, Signal(angle));
        Assert.True(Signal(angle) > Signal(angle * 1.02) && Signal(angle) > Signal(angle * 0.98));
    }

    [Theory]
    [InlineData(15, 10, 830, 0.0679109)]
    [InlineData(30, 100, 830, 0.244338)]
    [InlineData(15, 10, 1330, 0.0469313)]
    [InlineData(15, 10, 382, 0.113285)]
    [InlineData(70, 100, 800, 0.158152)]
    public void Spoiled_G7_IsTheCheckValue(double flip, double repetition, double t1, double expected) =>
        Close(expected, Signed(Series(new SpoiledGradientEcho(repetition, 0, flip, [])), Lane(t1, 50)));

    [Theory]
    [InlineData("G10", 60, 1000, 200, 0.218676, 0.216500)]
    [InlineData("G11", 45, 1200, 50, 0.0842085, 0.0809066)]
    [InlineData("G12", 60, 1441, 254, 0.201276, 0.199697)]
    [InlineData("G13", 40, 382, 68, 0.214837, 0.208610)]
    public void Balanced_OnResonance_IsTheCheckValue(string number, double flip, double t1, double t2, double after, double middle)
    {
        Assert.NotEmpty(number);
        Close(after, Signed(Series(new BalancedGradientEcho(4, 0, flip)), Lane(t1, t2)));
        Close(middle, Signed(Series(new BalancedGradientEcho(4, 2, flip)), Lane(t1, t2)));
    }

    [Theory]
    [InlineData(1000, 200, 48.1897, 0.223607)]
    [InlineData(1200, 50, 23.0739, 0.102062)]
    [InlineData(4300, 2000, 68.5875, 0.340997)]
    public void Balanced_G14ShortRepetition_IsLargestAtTheCheckAngle(double t1, double t2, double angle, double limit)
    {
        double Signal(double flip) => Signed(Series(new BalancedGradientEcho(0.001, 0, flip)), Lane(t1, t2));

        Close(limit, Signal(angle), 1e-4);
        Assert.True(Signal(angle) > Signal(angle * 1.05) && Signal(angle) > Signal(angle * 0.95));
    }

    [Theory]
    [InlineData("G20", 830, 1, 0.763060, -0.252176, 0.301969, 0.0472384)]
    [InlineData("G21", 1330, 1, 0.597134, -0.290045, 0.175197, 0.0274068)]
    [InlineData("G22", 1607, 1, 0.529259, -0.281532, 0.137279, 0.0214751)]
    [InlineData("G23", 4300, 1, 0.244153, -0.164636, 0.0348657, 0.00545419)]
    [InlineData("G24", 382, 1, 0.948367, 0.0736138, 0.565035, 0.0883910)]
    [InlineData("G25", 830, 0.96, 0.763275, -0.230644, 0.305415, 0.0477775)]
    public void InversionPreparedTrain_LinearOrder_IsTheCheckValue(
        string number, double t1, double efficiency, double atStart, double first, double centre, double signal)
    {
        Assert.NotEmpty(number);
        var train = new SpoiledGradientEchoTrain(2300, 0, 9, 7, 176, EncodingOrder.Linear);
        var inversion = new Inversion(900, InversionTimeEnd.KSpaceCentre, new EfficiencyInversion("eta", efficiency));
        var table = SignalPredictor.Predict(Series(train, inversion), Ideal, Lane(t1, 50), PredictionOutputs.AllEchoes);

        Close(atStart, table.LongitudinalAtStart[0]);
        Close(first, table.Echoes[0] / Math.Sin(9 * Math.PI / 180));
        Close(centre, table.LongitudinalBeforeExcitation[0]);
        Close(signal, table.Signed[0]);
    }

    /// <summary>G26: a train drives the magnetisation with T1* to M0* (Deichmann, Haase, J Magn Reson 1992;96:608, from memory).</summary>
    [Theory]
    [InlineData(9, 7, 830, 336.186, 0.407554)]
    [InlineData(9, 7, 1330, 396.573, 0.300024)]
    [InlineData(8, 8, 1200, 486.433, 0.407344)]
    public void Train_G26_IsDrivenToTheCheckValue(double flip, double spacing, double t1, double drivenT1, double drivenM0)
    {
        var train = new SpoiledGradientEchoTrain(1000 * spacing, 0, flip, spacing, 1000, EncodingOrder.Linear);
        var echoes = Echoes(FirstShot(train), Lane(t1, 50)).Select(e => e / Math.Sin(flip * Math.PI / 180)).ToArray();

        Close(drivenM0, echoes[^1]);
        Close(drivenT1, -spacing / Math.Log((echoes[11] - drivenM0) / (echoes[10] - drivenM0)), 1e-4);
    }

    /// <summary>RF spoiling at 117° and 50° comes near ideal spoiling for a short T2, and full spoiling is its limit as T2 goes to zero.</summary>
    [Theory]
    [InlineData(50)]
    [InlineData(117)]
    public void RfSpoiled_VeryShortT2_IsIdealSpoiling(double increment)
    {
        var spoiled = Signed(Series(new SpoiledGradientEcho(10, 0, 15, [], increment)), Lane(830, 0.2));

        Assert.Equal(Signed(Series(new SpoiledGradientEcho(10, 0, 15, [])), Lane(830, 0.2)), spoiled, 1e-12);
    }

    /// <summary>The cut-off order: twice as many orders change nothing above the bound E2^{2K} = e⁻⁴⁰.</summary>
    [Fact]
    public void RfSpoiled_LongerT2InTheTable_LeavesALaneAlone()
    {
        var series = Series(new SpoiledGradientEcho(8, 2, 12, [], 117));
        var lanes = LaneTable.FromGrid([new Tissue("a", 900, 80, 80, 1), new Tissue("b", 4300, 2000, 2000, 1)], [new FieldPoint()]);

        Assert.Equal(Signed(series, Lane(900, 80)), SignalPredictor.Predict(series, Ideal, lanes).Signed[0]);
    }
}
