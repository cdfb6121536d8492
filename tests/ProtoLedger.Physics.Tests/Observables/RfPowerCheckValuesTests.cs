using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;

namespace ProtoLedger.Physics.Tests.Observables;

/// <summary>Radio-frequency energy; power goes with B0² · flip² · duty for a fixed pulse shape (derived). Values computed apart from this program.</summary>
public sealed class RfPowerCheckValuesTests
{
    private static Series Train(double refocusing, double repetitionTime = 4000, int slices = 20) =>
        new([], new EchoTrain(repetitionTime, 80, 90, 10, 16, [refocusing]), new SeriesTiming(slices), new SeriesGeometry());

    private static double Refocusing(double flipAngle) =>
        RelativeRfPower.Energy(new WindowedSincPulse("refocusing", flipAngle, 2.56, 4));

    [Theory]
    [InlineData(120, 180, 0.444444)]
    [InlineData(150, 180, 0.694444)]
    [InlineData(60, 90, 0.444444)]
    public void Energy_GoesWithTheSquareOfTheFlip(double after, double before, double expected) =>
        Approximately.Relative(expected, Refocusing(after) / Refocusing(before), 1e-5);

    [Fact]
    public void Between_FieldsOfThreeAndOneAndAHalf_IsFour() => Approximately.Relative(4, RelativeRfPower.Between(Train(180), 1.5, Train(180), 3), 1e-12);

    [Fact]
    public void Between_LowerFlipAtHigherField()
    {
        var series = new Series([], new SpoiledGradientEcho(10, 3, 60, []), new SeriesTiming(), new SeriesGeometry());
        var lower = series with { Readout = new SpoiledGradientEcho(10, 3, 40, []) };

        Approximately.Relative(1.77778, RelativeRfPower.Between(series, 1.5, lower, 3), 1e-5);
    }

    /// <summary>B1 of a hard pulse: flip / (γ duration), microtesla by the shielded proton.</summary>
    [Theory]
    [InlineData(90, 1, 5.87180)]
    [InlineData(180, 1, 11.7436)]
    [InlineData(180, 2, 5.87180)]
    [InlineData(120, 1, 7.82907)]
    public void Energy_OfAHardPulse_IsItsFieldSquaredTimesItsLength(double flipAngle, double duration, double expected)
    {
        var field = Math.Sqrt(RelativeRfPower.Energy(new HardPulse("hard", flipAngle, duration)) / (duration * 1e-3)) / Proton.ShieldedHzPerTesla;

        Approximately.Relative(expected, field * 1e6, 1e-5);
    }

    /// <summary>Root mean square of B1 over a repetition, 20 slices of hard pulses of 2 ms.</summary>
    [Theory]
    [InlineData(1, 180, 500, 1.85683)]
    [InlineData(16, 180, 4000, 2.36700)]
    [InlineData(16, 120, 4000, 1.59310)]
    public void RootMeanSquare_OfHardPulses(int refocusings, double angle, double repetitionTime, double expected)
    {
        var energy = RelativeRfPower.Energy(new HardPulse("excitation", 90, 2)) + refocusings * RelativeRfPower.Energy(new HardPulse("refocusing", angle, 2));

        Approximately.Relative(expected, Math.Sqrt(20 * energy / (repetitionTime * 1e-3)) / Proton.ShieldedHzPerTesla * 1e6, 1e-5);
    }

    [Fact]
    public void MeanSquare_CountsInversionAndSaturation()
    {
        var plain = Train(150);
        var inverted = plain with { Preparations = [new Inversion(2400, InversionTimeEnd.Excitation, EfficiencyInversion.Default)] };
        var pulse = new GaussianPulse("saturation", 100, 8, 1 / 6.0);
        var saturated = plain with { Preparations = [new SpectralSaturation(pulse, 3)] };
        var perSecond = 20 / 4.0;

        Approximately.Relative(
            perSecond * RelativeRfPower.Energy(RelativeRfPower.AssumedInversion), RelativeRfPower.MeanSquare(inverted) - RelativeRfPower.MeanSquare(plain), 1e-9);
        Approximately.Relative(perSecond * RelativeRfPower.Energy(pulse), RelativeRfPower.MeanSquare(saturated) - RelativeRfPower.MeanSquare(plain), 1e-9);
    }

    /// <summary>More slices in the same repetition time: power in proportion.</summary>
    [Fact]
    public void Between_MoreSlices_IsInProportion() =>
        Approximately.Relative(1.5, RelativeRfPower.Between(Train(150), 3, Train(150, slices: 30), 3), 1e-12);
}
