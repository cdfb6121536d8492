using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Protocols.Tests.Validation;

public sealed class SeriesValidationTests
{
    private static readonly EchoTrain Train = new(5000, 48, 90, 8, 10, [160]);

    // Arithmetic by hand: readout 8 · 10.5 + 3 = 87 ms, inversion pulse 10 ms taken for one known by efficiency.
    [Theory]
    [InlineData(2000, 51, 1)] // long TI: pulse + readout = 97 ms a slice, 51 slices = 4947 ms
    [InlineData(2000, 52, 2)]
    [InlineData(60, 32, 1)] // short TI holds no other readout: 5 + 60 + 87 = 152 ms a slice, 32 slices = 4864 ms
    [InlineData(60, 33, 2)]
    public void Validate_SlicesOfAnInversionSeries_FitAsCountedByHand(double inversionTime, int slices, int needed)
    {
        var series = new Series([new Inversion(inversionTime, InversionTimeEnd.Excitation, EfficiencyInversion.Default)], Train, new SeriesTiming(slices), new SeriesGeometry());
        var errors = SeriesValidation.Validate(series, "");
        Assert.Equal(needed == 1 ? [] : [$"≥ {needed}"], errors.Select(error => error.Limit));
        Assert.Empty(SeriesValidation.Validate(series with { Timing = new SeriesTiming(slices, Concatenations: needed) }, ""));
    }

    [Fact]
    public void Validate_InversionTimesCountedToTheNextInversion_AddUp()
    {
        // First to second inversion 3000 ms, second to excitation 500 ms: 3500 ms before the excitation, readout 87 ms after it.
        Series With(double repetitionTime) => new(
            [
                new Inversion(3000, InversionTimeEnd.NextInversion, EfficiencyInversion.Default),
                new Inversion(500, InversionTimeEnd.Excitation, EfficiencyInversion.Default),
            ],
            Train with { RepetitionTime = repetitionTime },
            new SeriesTiming(),
            new SeriesGeometry());
        Assert.Empty(SeriesValidation.Validate(With(3587), ""));
        Assert.Equal("≥ 3587 ms", Assert.Single(SeriesValidation.Validate(With(3586), "")).Limit);
    }

    [Fact]
    public void Validate_InversionTimeToTheCentreOfKSpace_CountsTheTrainBeforeIt()
    {
        // Linear order, 176 excitations of 7 ms: the centre is number 88, 616 ms after the first, so 900 ms leave 284 ms before it.
        Series With(double inversionTime) => new(
            [new Inversion(inversionTime, InversionTimeEnd.KSpaceCentre, EfficiencyInversion.Default)],
            new SpoiledGradientEchoTrain(2300, 3, 9, 7, 176, EncodingOrder.Linear),
            new SeriesTiming(176),
            new SeriesGeometry(Dimensions: 3));
        Assert.Empty(SeriesValidation.Validate(With(900), ""));
        Assert.Equal("≥ 622 ms", Assert.Single(SeriesValidation.Validate(With(620), "")).Limit);
    }

    [Fact]
    public void Validate_SpectralSaturation_TakesItsTimeForEverySlice()
    {
        // 16 + 8 + 87 = 111 ms a slice: 45 slices in 5000 ms.
        Series With(int slices) => new([new SpectralSaturation(new GaussianPulse("fat", 100, 16, 0.2), 8)], Train, new SeriesTiming(slices), new SeriesGeometry());
        Assert.Empty(SeriesValidation.Validate(With(45), ""));
        Assert.NotEmpty(SeriesValidation.Validate(With(46), ""));
    }
}
