using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.Pulses;
using static ProtoLedger.Physics.Tests.Signals;

namespace ProtoLedger.Physics.Tests.Edits;

/// <summary>Edits of weighting, sharpness, noise and time: direction, cause and magnitude by hand, independent of the engine.</summary>
public sealed class ContrastEditsTests
{
    /// <summary>Edit 12: echo time stretched from 80 to 120 ms: grey over white grows by exp(40 (1/T2w − 1/T2g)).</summary>
    [Fact]
    public void EchoTimeStretched_RaisesT2Contrast()
    {
        Series At(double te) => Of(new SpinEcho(5000, te, 90, 180));
        double Ratio(double te) => Contrast.Ratio(Signed(At(te), Grey3), Signed(At(te), White3));
        double Hand(double te) => Grey3.ProtonDensity * ByHand.SpinEcho(Grey3.T1, Grey3.T2, 5000, te) / White3.ProtonDensity / ByHand.SpinEcho(White3.T1, White3.T2, 5000, te);

        Approximately.Relative(Hand(120), Ratio(120), 1e-9);
        Approximately.Relative(Math.Exp(40 * (1 / 72.0 - 1 / 88.0)), Ratio(120) / Ratio(80), 0.01);
    }

    /// <summary>Edit 13: refocusing lowered from 180° to 120°: without relaxation the first echoes are sin²60° = 0.75 and sin⁴60° + ½ sin²120° = 0.9375 (Hennig 1988, from memory).</summary>
    [Theory]
    [InlineData(1, 0.75)]
    [InlineData(2, 0.9375)]
    public void RefocusingLowered_CostsSignal_AndPower(int echo, double expected)
    {
        var lasting = new Tissue("lasting", 1e6, 1e6, 1e6, 1);
        Series At(double angle) => Of(new EchoTrain(1000, 10 * echo, 90, 10, 2, [angle])) with { Timing = new SeriesTiming(State: StartState.FirstShot) };

        Approximately.Absolute(1, Signed(At(180), lasting), 5e-5);
        Approximately.Absolute(expected, Signed(At(120), lasting), 5e-5);
        Assert.True(RelativeRfPower.Between(At(180), 3, At(120), 3) < 0.6);
    }

    /// <summary>Edit 14: echo train doubled: half the scan time; the blur of T2 80 ms over 200 instead of 100 ms (Constable, Gore, MRM 1992, from memory; numeric).</summary>
    [Fact]
    public void EchoTrainDoubled_HalvesTime_AndBlurs()
    {
        Series Of(int length) => new([], new EchoTrain(4000, 60, 90, 6.25, length, [180]), new SeriesTiming(), Geometry);
        double Width(int length)
        {
            var echoes = Enumerable.Range(1, length).Select(e => ByHand.Decay(6.25 * e, 80)).ToArray();
            return PointSpread.Width(PointSpread.FromTrain(echoes, length / 2, 256));
        }

        Approximately.Relative(0.5, ScanTime.Seconds(Of(32)) / ScanTime.Seconds(Of(16)), 1e-12);
        Approximately.Relative(1.28087, Width(16), 0.01);
        Approximately.Relative(1.53132, Width(32), 0.01);
    }

    /// <summary>Edit 15: opposed-phase pair copied from 1.5 to 3 T: the opposed echo of 1.5 T is the in-phase echo of 3 T; six peaks summed by hand.</summary>
    [Fact]
    public void OpposedPhasePair_CopiedToAnotherField_IsNoPair()
    {
        var opposed = 1000 / (2 * 3.4e-6 * 42.577478518e6 * 1.5);
        var series = Of(new SpoiledGradientEcho(150, opposed, 70, []));
        double Hand(Tissue fat, double field) => fat.ProtonDensity
            * ByHand.Spoiled(fat.T1, fat.T2Star!.Value, 150, opposed, 70)
            * Peaks.Sum(p => p.Share * Math.Cos(2 * Math.PI * p.Ppm * 1e-6 * 42.577478518e6 * field * opposed * 1e-3));

        Approximately.Absolute(Hand(Fat15, 1.5), Signed(series, Fat15, field: 1.5), 1e-9);
        Approximately.Absolute(Hand(Fat3, 3), Signed(series, Fat3), 1e-9);
        Assert.True(Hand(Fat15, 1.5) < 0 && Hand(Fat3, 3) > 0);
    }

    /// <summary>Hamilton et al., NMR Biomed 2011;24:784 and Yu et al., MRM 2008;60:1122, as printed; shares over their sum 0.999.</summary>
    private static (double Ppm, double Share)[] Peaks =>
        [(-3.8, 0.087 / 0.999), (-3.4, 0.693 / 0.999), (-2.6, 0.128 / 0.999), (-1.94, 0.004 / 0.999), (-0.39, 0.039 / 0.999), (0.6, 0.048 / 0.999)];

    /// <summary>Edit 16: flip angle of a spoiled gradient echo raised past the Ernst angle: brighter T1 contrast, less signal.</summary>
    [Fact]
    public void FlipRaisedPastErnst_LosesSignal_GainsContrast()
    {
        Series At(double flip) => Of(new SpoiledGradientEcho(10, 3, flip, []));
        foreach (var flip in new[] { 9.0, 30 })
            foreach (var tissue in new[] { White3, Grey3 })
                Approximately.Absolute(
                    tissue.ProtonDensity * ByHand.Spoiled(tissue.T1, tissue.T2Star!.Value, 10, 3, flip), Signed(At(flip), tissue), 1e-9);

        Assert.True(Signed(At(30), White3) < Signed(At(9), White3));
        Assert.True(Contrast.Ratio(Signed(At(30), White3), Signed(At(30), Grey3)) > Contrast.Ratio(Signed(At(9), White3), Signed(At(9), Grey3)));
    }

    /// <summary>Edit 17: flip angle of a balanced gradient echo lowered from 60° to 20°, below its optimum: blood loses signal.</summary>
    [Fact]
    public void BalancedFlipLowered_DimsBlood()
    {
        var blood = new Tissue("blood", 1480, 260, 150, 0.86);
        foreach (var flip in new[] { 60.0, 20 })
            Approximately.Absolute(0.86 * ByHand.Balanced(1480, 260, 4, flip), Magnitude(Of(new BalancedGradientEcho(4, 2, flip)), blood), 1e-9);

        Assert.True(ByHand.Balanced(1480, 260, 4, 20) < ByHand.Balanced(1480, 260, 4, 60));
    }

    /// <summary>Edit 18: b lowered from 1000 to 600: an acute lesion stands out less, by exp(−b (ADC₁ − ADC₂)).</summary>
    [Fact]
    public void DiffusionWeightLowered_LessContrastOfALesion()
    {
        var lesion = new Tissue("acute lesion", 850, 72, 50, 0.69, 0.40);
        Series At(double b) => Of(new DiffusionSpinEcho(6000, 80, 90, 180, b));
        double Ratio(double b) => Contrast.Ratio(Signed(At(b), lesion), Signed(At(b), White3));

        Approximately.Relative(Math.Exp(1000 * (0.72 - 0.40) * 1e-3), Ratio(1000), 1e-9);
        Approximately.Relative(Math.Exp(600 * (0.72 - 0.40) * 1e-3), Ratio(600), 1e-9);
    }

    /// <summary>Edit 19: dose doubled from 0.5 to 1 mmol/l in the tissue: 1/T = 1/T₀ + r C, then the spin echo by hand.</summary>
    [Fact]
    public void DoseDoubled_BrightensOnAT1WeightedSeries()
    {
        var series = Of(new SpinEcho(500, 12, 90, 180));
        var agent = new Relaxivity(3.5, 4.9);
        double Hand(double c) => 0.85 * ByHand.SpinEcho(1 / (1 / 1400.0 + 3.5e-3 * c), 1 / (1 / 140.0 + 4.9e-3 * c), 500, 12);
        foreach (var c in new[] { 0, 0.5, 1 })
            Approximately.Absolute(Hand(c), Signed(series, agent.Enhance(Lesion3, c)), 1e-9);

        Assert.True(Hand(1) > Hand(0.5) && Hand(0.5) > Hand(0));
    }

    /// <summary>Edit 20: more averages with matched bandwidth, and a new name: signal, contrast and noise must not move by a bit; time doubles.</summary>
    [Fact]
    public void AveragesWithMatchedBandwidth_MoveNothing()
    {
        var before = Of(new EchoTrain(4000, 80, 90, 10, 16, [150]));
        var after = before with { Geometry = before.Geometry with { NumberOfAverages = 2, PixelBandwidth = 400 } };
        foreach (var tissue in new[] { White3, Grey3, Fluid3, Fat3 })
            Assert.Equal(Signed(before, tissue), Signed(after, tissue));

        Approximately.Relative(1, RelativeNoise.Of(after) / RelativeNoise.Of(before), 1e-12);
        Approximately.Relative(2, ScanTime.Seconds(after) / ScanTime.Seconds(before), 1e-12);
        Approximately.Relative(1, RelativeRfPower.Between(before, 3, after, 3), 1e-12);
    }

    /// <summary>Edit 21: bandwidth halved for less noise: noise falls by √2, fat moves twice as far.</summary>
    [Fact]
    public void BandwidthHalved_TradesNoiseForShift()
    {
        var (before, after) = (Geometry with { PixelBandwidth = 220 }, Geometry with { PixelBandwidth = 110 });

        Approximately.Relative(1 / Math.Sqrt(2), RelativeNoise.Of(after) / RelativeNoise.Of(before), 1e-12);
        Approximately.Relative(2 * -3.5 * 42.577478518 * 3 / 220, FatWater.ShiftPixels(-3.5, 3, 110), 1e-12);
    }

    /// <summary>Edit 22: ten slices added to twenty: each takes 178 ms, thirty do not fit in 4000 ms; a second concatenation doubles the time.</summary>
    [Fact]
    public void SlicesAdded_NeedAConcatenation_AndTime()
    {
        var before = new Series([], new EchoTrain(4000, 80, 90, 10, 17, [150]), new SeriesTiming(20), Geometry);
        var after = before with { Timing = new SeriesTiming(30) };

        Assert.True(SliceFit.Of(before).Fits);
        Assert.False(SliceFit.Of(after).Fits);
        Assert.Equal(2, SliceFit.Of(after).ConcatenationsNeeded);
        Approximately.Relative(2, ScanTime.Seconds(after with { Timing = new SeriesTiming(30, Concatenations: 2) }) / ScanTime.Seconds(before), 1e-12);
    }

    /// <summary>Edit 23: T2 preparation lengthened from 40 to 60 ms: each tissue loses exp(−20/T2); the rest of the sequence starts from saturation alike.</summary>
    [Fact]
    public void T2PreparationLengthened_DarkensByT2()
    {
        // Long TR and no delay: the prepared magnetisation is M0 exp(−T/T2) within exp(−TR/T1).
        Series At(double time) => Of(new SpinEcho(60_000, 10, 90, 180), new T2Preparation(time, 4, 0));

        Approximately.Relative(Math.Exp(-20 / White3.T2), BeforeExcitation(At(60), White3) / BeforeExcitation(At(40), White3), 1e-9);
        Assert.True(BeforeExcitation(At(60), Fluid3) / BeforeExcitation(At(40), Fluid3) > 0.98);

        // Before gradient echoes too it is T2 that counts, and T2* only from the excitation on.
        Series Gradient(double time) => Of(new SpoiledGradientEcho(60_000, 10, 90, []), new T2Preparation(time, 4, 0));
        Approximately.Relative(Math.Exp(-20 / White3.T2), Signed(Gradient(60), White3) / Signed(Gradient(40), White3), 1e-9);
        Approximately.Relative(
            White3.ProtonDensity * Math.Exp(-10 / White3.T2Star!.Value), Signed(Gradient(40), White3) / BeforeExcitation(Gradient(40), White3), 1e-9);
    }

    /// <summary>
    /// Edit 24: a train's refocusing lowered to 60°: late echoes outlast T2 (stored magnetisation decays with T1), so the contrast-equivalent time is shorter than
    /// the nominal one; echo 10 over echo 4 of T1 1000, T2 100, 10 ms is 0.647 where T2 alone gives 0.549 (isochromat sum, computed apart).
    /// </summary>
    [Fact]
    public void RefocusingLoweredFar_ShortensTheContrastEquivalentTime()
    {
        var tissue = new Tissue("tissue", 1000, 100, 100, 1);
        Series At(double te) => Of(new EchoTrain(1e5, te, 90, 10, 10, [60]));

        Approximately.Absolute(0.647, Signed(At(100), tissue) / Signed(At(40), tissue), 1e-3);
        var lasting = tissue with { T1 = 1e6, T2 = 1e6 };
        var firstShot = At(100) with { Timing = new SeriesTiming(State: StartState.FirstShot) };
        var equivalent = ContrastEquivalentEchoTime.Of(Signed(firstShot, tissue), Signed(firstShot, lasting), tissue.T2);
        Approximately.Absolute(-100 * Math.Log(0.273827 / EchoWithoutRelaxation), equivalent, 0.01);
        Assert.InRange(equivalent, 40, 90);
    }

    /// <summary>Tenth echo of 60° refocusing without relaxation: isochromats at 4001 precession angles, rotated pulse by pulse.</summary>
    private static double EchoWithoutRelaxation
    {
        get
        {
            const int Count = 4001;
            var sum = 0.0;
            for (var i = 0; i < Count; i++)
            {
                var half = Math.PI * i / Count;
                var (x, y, z) = (1.0, 0.0, 0.0);
                for (var echo = 0; echo < 10; echo++)
                {
                    (x, y) = (x * Math.Cos(half) - y * Math.Sin(half), x * Math.Sin(half) + y * Math.Cos(half));
                    var (c, s) = (Math.Cos(Math.PI / 3), Math.Sin(Math.PI / 3));
                    (y, z) = (y * c - z * s, y * s + z * c);
                    (x, y) = (x * Math.Cos(half) - y * Math.Sin(half), x * Math.Sin(half) + y * Math.Cos(half));
                }

                sum += x;
            }

            return sum / Count;
        }
    }
}
