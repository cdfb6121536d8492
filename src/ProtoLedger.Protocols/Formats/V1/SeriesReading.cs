using System.Text.Json.Nodes;
using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Protocols.Formats.V1;

/// <summary>The acquisition of one series from a checked tree; what the document leaves open takes the model's defaults.</summary>
internal static class SeriesReading
{
    private static readonly SeriesTiming DefaultTiming = new();
    private static readonly SeriesGeometry DefaultGeometry = new();

    public static Series Acquisition(JsonNode series) => new(
        [.. series.Items("preparations").Select(Preparation)],
        Readout(series["readout"]!),
        series["timing"] is { } timing ? Timing(timing) : DefaultTiming,
        series["geometry"] is { } geometry ? Geometry(geometry) : DefaultGeometry);

    private static Preparation Preparation(JsonNode node) => node.Text("kind") switch
    {
        "inversion" => new Inversion(
            node.Number("InversionTime"),
            node.Word("inversionTimeEnd", InversionTimeEnd.Excitation),
            PulseReading.Reference(node["pulse"]),
            node.OptionalNumber("slabThickness")),
        "t2Preparation" => new T2Preparation(
            node.Number("preparationTime"), node.Whole("refocusingPulses", 4), node.Number("delay", 5)),
        "spectralSaturation" => new SpectralSaturation(
            PulseReading.Reference(node["pulse"]), node.Number("delay"), node.Number("carrierDetune", 0)),
        "spectralInversion" => new SpectralInversion(
            node.Number("InversionTime"), PulseReading.Reference(node["pulse"]), node.Number("carrierDetune", 0)),
        var kind => throw new ArgumentException($"No reader for preparation kind {kind}."),
    };

    private static Readout Readout(JsonNode node)
    {
        var (repetition, echo, excitation) = (node.Number("RepetitionTime"), node.Number("EchoTime"), node.Number("ExcitationFlipAngle"));
        return node.Text("kind") switch
        {
            "spinEcho" => new SpinEcho(repetition, echo, excitation, node.Numbers("RefocusingFlipAngles")[0]),
            "echoTrain" => new EchoTrain(
                repetition, echo, excitation, node.Number("echoSpacing"), node.Whole("EchoTrainLength", 1),
                node.Numbers("RefocusingFlipAngles"), node.OptionalNumber("flipBackAngle")),
            "spoiledGradientEcho" => new SpoiledGradientEcho(
                repetition, echo, excitation, node.Numbers("furtherEchoTimes"), node.OptionalNumber("spoilingIncrement")),
            "balancedGradientEcho" => new BalancedGradientEcho(repetition, echo, excitation),
            "spoiledGradientEchoTrain" => new SpoiledGradientEchoTrain(
                repetition, echo, excitation, node.Number("readoutSpacing"), node.Whole("readoutTrainLength", 1),
                node.Word("encodingOrder", EncodingOrder.Linear)),
            "diffusionSpinEcho" => new DiffusionSpinEcho(
                repetition, echo, excitation, node.Numbers("RefocusingFlipAngles")[0], node.Number("DiffusionBValue")),
            var kind => throw new ArgumentException($"No reader for readout kind {kind}."),
        };
    }

    private static SeriesTiming Timing(JsonNode node) => new(
        node.Whole("slices", 1),
        node.Word("sliceOrder", DefaultTiming.SliceOrder),
        node.Whole("concatenations", DefaultTiming.Concatenations),
        node.Whole("dummyRepetitions", DefaultTiming.DummyRepetitions),
        node.Word("trigger", DefaultTiming.Trigger),
        node["heartRate"] is { } rate ? new RateRange(rate.Number("low"), rate.Number("high")) : default,
        node.Word("state", DefaultTiming.State));

    private static SeriesGeometry Geometry(JsonNode node)
    {
        var (field, matrix) = (node.Numbers("FieldOfView"), node.Numbers("matrix"));
        return new SeriesGeometry(
            node.Whole("dimensions", DefaultGeometry.Dimensions),
            field[0],
            field[1],
            (int)matrix[0],
            (int)matrix[1],
            node.Number("SliceThickness"),
            node.Number("sliceGap", DefaultGeometry.SliceGap),
            node.Number("NumberOfAverages", DefaultGeometry.NumberOfAverages),
            node.Number("PixelBandwidth", DefaultGeometry.PixelBandwidth),
            node.Number("acceleration", DefaultGeometry.Acceleration),
            node.Number("partialFourier", DefaultGeometry.PartialFourier),
            node.Word("phaseDirection", DefaultGeometry.PhaseDirection));
    }
}
