using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.Prediction;
using static ProtoLedger.Physics.Tests.Predictions;

namespace ProtoLedger.Physics.Tests.Prediction;

/// <summary>Partial volume, fat spectrum, triggers, inflow and facts of the trade.</summary>
public sealed class VoxelTests
{
    [Fact]
    public void PartialVolume_InvertedAndRecovered_CancelBeforeTheMagnitude()
    {
        var lanes = LaneTable.FromGrid([new Tissue("short", 300, 60, null, 1), new Tissue("long", 4000, 1500, null, 1)], [new FieldPoint()]);
        var table = SignalPredictor.Predict(Series(new SpinEcho(6000, 10, 90, 180), Inversion(500)), Ideal, lanes);

        var mixed = Math.Abs(PartialVolume.Mix([0.5, 0.5], table.Signed));

        Assert.True(table.Signed[0] > 0 && table.Signed[1] < 0);
        Assert.Equal(Math.Abs(table.Signed[0] + table.Signed[1]) / 2, mixed, 1e-15);
        Assert.True(mixed < 0.5 * (table.Magnitude[0] + table.Magnitude[1]) - 0.1);
    }

    /// <summary>
    /// Six peaks dephase against water: at 1/(2·3.4 ppm) fat opposes water, at twice that it is in phase again, but never wholly, since the peaks disagree.
    /// Expected value: Σ a cos(2π f TE) of the published spectrum (Hamilton et al., NMR Biomed 2011;24:784), written out here.
    /// </summary>
    [Theory]
    [InlineData(1.5)]
    [InlineData(3)]
    public void Fat_OpposedAndInPhase_IsTheSumOfItsPeaks(double field)
    {
        double[] ppm = [-3.80, -3.40, -2.60, -1.94, -0.39, 0.60];
        double[] share = [0.087, 0.693, 0.128, 0.004, 0.039, 0.048];
        var opposed = 1e3 / (2 * 3.4 * 42.577478518 * field);
        var lanes = LaneTable.FromGrid([new Tissue("fat", 300, 60, 1e5, 1, IsFat: true), new Tissue("water", 300, 60, 1e5, 1)], [new FieldPoint()]);
        var table = SignalPredictor.Predict(
            Series(new SpoiledGradientEcho(150, opposed, 30, [2 * opposed])), new PredictionSetting(field), lanes, PredictionOutputs.AllEchoes);

        for (var echo = 0; echo < 2; echo++)
        {
            double real = 0, imaginary = 0;
            for (var p = 0; p < 6; p++)
            {
                var phase = 2 * Math.PI * ppm[p] * 42.577478518 * field * opposed * (echo + 1) * 1e-3;
                real += share[p] / 0.999 * Math.Cos(phase);
                imaginary += share[p] / 0.999 * Math.Sin(phase);
            }

            Assert.Equal(real, table.Echoes[echo] / table.Echoes[2 + echo], 1e-6);
            Assert.Equal(Math.Sqrt(real * real + imaginary * imaginary), table.EchoMagnitudes[echo] / table.Echoes[2 + echo], 1e-6);
        }

        Assert.True(table.Echoes[0] < -0.5 * table.Echoes[2] && table.Echoes[1] > 0.5 * table.Echoes[3]);
    }

    /// <summary>About 8.6 % of fat lies under water and stays whatever a spectral pulse does, and what recovers in the delay adds to it (Hamilton et al., 2011, abstract); inversion recovery has no such floor.</summary>
    [Fact]
    public void Fat_PerfectSpectralSaturation_LeavesThePeaksUnderWater()
    {
        var lanes = LaneTable.FromGrid([new Tissue("fat", 290, 165, null, 1, IsFat: true)], [new FieldPoint()]);
        var saturation = new SpectralSaturation(new GaussianPulse("gaussian", 90, 10, 0.166667), 2);
        var plain = SignalPredictor.Predict(Series(new SpinEcho(3000, 12, 90, 180)), new PredictionSetting(1.5), lanes).Signed[0];
        var saturated = SignalPredictor.Predict(Series(new SpinEcho(3000, 12, 90, 180), saturation), new PredictionSetting(1.5), lanes).Signed[0];

        Assert.InRange(saturated / plain, 0.086, 0.2);
    }

    [Fact]
    public void Triggered_RangeOfRates_GivesTheShortestAndTheLongestRepetition()
    {
        var series = Series(new SpinEcho(800, 20, 90, 180)) with
        {
            Timing = new SeriesTiming(Trigger: SeriesTrigger.Cardiac, HeartRate: new RateRange(50, 75)),
        };

        var (shortest, longest) = RepetitionPeriod.Range(series);

        Assert.Equal((800.0, 1200.0), (shortest, longest));
        Assert.Equal((800.0, 800.0), RepetitionPeriod.Range(series with { Timing = new SeriesTiming() }));
        Assert.True(Signed(At(longest), Lane(1200, 50)) > Signed(At(shortest), Lane(1200, 50)));

        Series At(double repetition) => series with { Readout = series.Readout with { RepetitionTime = repetition } };
    }

    /// <summary>Spectral pulses recur once per slice: with more slices the fat of a slice is saturated more often and lower (derived: shorter recovery).</summary>
    [Fact]
    public void SpectralSaturation_MoreSlices_LeavesLessFat()
    {
        var lanes = LaneTable.FromGrid([new Tissue("fat", 290, 165, null, 1, IsFat: true)], [new FieldPoint()]);
        double Fat(int slices) => SignalPredictor.Predict(
            Series(new SpinEcho(600, 12, 90, 180), new SpectralSaturation(new HardPulse("saturation", 80), 20)) with { Timing = new SeriesTiming(slices) },
            Ideal, lanes).Signed[0];

        Assert.True(Fat(10) < Fat(3) && Fat(3) < Fat(1));
    }

    /// <summary>Contrast agent: enhanced tissue is brighter with T1 weighting (relaxivities: see <see cref="Relaxivity.Generic"/>).</summary>
    [Fact]
    public void ContrastAgent_T1Weighting_Brightens()
    {
        var tissue = new Tissue("lesion", 1400, 140, 75, 1);
        var enhanced = Relaxivity.Generic(3).Enhance(tissue, 0.5);
        var lanes = LaneTable.FromGrid([tissue, enhanced], [new FieldPoint()]);

        var signal = SignalPredictor.Predict(Series(new SpinEcho(500, 10, 90, 180)), Ideal, lanes).Signed;

        Assert.Equal(1 / (1 / 1400.0 + 3.5e-3 * 0.5), enhanced.T1, 1e-9);
        Assert.True(signal[1] > 1.3 * signal[0]);
    }

    /// <summary>Long TR with long TE shows T2, short TR with short TE shows T1. Common practice, no source.</summary>
    [Fact]
    public void Weighting_LongAndShortTimes_ShowT2AndT1()
    {
        var lanes = Lane(1000, 80);
        var heavy = SignalDerivatives.Of(Series(new SpinEcho(6000, 100, 90, 180)), Ideal, lanes);
        var light = SignalDerivatives.Of(Series(new SpinEcho(450, 8, 90, 180)), Ideal, lanes);

        Assert.True(Math.Abs(heavy.ByLogT2[0]) > 10 * Math.Abs(heavy.ByLogT1[0]));
        Assert.True(Math.Abs(light.ByLogT1[0]) > 4 * Math.Abs(light.ByLogT2[0]));
    }

    /// <summary>
    /// A wrong repetition time lights up all fluid alike; unprepared inflow lights it up too, in proportion. Common practice, no source; magnitudes follow
    /// from the signed mix.
    /// </summary>
    [Fact]
    public void Fluid_WrongRepetitionTimeOrInflow_LightsUp()
    {
        var fluid = new Tissue("fluid", 4300, 2000, null, 1);
        var lanes = LaneTable.FromGrid([fluid], [new FieldPoint(), new FieldPoint(0.8), new FieldPoint(1, 0, 0.1), new FieldPoint(1, 0, 0.3)]);
        var train = new EchoTrain(9000, 120, 90, 10, 24, [150]);
        var time = NullTimes.Find(Series(train, Inversion(2400, EfficiencyInversion.Default)), 0, Ideal, lanes)[0]!.Value;
        var nulled = SignalPredictor.Predict(Series(train, Inversion(time, EfficiencyInversion.Default)), Ideal, lanes).Magnitude;
        var cut = SignalPredictor.Predict(Series(train with { RepetitionTime = 6000 }, Inversion(time, EfficiencyInversion.Default)), Ideal, lanes).Magnitude;

        Assert.True(nulled[0] < 1e-6 && cut[0] > 0.05);
        Assert.InRange(cut[1] / cut[0], 0.75, 1.1);
        Assert.True(nulled[2] > 0.05 && nulled[3] > 2.5 * nulled[2]);
    }

    /// <summary>The same table is filled again: equal bits, no matter what it held.</summary>
    [Fact]
    public void PredictInto_UsedTable_EqualsPredict()
    {
        var lanes = LaneTable.FromGrid([new Tissue("a", 900, 80, 60, 0.8, 1), new Tissue("fat", 300, 80, 20, 0.9, 0.1, IsFat: true)], [new FieldPoint(), new FieldPoint(0.9, 30, 0.2)]);
        var table = new SignalTable(lanes.Count);
        foreach (var series in Probes.All())
        {
            SignalPredictor.PredictInto(series, new PredictionSetting(3), lanes, table);
            var fresh = SignalPredictor.Predict(series, new PredictionSetting(3), lanes);
            Assert.Equal(fresh.Signed, table.Signed);
            Assert.Equal(fresh.Magnitude, table.Magnitude);
            Assert.Equal(fresh.LongitudinalBeforeExcitation, table.LongitudinalBeforeExcitation);
            Assert.Equal(fresh.Assumptions, table.Assumptions);
        }

        Assert.Throws<ArgumentException>(() => SignalPredictor.PredictInto(Probes.All().First(), Ideal, lanes, new SignalTable(1)));
    }
}
