using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using static ProtoLedger.Physics.Tests.Predictions;

namespace ProtoLedger.Physics.Tests.Prediction;

/// <summary>One case or more of each family against <see cref="ReferenceBloch"/>; the tolerance is that of the Runge-Kutta steps.</summary>
public sealed class BlochTests
{
    private const double Tolerance = 2e-7;

    [Theory]
    [InlineData(90, 150, 1)]
    [InlineData(70, 180, 0.85)]
    public void SpinEcho_SteadyState_IsThatOfTheBlochEquation(double flip, double refocusing, double b1)
    {
        var bloch = new ReferenceBloch(600, 80, 8);
        double signal = 0;
        for (var repetition = 0; repetition < 30; repetition++)
        {
            bloch.Rotate(flip * b1, 0);
            bloch.Wait(10, 1);
            bloch.Rotate(refocusing * b1, 90);
            bloch.Wait(10, 1);
            signal = bloch.Signed;
            bloch.Recover(480);
        }

        Assert.Equal(signal, Signed(Series(new SpinEcho(500, 20, flip, refocusing)), Lane(600, 80, b1)), Tolerance);
    }

    [Fact]
    public void EchoTrain_ScheduledAnglesWithFlipBack_IsThatOfTheBlochEquation()
    {
        double[] angles = [150, 120, 100, 140];
        var bloch = new ReferenceBloch(900, 120, 18);
        var echoes = new double[4];
        double end = 0, before = 0;
        for (var repetition = 0; repetition < 14; repetition++)
        {
            before = bloch.Mean[2];
            bloch.Rotate(90 * 0.9, 0);
            for (var i = 0; i < 4; i++)
            {
                bloch.Wait(5, 1);
                bloch.Rotate(angles[i] * 0.9, 90);
                bloch.Wait(5, 1);
                echoes[i] = bloch.Signed;
            }

            bloch.Rotate(-90 * 0.9, 0);
            bloch.Spoil();
            end = bloch.Mean[2];
            bloch.Recover(760);
        }

        var table = SignalPredictor.Predict(
            Series(new EchoTrain(800, 20, 90, 10, 4, angles, -90)), Ideal, Lane(900, 120, 0.9), PredictionOutputs.AllEchoes);
        Assert.All(echoes.Zip(table.Echoes), pair => Assert.Equal(pair.First, pair.Second, Tolerance));
        Assert.Equal(end, table.LongitudinalAtEnd[0], Tolerance);
        Assert.Equal(before, table.LongitudinalBeforeExcitation[0], Tolerance);
        Assert.Equal(echoes[1], table.Signed[0], Tolerance);
    }

    [Fact]
    public void DoubleInversionWithTrain_SteadyState_IsThatOfTheBlochEquation()
    {
        var bloch = new ReferenceBloch(700, 90, 14);
        double signal = 0;
        for (var repetition = 0; repetition < 4; repetition++)
        {
            bloch.Multiply(-0.96);
            bloch.Recover(900);
            bloch.Multiply(-0.96);
            bloch.Recover(300);
            bloch.Rotate(90, 0);
            for (var i = 0; i < 3; i++)
            {
                bloch.Wait(6, 1);
                bloch.Rotate(130, 90);
                bloch.Wait(6, 1);
            }

            signal = bloch.Signed;
            bloch.Recover(2500 - 1200 - 36);
        }

        var series = Series(
            new EchoTrain(2500, 36, 90, 12, 3, [130]), Inversion(1200, EfficiencyInversion.Default), Inversion(300, EfficiencyInversion.Default));
        Assert.Equal(signal, Signed(series, Lane(700, 90)), Tolerance);
    }

    [Fact]
    public void T2Preparation_SteadyState_IsThatOfTheBlochEquation()
    {
        var bloch = new ReferenceBloch(1000, 60, 18);
        double signal = 0;
        for (var repetition = 0; repetition < 8; repetition++)
        {
            bloch.Rotate(90 * 0.9, 0);
            for (var i = 0; i < 4; i++)
            {
                bloch.Wait(5, 1);
                bloch.Rotate(180 * 0.9, 90);
                bloch.Wait(5, 1);
            }

            bloch.Rotate(-90 * 0.9, 0);
            bloch.Recover(20);
            bloch.Rotate(90 * 0.9, 0);
            bloch.Wait(8, 1);
            bloch.Rotate(180 * 0.9, 90);
            bloch.Wait(8, 1);
            signal = bloch.Signed;
            bloch.Recover(1500 - 76);
        }

        Assert.Equal(signal, Signed(Series(new SpinEcho(1500, 16, 90, 180), new T2Preparation(40, 4, 20)), Lane(1000, 60, 0.9)), Tolerance);
    }

    [Fact]
    public void GradientEchoTrain_AfterAnInversion_IsThatOfTheBlochEquation()
    {
        var bloch = new ReferenceBloch(800, 40, 1);
        var echoes = new double[24];
        for (var repetition = 0; repetition < 12; repetition++)
        {
            bloch.Multiply(-0.95);
            bloch.Recover(400);
            for (var i = 0; i < echoes.Length; i++)
            {
                bloch.Rotate(12, 0);
                bloch.Wait(3);
                echoes[i] = bloch.Signed;
                bloch.Recover(i < echoes.Length - 1 ? 4 : 1200 - 400 - 23 * 7 - 3);
            }
        }

        var series = Series(
            new SpoiledGradientEchoTrain(1200, 3, 12, 7, 24, EncodingOrder.Centric), Inversion(400, new EfficiencyInversion("f", 0.95)));
        Assert.All(echoes.Zip(Echoes(series, Lane(800, 40))), pair => Assert.Equal(pair.First, pair.Second, Tolerance));
        Assert.Equal(echoes[0], Signed(series, Lane(800, 40)), Tolerance);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(0.03)]
    [InlineData(-0.09)]
    public void Balanced_OffResonance_IsThatOfTheBlochEquation(double kilohertz)
    {
        var bloch = new ReferenceBloch(150, 50, 1);
        double magnitude = 0;
        for (var repetition = 0; repetition < 400; repetition++)
        {
            bloch.Rotate(40, repetition % 2 == 0 ? 0 : 180);
            bloch.Wait(2.5, 0, kilohertz);
            magnitude = Math.Sqrt(bloch.Mean[0] * bloch.Mean[0] + bloch.Mean[1] * bloch.Mean[1]);
            bloch.Wait(2.5, 0, kilohertz);
        }

        var lanes = LaneTable.FromGrid([new Tissue("a", 150, 50, null, 1)], [new FieldPoint(1, 1000 * kilohertz)]);
        var table = SignalPredictor.Predict(Series(new BalancedGradientEcho(5, 2.5, 40)), Ideal, lanes);
        Assert.Equal(magnitude, table.Magnitude[0], 2e-6);
    }

    [Theory]
    [InlineData(50)]
    [InlineData(117)]
    public void RfSpoiled_SteadyState_IsThatOfTheBlochEquation(double increment)
    {
        var bloch = new ReferenceBloch(120, 20, 200);
        double magnitude = 0;
        for (var repetition = 0; repetition < 120; repetition++)
        {
            var phase = increment * repetition * (repetition + 1) / 2 % 360;
            bloch.Rotate(20, phase);
            bloch.Wait(2);
            magnitude = Math.Sqrt(bloch.Mean[0] * bloch.Mean[0] + bloch.Mean[1] * bloch.Mean[1]);
            bloch.Wait(6, 1);
        }

        var lanes = LaneTable.FromGrid([new Tissue("a", 120, 20, null, 1)], [new FieldPoint()]);
        var table = SignalPredictor.Predict(Series(new SpoiledGradientEcho(8, 2, 20, [], increment)), Ideal, lanes);
        Assert.Equal(magnitude, table.Magnitude[0], 2e-6);
    }

    [Fact]
    public void SpectralPulseOncePerSlice_SteadyState_IsThatOfTheBlochEquation()
    {
        var bloch = new ReferenceBloch(300, 80, 8);
        double signal = 0;
        const int Slices = 5;
        const double Interval = 600.0 / Slices;
        for (var repetition = 0; repetition < 12; repetition++)
        {
            for (var slice = 0; slice < Slices; slice++)
            {
                bloch.Rotate(100, 0);
                if (slice > 0)
                {
                    bloch.Recover(Interval);
                    continue;
                }

                bloch.Recover(4);
                bloch.Rotate(90, 0);
                bloch.Wait(7, 1);
                bloch.Rotate(180, 90);
                bloch.Wait(7, 1);
                signal = bloch.Signed;
                bloch.Recover(Interval - 18);
            }
        }

        var series = Series(new SpinEcho(600, 14, 90, 180), new SpectralSaturation(new HardPulse("saturation", 100), 4)) with { Timing = new SeriesTiming(Slices) };
        var lanes = LaneTable.FromGrid([new Tissue("fat", 300, 80, null, 1, IsFat: true)], [new FieldPoint()]);
        Assert.Equal(signal, SignalPredictor.Predict(series, Ideal, lanes).Signed[0], Tolerance);
    }
}
