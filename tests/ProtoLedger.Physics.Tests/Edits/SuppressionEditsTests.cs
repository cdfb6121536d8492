using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using static ProtoLedger.Physics.Tests.Signals;

namespace ProtoLedger.Physics.Tests.Edits;

/// <summary>Edits of fluid- and fat-suppressed series: direction, cause and magnitude by hand, independent of the engine.</summary>
public sealed class SuppressionEditsTests
{
    private static Series FluidNulled(double tr, double ti, RfPulse? pulse = null, int echoes = 16) =>
        Of(new EchoTrain(tr, 80, 90, 10, echoes, [180]), Invert(ti, pulse));

    private static double HandFluid(double tr, double ti, double f = 0.96, int echoes = 16) =>
        ByHand.InversionRecovery(Fluid3.T1, tr, ti, f, 10, echoes) * ByHand.Decay(80, Fluid3.T2);

    /// <summary>Edit 1: repetition time cut, inversion time left.</summary>
    [Fact]
    public void RepetitionTimeCut_InversionTimeLeft_LightsUpFluid()
    {
        var ti = ByHand.NullTime(Fluid3.T1, 9000, 0.96, 10, 16);
        var (before, after) = (FluidNulled(9000, ti), FluidNulled(6000, ti));

        Approximately.Absolute(0, Signed(before, Fluid3), 1e-9);
        Approximately.Absolute(HandFluid(6000, ti), Signed(after, Fluid3), 1e-9);
        Assert.InRange(Signed(after, Fluid3), 0.1, 0.15);
        Approximately.Absolute(0, Signed(after with { Readout = after.Readout with { RepetitionTime = 9000 } }, Fluid3), 1e-9);
    }

    /// <summary>Edit 2: repetition time cut and inversion time set anew: fluid holds, and grey against white is what it costs.</summary>
    [Fact]
    public void RepetitionTimeCut_InversionTimeSetAnew_CostsContrast()
    {
        var (old, anew) = (ByHand.NullTime(Fluid3.T1, 9000, 0.96, 10, 16), ByHand.NullTime(Fluid3.T1, 6000, 0.96, 10, 16));
        double Hand(Tissue tissue, double tr, double ti) =>
            tissue.ProtonDensity * ByHand.InversionRecovery(tissue.T1, tr, ti, 0.96, 10, 16) * ByHand.Decay(80, tissue.T2);
        var (before, after) = (FluidNulled(9000, old), FluidNulled(6000, anew));

        Approximately.Absolute(0, Signed(after, Fluid3), 1e-9);
        Approximately.Absolute(Hand(White3, 6000, anew), Signed(after, White3), 1e-9);
        Approximately.Absolute(Hand(Grey3, 6000, anew), Signed(after, Grey3), 1e-9);
        Assert.True(Signed(after, White3) < Signed(before, White3));
        Approximately.Absolute(
            Hand(Grey3, 6000, anew) - Hand(White3, 6000, anew) - Hand(Grey3, 9000, old) + Hand(White3, 9000, old),
            Contrast.Difference(Signed(after, Grey3), Signed(after, White3)) - Contrast.Difference(Signed(before, Grey3), Signed(before, White3)),
            1e-9);
    }

    /// <summary>Edit 3: the default inversion replaced by a perfect one moves the null up, at TR 9000 by 68 ms for T1 4300 ms without refocusing.</summary>
    [Fact]
    public void InversionPulseSwapped_ForAPerfectOne_MovesTheNull()
    {
        var fluid = Fluid3 with { T1 = 4300 };
        double Null(double f) => 4300 * Math.Log((1 + f) / (1 + f * Math.Exp(-9000 / 4300.0)));
        Series Plain(RfPulse pulse) => Of(new SpoiledGradientEcho(9000, 1e-3, 90, []), Invert(2400, pulse));

        Approximately.Absolute(68, Null(1) - Null(0.96), 1);
        Approximately.Absolute(Null(0.96), NullTime(Plain(EfficiencyInversion.Default), fluid), 0.01);
        Approximately.Absolute(Null(1), NullTime(Plain(EfficiencyInversion.Perfect), fluid), 0.01);
    }

    /// <summary>Edit 4: adiabatic replaced by a hard pulse: at a B1+ of 0.8 the inversion is cos 144° = −0.81 and fluid lights up; at nominal B1+ it does not.</summary>
    [Fact]
    public void InversionPulseSwapped_ForAHardOne_DependsOnB1()
    {
        var ti = ByHand.NullTime(Fluid3.T1, 9000, 0.96, 10, 16);
        var after = FluidNulled(9000, ti, new HardPulse("hard", 180));

        // The train at 0.8 turns by 144° instead of 180°: read Mz, which the inversion alone decides once the readout has used up all of it.
        Series Plain(RfPulse pulse) => Of(new SpoiledGradientEcho(30_000, 1e-3, 90, []), Invert(ti, pulse));
        var weak = ByHand.Recover(Math.Cos(144 * Math.PI / 180) * SteadyBefore(ti, Math.Cos(144 * Math.PI / 180), Math.Cos(72 * Math.PI / 180)), ti, Fluid3.T1);

        Approximately.Absolute(weak, BeforeExcitation(Plain(new HardPulse("hard", 180)), Fluid3, new FieldPoint(0.8)), 1e-9);
        Assert.True(weak > BeforeExcitation(Plain(EfficiencyInversion.Default), Fluid3, new FieldPoint(0.8)) + 0.05);
        Approximately.Absolute(HandFluid(9000, ti, 1), Signed(after, Fluid3), 1e-9);
    }

    /// <summary>Mz before the inversion: fixed point of inversion (m), TI, excitation (c), recovery for the rest of 30 s.</summary>
    private static double SteadyBefore(double ti, double inversion, double excitation)
    {
        var m = 1.0;
        for (var i = 0; i < 50; i++)
            m = ByHand.Recover(excitation * ByHand.Recover(inversion * m, ti, Fluid3.T1), 30_000 - ti, Fluid3.T1);
        return m;
    }

    /// <summary>Edit 5: the inversion meets 300 Hz near metal with a hard pulse of 1 ms: Rabi's formula.</summary>
    [Fact]
    public void HardInversion_ThreeHundredHertzOff_FailsAsRabiSays()
    {
        var series = Of(new SpinEcho(20_000, 20, 90, 180), Invert(2500, new HardPulse("hard", 180, 1)));
        var multiplier = ByHand.HardPulse(180, 1, 1, 300);

        var expected = ByHand.InversionRecovery(Fluid3.T1, 20_000, 2500, -multiplier, 20, 1);
        Approximately.Absolute(expected, BeforeExcitation(series, Fluid3, new FieldPoint(1, 300)), 1e-9);
        Assert.True(expected > BeforeExcitation(series, Fluid3) + 0.2);
    }

    /// <summary>Edit 6: a fat-nulled series copied from 3 to 1.5 T with its inversion time: fat overshoots the null by its shorter T1.</summary>
    [Fact]
    public void FatNulledSeries_CopiedDownInField_LeavesFat()
    {
        var ti = ByHand.NullTime(Fat3.T1, 5000, 0.96, 12, 8);
        var series = Of(new EchoTrain(5000, 48, 90, 12, 8, [180]), Invert(ti));
        var expected = Fat15.ProtonDensity * ByHand.InversionRecovery(Fat15.T1, 5000, ti, 0.96, 12, 8) * ByHand.Decay(48, Fat15.T2);

        Approximately.Absolute(0, Signed(series, Fat3), 1e-9);
        Approximately.Absolute(expected, Signed(series, Fat15, field: 1.5), 1e-9);
        Assert.InRange(expected, 0.05, 0.15);
        Approximately.Absolute(0, Signed(series with { Preparations = [Invert(ByHand.NullTime(Fat15.T1, 5000, 0.96, 12, 8))] }, Fat15, field: 1.5), 1e-9);
    }

    /// <summary>Edit 7: only the number of slices changes in a series with fat-selective inversion: the pulse recurs once per slice, so fat finds another steady state.</summary>
    [Theory]
    [InlineData(10)]
    [InlineData(16)]
    public void FatSelectiveInversion_MoreSlices_MovesFatAlone(int slices)
    {
        var series = Of(new SpinEcho(4000, 20, 90, 180), new SpectralInversion(120, new EfficiencyInversion("fat inversion", 0.95)));
        series = series with { Timing = new SeriesTiming(slices) };

        var m = 1.0;
        var before = 0.0;
        for (var i = 0; i < 100; i++)
        {
            before = ByHand.Recover(-0.95 * m, 120, Fat3.T1);
            m = ByHand.Recover(-ByHand.Recover(0, 10, Fat3.T1), 10, Fat3.T1);
            m = ByHand.Recover(m, 4000.0 / slices - 140, Fat3.T1);
            for (var k = 1; k < slices; k++)
                m = ByHand.Recover(-0.95 * m, 4000.0 / slices, Fat3.T1);
        }

        Approximately.Absolute(before, BeforeExcitation(series, Fat3), 1e-9);
        var single = series with { Timing = new SeriesTiming(1) };
        Assert.True(Math.Abs(BeforeExcitation(series, Fat3) - BeforeExcitation(single, Fat3)) > 0.1);
        Assert.Equal(BeforeExcitation(single, White3), BeforeExcitation(series, White3), 12);
    }

    /// <summary>Edit 8: slices added to a series with perfect fat saturation: fat has forgotten everything at each pulse, so nothing may move.</summary>
    [Fact]
    public void PerfectFatSaturation_MoreSlices_MovesNothing()
    {
        var series = Of(new SpinEcho(4000, 20, 90, 180), new SpectralSaturation(new EfficiencyInversion("saturation", 0), 6));

        foreach (var slices in new[] { 5, 20 })
            Approximately.Absolute(
                1 - ByHand.Decay(6, Fat3.T1), BeforeExcitation(series with { Timing = new SeriesTiming(slices) }, Fat3), 1e-12);
    }

    /// <summary>Edit 9: double inversion with its repetition time cut from 11 to 8 s: 1 − 2 exp(−τ₂/T1) + 2 exp(−(τ₁ + τ₂)/T1) − exp(−TR/T1) (Redpath, Smith, BJR 1994;67:1258, from memory).</summary>
    [Fact]
    public void DoubleInversion_RepetitionTimeCut_LosesBothNulls()
    {
        const double First = 3202.40, Second = 557.610;
        Series At(double tr) => Of(new SpoiledGradientEcho(tr, 1e-3, 90, []), Invert(First + Second, EfficiencyInversion.Perfect), Invert(Second, EfficiencyInversion.Perfect));
        double Hand(double t1, double tr) => 1 - 2 * ByHand.Decay(Second, t1) + 2 * ByHand.Decay(First + Second, t1) - ByHand.Decay(tr, t1);
        foreach (var t1 in new[] { 4300.0, 830, 1330 })
        {
            var tissue = new Tissue("tissue", t1, 100, 100, 1);
            Approximately.Absolute(Hand(t1, 11_000), BeforeExcitation(At(11_000), tissue), 1e-9);
            Approximately.Absolute(Hand(t1, 8000), BeforeExcitation(At(8000), tissue), 1e-9);
        }

        Approximately.Absolute(0, Hand(4300, 11_000), 1e-5);
        Approximately.Absolute(0, Hand(830, 11_000), 1e-5);
        Approximately.Absolute(-0.0782, Hand(4300, 8000), 5e-4);
    }

    /// <summary>Edit 10: more unprepared inflow: a signed mix of nulled and fresh fluid.</summary>
    [Fact]
    public void Inflow_OfUnpreparedFluid_AddsItsShareOfFreshSignal()
    {
        var series = FluidNulled(9000, ByHand.NullTime(Fluid3.T1, 9000, 0.96, 10, 16));
        foreach (var fraction in new[] { 0.0, 0.1, 0.3, 1 })
            Approximately.Absolute(fraction * ByHand.Decay(80, Fluid3.T2), Signed(series, Fluid3, new FieldPoint(1, 0, fraction)), 1e-9);
    }

    /// <summary>Edit 11: the inversion time set too short leaves inverted fluid; mixed with fresh inflow the two cancel before the magnitude is taken.</summary>
    [Fact]
    public void Inflow_IntoInvertedFluid_CancelsBeforeTheMagnitude()
    {
        var series = FluidNulled(9000, 1500);
        var inverted = HandFluid(9000, 1500);
        var fresh = ByHand.Decay(80, Fluid3.T2);
        var balance = -inverted / (fresh - inverted);

        Assert.True(inverted < 0);
        Approximately.Absolute(-inverted, Magnitude(series, Fluid3), 1e-9);
        Approximately.Absolute(0, Magnitude(series, Fluid3, new FieldPoint(1, 0, balance)), 1e-9);
    }
}
