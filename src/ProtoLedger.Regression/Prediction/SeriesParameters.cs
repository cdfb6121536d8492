using System.Globalization;
using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Regression.Prediction;

/// <summary>Reads and sets numeric parameters of a series by the JSON pointer below it, such as <c>/readout/RepetitionTime</c>.</summary>
public static class SeriesParameters
{
    /// <summary>The value, or null where the series has no such parameter.</summary>
    /// <param name="series">The series.</param>
    /// <param name="pointer">JSON pointer below the series.</param>
    public static double? Get(Series series, string pointer)
    {
        ArgumentNullException.ThrowIfNull(series);
        ArgumentNullException.ThrowIfNull(pointer);
        return pointer.Split('/') is ["", var block, .. var rest]
            ? (block, rest) switch
            {
                ("preparations", [var index, var name]) => Preparation(series, index) is { } found ? Get(found, name) : null,
                ("readout", _) => Get(series.Readout, rest),
                ("timing", [var name]) => name switch
                {
                    "slices" => series.Timing.Slices,
                    "concatenations" => series.Timing.Concatenations,
                    "dummyRepetitions" => series.Timing.DummyRepetitions,
                    _ => null,
                },
                ("geometry", _) => Get(series.Geometry, string.Join('/', rest)),
                _ => null,
            }
            : null;
    }

    /// <summary>The series with another value.</summary>
    /// <param name="series">The series.</param>
    /// <param name="pointer">JSON pointer of a parameter that it has.</param>
    /// <param name="value">In the parameter's unit; rounded where it counts something.</param>
    /// <exception cref="ArgumentException">The series has no such parameter.</exception>
    public static Series With(Series series, string pointer, double value)
    {
        if (Get(series, pointer) is null)
            throw new ArgumentException($"The series has no numeric parameter at {pointer}.", nameof(pointer));
        var parts = pointer.Split('/');
        return parts[1] switch
        {
            "preparations" => series with
            {
                Preparations = [.. series.Preparations.Select((p, i) => i == int.Parse(parts[2], CultureInfo.InvariantCulture) ? With(p, parts[3], value) : p)],
            },
            "readout" => series with { Readout = With(series.Readout, parts[2..], value) },
            "timing" => series with { Timing = With(series.Timing, parts[2], (int)Math.Round(value)) },
            _ => series with { Geometry = With(series.Geometry, string.Join('/', parts[2..]), value) },
        };
    }

    private static Preparation? Preparation(Series series, string index) =>
        int.TryParse(index, NumberStyles.None, CultureInfo.InvariantCulture, out var i) && i < series.Preparations.Count ? series.Preparations[i] : null;

    private static double? Get(Preparation preparation, string name) => (preparation, name) switch
    {
        (Inversion p, "InversionTime") => p.InversionTime,
        (Inversion p, "slabThickness") => p.SlabThickness,
        (SpectralInversion p, "InversionTime") => p.InversionTime,
        (SpectralInversion p, "carrierDetune") => p.CarrierDetuneHz,
        (SpectralSaturation p, "delay") => p.Delay,
        (SpectralSaturation p, "carrierDetune") => p.CarrierDetuneHz,
        (T2Preparation p, "preparationTime") => p.PreparationTime,
        (T2Preparation p, "refocusingPulses") => p.RefocusingPulses,
        (T2Preparation p, "delay") => p.Delay,
        _ => null,
    };

    private static Preparation With(Preparation preparation, string name, double value) => (preparation, name) switch
    {
        (Inversion p, "InversionTime") => p with { InversionTime = value },
        (Inversion p, _) => p with { SlabThickness = value },
        (SpectralInversion p, "InversionTime") => p with { InversionTime = value },
        (SpectralInversion p, _) => p with { CarrierDetuneHz = value },
        (SpectralSaturation p, "delay") => p with { Delay = value },
        (SpectralSaturation p, _) => p with { CarrierDetuneHz = value },
        (T2Preparation p, "preparationTime") => p with { PreparationTime = value },
        (T2Preparation p, "refocusingPulses") => p with { RefocusingPulses = (int)Math.Round(value) },
        (T2Preparation p, _) => p with { Delay = value },
        _ => preparation,
    };

    private static double? Get(Readout readout, string[] path) => path switch
    {
        ["RepetitionTime"] => readout.RepetitionTime,
        ["EchoTime"] => readout.EchoTime,
        ["ExcitationFlipAngle"] => readout.ExcitationFlipAngle,
        ["echoSpacing"] => (readout as EchoTrain)?.EchoSpacing,
        ["EchoTrainLength"] => (readout as EchoTrain)?.EchoTrainLength,
        ["flipBackAngle"] => (readout as EchoTrain)?.FlipBackAngle,
        ["readoutSpacing"] => (readout as SpoiledGradientEchoTrain)?.ReadoutSpacing,
        ["readoutTrainLength"] => (readout as SpoiledGradientEchoTrain)?.ReadoutTrainLength,
        ["spoilingIncrement"] => (readout as SpoiledGradientEcho)?.SpoilingIncrement,
        ["DiffusionBValue"] => (readout as DiffusionSpinEcho)?.DiffusionBValue,
        ["RefocusingFlipAngles", var index] => Angle(readout, index),
        _ => null,
    };

    private static double? Angle(Readout readout, string index) => (readout, int.TryParse(index, NumberStyles.None, CultureInfo.InvariantCulture, out var i)) switch
    {
        (EchoTrain train, true) when i < train.RefocusingFlipAngles.Count => train.RefocusingFlipAngles[i],
        (SpinEcho echo, true) when i == 0 => echo.RefocusingFlipAngle,
        (DiffusionSpinEcho echo, true) when i == 0 => echo.RefocusingFlipAngle,
        _ => null,
    };

    private static Readout With(Readout readout, string[] path, double value) => (readout, path[0]) switch
    {
        (_, "RepetitionTime") => readout with { RepetitionTime = value },
        (_, "EchoTime") => readout with { EchoTime = value },
        (_, "ExcitationFlipAngle") => readout with { ExcitationFlipAngle = value },
        (EchoTrain r, "echoSpacing") => r with { EchoSpacing = value },
        (EchoTrain r, "EchoTrainLength") => r with { EchoTrainLength = (int)Math.Round(value) },
        (EchoTrain r, "flipBackAngle") => r with { FlipBackAngle = value },
        (EchoTrain r, _) => r with { RefocusingFlipAngles = [.. r.RefocusingFlipAngles.Select((a, i) => i == int.Parse(path[1], CultureInfo.InvariantCulture) ? value : a)] },
        (SpoiledGradientEchoTrain r, "readoutSpacing") => r with { ReadoutSpacing = value },
        (SpoiledGradientEchoTrain r, _) => r with { ReadoutTrainLength = (int)Math.Round(value) },
        (SpoiledGradientEcho r, _) => r with { SpoilingIncrement = value },
        (DiffusionSpinEcho r, "DiffusionBValue") => r with { DiffusionBValue = value },
        (DiffusionSpinEcho r, _) => r with { RefocusingFlipAngle = value },
        (SpinEcho r, _) => r with { RefocusingFlipAngle = value },
        _ => readout,
    };

    private static SeriesTiming With(SeriesTiming timing, string name, int value) => name switch
    {
        "slices" => timing with { Slices = value },
        "concatenations" => timing with { Concatenations = value },
        _ => timing with { DummyRepetitions = value },
    };

    private static double? Get(SeriesGeometry geometry, string path) => path switch
    {
        "FieldOfView/0" => geometry.FieldOfViewRead,
        "FieldOfView/1" => geometry.FieldOfViewPhase,
        "matrix/0" => geometry.MatrixRead,
        "matrix/1" => geometry.MatrixPhase,
        "SliceThickness" => geometry.SliceThickness,
        "sliceGap" => geometry.SliceGap,
        "NumberOfAverages" => geometry.NumberOfAverages,
        "PixelBandwidth" => geometry.PixelBandwidth,
        "acceleration" => geometry.Acceleration,
        "partialFourier" => geometry.PartialFourier,
        _ => null,
    };

    private static SeriesGeometry With(SeriesGeometry geometry, string path, double value) => path switch
    {
        "FieldOfView/0" => geometry with { FieldOfViewRead = value },
        "FieldOfView/1" => geometry with { FieldOfViewPhase = value },
        "matrix/0" => geometry with { MatrixRead = (int)Math.Round(value) },
        "matrix/1" => geometry with { MatrixPhase = (int)Math.Round(value) },
        "SliceThickness" => geometry with { SliceThickness = value },
        "sliceGap" => geometry with { SliceGap = value },
        "NumberOfAverages" => geometry with { NumberOfAverages = value },
        "PixelBandwidth" => geometry with { PixelBandwidth = value },
        "acceleration" => geometry with { Acceleration = value },
        _ => geometry with { PartialFourier = value },
    };
}
