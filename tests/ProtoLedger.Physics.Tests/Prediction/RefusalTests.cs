using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using static ProtoLedger.Physics.Tests.Predictions;

namespace ProtoLedger.Physics.Tests.Prediction;

/// <summary>What cannot be computed is refused with the field, the value and the limit; nothing gives NaN.</summary>
public sealed class RefusalTests
{
    public static TheoryData<string, string> BadSeries() => new()
    {
        { "repetition", "RepetitionTime: 15 ms is too short" },
        { "negative", "RepetitionTime: -1 ms must be positive" },
        { "nan", "EchoTime: NaN ms must be finite" },
        { "angle", "ExcitationFlipAngle: 0° must lie in (0, 180]" },
        { "echo", "EchoTime: 25 ms must be an echo of the train" },
        { "late", "EchoTime: 90 ms must be an echo of the train" },
        { "angles", "RefocusingFlipAngles: 3 angles" },
        { "length", "EchoTrainLength: 0 must lie in [1, 1024]" },
        { "inversion", "preparations/0/InversionTime: 0 ms must be positive" },
        { "efficiency", "preparations/0/pulse/efficiency: 1.2 must lie in [0, 1]" },
        { "order", "would play after" },
        { "next", "ends at the next inversion, but none follows" },
        { "slices", "do not fit in a RepetitionTime" },
        { "spacing", "EchoTime: 9 ms must not exceed the readoutSpacing" },
    };

    [Theory]
    [MemberData(nameof(BadSeries))]
    public void Predict_BadSeries_NamesTheField(string name, string message)
    {
        var train = new EchoTrain(3000, 20, 90, 10, 4, [150]);
        var series = name switch
        {
            "repetition" => Series(new SpinEcho(15, 20, 90, 180)),
            "negative" => Series(new SpinEcho(-1, 20, 90, 180)),
            "nan" => Series(new SpinEcho(500, double.NaN, 90, 180)),
            "angle" => Series(new SpinEcho(500, 20, 0, 180)),
            "echo" => Series(train with { EchoTime = 25 }),
            "late" => Series(train with { EchoTime = 90 }),
            "angles" => Series(train with { RefocusingFlipAngles = [1, 2, 3] }),
            "length" => Series(train with { EchoTrainLength = 0 }),
            "inversion" => Series(train, Inversion(0)),
            "efficiency" => Series(train, Inversion(100, new EfficiencyInversion("f", 1.2))),
            "order" => Series(train, Inversion(100), Inversion(200)),
            "next" => Series(train, Inversion(100) with { End = InversionTimeEnd.NextInversion }),
            "slices" => Series(train, new SpectralSaturation(new HardPulse("s", 90), 2)) with { Timing = new SeriesTiming(100) },
            _ => Series(new SpoiledGradientEchoTrain(2000, 9, 9, 7, 10, EncodingOrder.Linear)),
        };

        var error = Assert.Throws<ArgumentException>(() => SignalPredictor.Predict(series, Ideal, Lane(1000, 100)));

        Assert.Contains(message, error.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("T1", 0)]
    [InlineData("T1", double.NaN)]
    [InlineData("T2", -5)]
    [InlineData("b1Scale", 0)]
    [InlineData("b1Scale", 5)]
    [InlineData("unpreparedInflow", 1.5)]
    [InlineData("offResonanceHz", double.PositiveInfinity)]
    [InlineData("protonDensity", -1)]
    public void Predict_BadLane_NamesColumnLaneAndLimit(string column, double value)
    {
        var lanes = LaneTable.FromGrid([.. Enumerable.Range(0, 7).Select(_ => new Tissue("a", 1000, 100, null, 1))], [new FieldPoint()]);
        var target = column switch
        {
            "T1" => lanes.T1,
            "T2" => lanes.T2,
            "b1Scale" => lanes.B1Scale,
            "unpreparedInflow" => lanes.UnpreparedInflow,
            "protonDensity" => lanes.ProtonDensity,
            _ => lanes.OffResonanceHz,
        };
        target[5] = value;

        var error = Assert.Throws<ArgumentException>(() => SignalPredictor.Predict(Series(new SpinEcho(500, 20, 90, 180)), Ideal, lanes));

        Assert.StartsWith($"{column}: {value} ", error.Message, StringComparison.Ordinal);
        Assert.Contains("in lane 5 must lie in", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Predict_GradientEchoOfUnknownT2Star_IsRefused()
    {
        var lanes = LaneTable.FromGrid([new Tissue("a", 1000, 100, null, 1)], [new FieldPoint()]);

        var error = Assert.Throws<ArgumentException>(() => SignalPredictor.Predict(Series(new SpoiledGradientEcho(100, 5, 30, [])), Ideal, lanes));

        Assert.StartsWith("T2star: unknown for lane 0", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Predict_DiffusionOfUnknownCoefficient_IsRefused()
    {
        var lanes = LaneTable.FromGrid([new Tissue("a", 1000, 100, null, 1)], [new FieldPoint()]);

        var error = Assert.Throws<ArgumentException>(() => SignalPredictor.Predict(Series(new DiffusionSpinEcho(3000, 80, 90, 180, 1000)), Ideal, lanes));

        Assert.StartsWith("apparentDiffusionCoefficient: unknown for lane 0", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Predict_Assumptions_NameTheInversionPulseAndTheState()
    {
        var table = SignalPredictor.Predict(Series(new SpinEcho(3000, 20, 90, 180), Inversion(200, EfficiencyInversion.Default)), Ideal, Lane(1000, 100));

        Assert.Contains(table.Assumptions, a => a.Code == "inversionPulse" && a.Text.Contains("'adiabatic'", StringComparison.Ordinal) && a.Text.Contains("0.96", StringComparison.Ordinal));
        Assert.Contains(table.Assumptions, a => a.Code == "steadyState");
        Assert.Equal(table.Assumptions.Count, table.Assumptions.Select(a => a.Code).Distinct().Count());
    }
}
