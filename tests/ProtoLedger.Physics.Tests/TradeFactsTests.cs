using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using static ProtoLedger.Physics.Tests.Signals;

namespace ProtoLedger.Physics.Tests;

/// <summary>Facts of the trade. Every one: common practice, no source.</summary>
public sealed class TradeFactsTests
{
    private static readonly EchoTrain FluidNulledTrain = new(9000, 120, 90, 10, 24, [150]);

    private static Series FluidNulled(double repetitionTime, double inversionTime, RfPulse? pulse = null, double? slab = null) =>
        Of(FluidNulledTrain with { RepetitionTime = repetitionTime }, Invert(inversionTime, pulse, slab));

    /// <summary>common practice, no source</summary>
    [Fact]
    public void LongRepetition_WithLongEcho_ShowsT2()
    {
        var series = Of(new SpinEcho(4000, 100, 90, 180));

        Assert.True(Magnitude(series, Fluid3) > Magnitude(series, Lesion3));
        Assert.True(Magnitude(series, Lesion3) > Magnitude(series, Grey3));
        Assert.True(Magnitude(series, Grey3) > Magnitude(series, White3));
    }

    /// <summary>common practice, no source</summary>
    [Fact]
    public void ShortRepetition_WithShortEcho_ShowsT1()
    {
        var series = Of(new SpinEcho(500, 12, 90, 180));

        Assert.True(Magnitude(series, Fat3) > Magnitude(series, White3));
        Assert.True(Magnitude(series, White3) > Magnitude(series, Grey3));
        Assert.True(Magnitude(series, Grey3) > Magnitude(series, Fluid3));
    }

    /// <summary>common practice, no source. Long TR with short TE leaves proton density: the spread is far smaller than with either weighting.</summary>
    [Fact]
    public void LongRepetition_WithShortEcho_ShowsProtonDensity()
    {
        var series = Of(new SpinEcho(20_000, 5, 90, 180));

        Approximately.Relative(Grey3.ProtonDensity / White3.ProtonDensity, Magnitude(series, Grey3) / Magnitude(series, White3), 0.03);
    }

    /// <summary>
    /// common practice, no source. The signal with the pulse at TE/2 is [1 − 2 exp(−(TR − TE/2)/T1) + exp(−TR/T1)] exp(−TE/T2) (derived);
    /// a pulse at TE/3 would recover for TR − TE/3 after it.
    /// </summary>
    [Fact]
    public void RefocusingPulse_StandsAtHalfTheEchoTime()
    {
        double WithPulseAt(double time) => (1 - 2 * Math.Exp(-(500 - time) / White3.T1) + Math.Exp(-500 / White3.T1)) * Math.Exp(-90 / White3.T2);
        var predicted = Magnitude(Of(new SpinEcho(500, 90, 90, 180)), White3 with { ProtonDensity = 1 });

        Approximately.Absolute(WithPulseAt(45), predicted, 1e-12);
        Assert.True(Math.Abs(WithPulseAt(30) - predicted) > 1e-3);
    }

    /// <summary>common practice, no source. Off-resonance leaves a spin echo alone, and turns a gradient echo of fat against water.</summary>
    [Fact]
    public void SpinEcho_RefocusesWhatAGradientEchoDoesNot()
    {
        var gradient = Of(new SpoiledGradientEcho(150, FatWater.OpposedPhaseEchoTime(FatSpectrumCarrier, 3), 60, []));

        Assert.Equal(
            Signed(Of(new SpinEcho(500, 20, 90, 180)), White3),
            Signed(Of(new SpinEcho(500, 20, 90, 180)), White3, new FieldPoint(1, 120)), 12);
        Assert.True(Signed(gradient, Fat3) < 0);
        Assert.True(Signed(gradient, White3) > 0);
    }

    /// <summary>common practice, no source. Fluid outlasts brain by its T2; its share of protons differs far less.</summary>
    [Fact]
    public void Fluid_KeepsPhaseLongerThanBrain_WithNearlyTheSameProtonDensity()
    {
        var series = Of(new SpinEcho(30_000, 120, 90, 180));
        var early = Of(new SpinEcho(30_000, 1, 90, 180));
        foreach (var brain in new[] { White3, Grey3 })
        {
            var density = Magnitude(early, Fluid3) / Magnitude(early, brain);
            var phase = Magnitude(series, Fluid3) / Magnitude(series, brain);

            Assert.InRange(density, 1, 1.5);
            Assert.True(phase / density > 3, $"{phase} against {density}");
        }
    }

    /// <summary>common practice, no source. Ventricular and cortical fluid are one fluid under slightly different fields.</summary>
    [Fact]
    public void WrongRepetitionTime_LightsUpAllFluidAlike()
    {
        var nullTime = NullTime(FluidNulled(9000, 2400), Fluid3);
        FieldPoint[] spaces = [new(1.08, 5), new(0.9, 60), new(0.95, -45)];

        var right = spaces.Select(p => Magnitude(FluidNulled(9000, nullTime), Fluid3, p)).ToArray();
        var wrong = spaces.Select(p => Magnitude(FluidNulled(6000, nullTime), Fluid3, p)).ToArray();

        var white = Magnitude(FluidNulled(9000, nullTime), White3);
        Assert.All(right, s => Assert.True(s < 0.1 * white, $"{s} of {white}"));
        Assert.All(wrong, s => Assert.True(s > 0.5 * white, $"{s} of {white}"));
        Assert.True(wrong.Max() / wrong.Min() < 1.15, $"{wrong.Min()} to {wrong.Max()}");
    }

    /// <summary>common practice, no source. Field of a small magnetised body: 4000 Hz at 20 mm, falling with the cube of the distance.</summary>
    [Fact]
    public void OffResonance_NearMetal_LightsUpFluidLocally_MoreOnNearSlices()
    {
        var slab = new HyperbolicSecantPulse("slab", 10, 800, 4.9, 700);
        var series = FluidNulled(9000, 2400, slab, 1.4);
        series = FluidNulled(9000, NullTime(series, Fluid3), slab, 1.4);
        double[] distances = [26, 30, 35, 40, 60, 90];

        var fluid = distances.Select(d => Magnitude(series, Fluid3, new FieldPoint(1, 4000 * Math.Pow(20 / d, 3)))).ToArray();

        var white = Magnitude(series, White3);
        Assert.True(fluid[0] > white, $"near: {fluid[0]} of {white}");
        Assert.All(fluid[4..], s => Assert.True(s < 0.1 * white, $"far: {s} of {white}"));
        for (var i = 1; i < 4; i++)
            Assert.True(fluid[i] <= fluid[i - 1], $"at {distances[i]} mm {fluid[i]} after {fluid[i - 1]}");
    }

    /// <summary>common practice, no source: bands 1800 to 2500 ms at 1.5 T and 2300 to 2500 ms at 3 T for TR above 6000; TR 9500 at 3 T as in the protocol table of a published trial.</summary>
    [Fact]
    public void FluidNull_LiesInItsBand_WithTheDefaultPulseOnly()
    {
        double Null(RfPulse pulse, double repetitionTime, Tissue fluid, double field) =>
            NullTime(FluidNulled(repetitionTime, 2400, pulse), fluid, field);

        Assert.InRange(Null(EfficiencyInversion.Default, 9500, Fluid3, 3), 2300, 2500);
        Assert.InRange(Null(EfficiencyInversion.Default, 9500, Fluid15, 1.5), 1800, 2500);
        Assert.True(Null(EfficiencyInversion.Perfect, 9500, Fluid3, 3) > 2500);
        Assert.True(Null(EfficiencyInversion.Perfect, 9500, Fluid15, 1.5) > 2500);
    }

    /// <summary>
    /// common practice, no source: bands 140 to 180 ms at 1.5 T and 200 to 230 ms at 3 T. Practical times sit below the null of the mean T1 of fat;
    /// what an expectation asks is a residual, here at most 7 % of M0, and its window reaches into the band with the default pulse only.
    /// </summary>
    [Theory]
    [InlineData(1.5, 140, 180)]
    [InlineData(3, 200, 230)]
    public void FatNullWindow_ReachesIntoItsBand_WithTheDefaultPulseOnly(double field, double low, double high)
    {
        var fat = field == 3 ? Fat3 : Fat15;
        NullWindow Window(RfPulse pulse)
        {
            Series At(double inversionTime) => Of(new EchoTrain(5000, 30, 90, 10, 8, [180]), Invert(inversionTime, pulse));
            return NullWindow.Find(ti => BeforeExcitation(At(ti), fat, field: field), NullTime(At(low), fat, field), 50, 600, 0.07)!.Value;
        }

        Assert.InRange(Window(EfficiencyInversion.Default).Low, low, high);
        Assert.True(Window(EfficiencyInversion.Perfect).Low > high);
    }

    /// <summary>common practice, no source: the null of a fluid moves up with TR.</summary>
    [Fact]
    public void FluidNull_RisesWithRepetitionTime()
    {
        double[] nulls = [.. new[] { 6000.0, 8000, 10_000, 12_000 }.Select(tr => NullTime(FluidNulled(tr, 2000), Fluid3))];

        Assert.Equal(nulls.Order(), nulls);
        Assert.True(nulls[^1] - nulls[0] > 300);
    }

    private const double FatSpectrumCarrier = Physics.Pulses.FatSpectrum.CarrierPpm;
}
