using static ProtoLedger.Protocols.Formats.V1.Shapes.Make;

namespace ProtoLedger.Protocols.Formats.V1.Shapes;

/// <summary>Shapes of radio-frequency pulses.</summary>
internal static class PulseShapes
{
    private static readonly Member Duration = Required("duration", Above(0, 200, "ms"), "pulse duration");
    private static readonly Member FlipAngle = Required("flipAngle", Above(0, 360, "degrees"), "pulse flip angle");

    public static VariantShape Pulse { get; } = Variants(
        "pulse",
        ("efficiency", [
            Required("efficiency", From(0, 1), "inversion efficiency"),
            Optional("efficiencySd", From(0, 0.5), "spread of the inversion efficiency")]),
        ("hard", [FlipAngle, Required("duration", From(0, 200, "ms"), "pulse duration")]),
        ("windowedSinc", [FlipAngle, Duration, Required("timeBandwidth", Above(0, 50), "time-bandwidth product")]),
        ("gaussian", [FlipAngle, Duration, Required("sigmaFraction", Above(0, 0.5), "Gaussian width over duration")]),
        ("hyperbolicSecant", [
            Duration,
            Required("beta", Above(0, 20000, "rad/s"), "sweep rate β"),
            Required("mu", Above(0, 100), "sweep width μ"),
            Required("peakB1", Above(0, 5000, "Hz"), "peak B1")]),
        ("sampled", [
            Duration,
            Required("amplitude", List(From(-5000, 5000, "Hz"), 1, 4096), "amplitude samples"),
            Required("phase", List(From(-3600, 3600, "degrees"), 1, 4096), "phase samples")]));

    public static NameOrObjectShape Reference { get; } = new(PulseName, Pulse);
}
