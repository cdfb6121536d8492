using static ProtoLedger.Protocols.Formats.V1.Shapes.Make;

namespace ProtoLedger.Protocols.Formats.V1.Shapes;

/// <summary>Shapes of one series: preparations, readout, timing, geometry.</summary>
internal static class SeriesShapes
{
    private static readonly Member RepetitionTime =
        Required("RepetitionTime", Above(0, 60000, "ms"), "repetition time", "RepetitionTime", "(0018,0080)");

    private static readonly Member EchoTime = Required("EchoTime", From(0, 1000, "ms"), "echo time", "EchoTime", "(0018,0081)");

    private static readonly Member EffectiveEchoTime =
        Required("EchoTime", Above(0, 2000, "ms"), "effective echo time", "EchoTime", "(0018,0081)");

    private static readonly Member Excitation =
        Required("ExcitationFlipAngle", Above(0, 180, "degrees"), "excitation flip angle", "FlipAngle", "(0018,1314)");

    private static readonly Member InversionTime =
        Required("InversionTime", Above(0, 20000, "ms"), "inversion time", "InversionTime", "(0018,0082)");

    private static readonly Member CarrierDetune = Optional("carrierDetune", From(-2000, 2000, "Hz"), "carrier offset from fat");

    public static VariantShape Preparation { get; } = Variants(
        "preparation",
        ("inversion", [
            InversionTime,
            Optional("inversionTimeEnd", OneOf("excitation", "kSpaceCentre", "nextInversion"), "end point of the inversion time"),
            Optional("pulse", PulseShapes.Reference, "inversion pulse"),
            Optional("slabThickness", From(0.5, 100), "inversion slab over slice thickness")]),
        ("t2Preparation", [
            Required("preparationTime", Above(0, 500, "ms"), "T2 preparation time"),
            Optional("refocusingPulses", Whole(1, 64), "refocusing pulses of the T2 preparation"),
            Optional("delay", From(0, 1000, "ms"), "delay after the T2 preparation")]),
        ("spectralSaturation", [
            Required("pulse", PulseShapes.Reference, "fat saturation pulse"),
            Required("delay", From(0, 1000, "ms"), "delay after the fat saturation"),
            CarrierDetune]),
        ("spectralInversion", [InversionTime, Required("pulse", PulseShapes.Reference, "fat inversion pulse"), CarrierDetune]));

    public static VariantShape Readout { get; } = Variants(
        "readout",
        ("spinEcho", [RepetitionTime, EffectiveEchoTime with { Label = "echo time" }, Excitation, Refocusing(1, 1)]),
        ("echoTrain", [
            RepetitionTime,
            EffectiveEchoTime,
            Excitation,
            Required("echoSpacing", Above(0, 100, "ms"), "echo spacing"),
            Required("EchoTrainLength", Whole(1, 512), "echo train length", "EchoTrainLength", "(0018,0091)"),
            Refocusing(1, 512),
            Optional("flipBackAngle", From(-180, 180, "degrees"), "flip-back angle")]),
        ("spoiledGradientEcho", [
            RepetitionTime,
            EchoTime,
            Excitation,
            Optional("furtherEchoTimes", List(Above(0, 200, "ms"), 0, 16), "further echo times"),
            Optional("spoilingIncrement", From(0, 360, "degrees"), "phase increment of RF spoiling")]),
        ("balancedGradientEcho", [RepetitionTime, EchoTime, Excitation]),
        ("spoiledGradientEchoTrain", [
            RepetitionTime,
            EchoTime,
            Excitation,
            Required("readoutSpacing", Above(0, 100, "ms"), "spacing of excitations in the train"),
            Required("readoutTrainLength", Whole(1, 1024), "excitations in the train"),
            Required("encodingOrder", OneOf("linear", "centric"), "order of encoding")]),
        ("diffusionSpinEcho", [
            RepetitionTime,
            EffectiveEchoTime with { Label = "echo time" },
            Excitation,
            Refocusing(1, 1),
            Required("DiffusionBValue", From(0, 10000, "s/mm²"), "b value", "DiffusionBValue", "(0018,9087)")]));

    public static ObjectShape Timing { get; } = Line(
        "timing",
        Required("slices", Whole(1, 1024), "slices"),
        Optional("sliceOrder", OneOf("interleaved", "ascending", "descending"), "slice order"),
        Optional("concatenations", Whole(1, 64), "concatenations"),
        Optional("dummyRepetitions", Whole(0, 1000), "dummy repetitions"),
        Optional("trigger", OneOf("none", "cardiac", "respiratory"), "trigger"),
        Optional("heartRate", Range(From(4, 250, "1/min"), "rate of the trigger"), "rate of the trigger"),
        Optional("state", OneOf("steady", "firstShot", "afterDummies"), "state from which the prediction starts"));

    public static ObjectShape Geometry { get; } = Line(
        "geometry",
        Optional("dimensions", Whole(2, 3), "dimensions of the encoding"),
        Required("FieldOfView", List(From(10, 2000, "mm"), 2, 2), "field of view (read, phase)"),
        Required("matrix", List(Whole(16, 4096), 2, 2), "matrix (read, phase)", "AcquisitionMatrix", "(0018,1310)"),
        Required("SliceThickness", Above(0, 500, "mm"), "slice thickness", "SliceThickness", "(0018,0050)"),
        Optional("sliceGap", From(0, 500, "mm"), "slice gap"),
        Optional("NumberOfAverages", From(1, 64), "averages", "NumberOfAverages", "(0018,0083)"),
        Optional("PixelBandwidth", Above(0, 20000, "Hz/pixel"), "bandwidth", "PixelBandwidth", "(0018,0095)"),
        Optional("acceleration", From(1, 16), "parallel acceleration", "ParallelReductionFactorInPlane", "(0018,9069)"),
        Optional("partialFourier", From(0.5, 1), "partial Fourier"),
        Optional("phaseDirection", OneOf("row", "column"), "phase direction", "InPlanePhaseEncodingDirection", "(0018,1312)"));

    /// <summary>A series alone, as the prediction of an unsaved series takes it.</summary>
    public static ObjectShape Bare { get; } = Block(
        "series",
        Optional("preparations", List(Preparation, 0, 8), "preparations"),
        Required("readout", Readout, "readout"),
        Optional("timing", Timing, "timing"),
        Optional("geometry", Geometry, "geometry"));

    public static ObjectShape Range(NumberShape number, string label) => Line(
        "range",
        Required("low", number, "lowest " + label),
        Required("high", number, "highest " + label));

    private static Member Refocusing(int minimum, int maximum) =>
        Required("RefocusingFlipAngles", List(Above(0, 180, "degrees"), minimum, maximum), "refocusing flip angles");
}
