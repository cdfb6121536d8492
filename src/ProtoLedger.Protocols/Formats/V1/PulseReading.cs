using System.Text.Json.Nodes;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Formats.V1;

/// <summary>Radio-frequency pulses from a checked tree.</summary>
internal static class PulseReading
{
    /// <summary>A pulse by name or in place; the default adiabatic inversion where the key is left out.</summary>
    public static RfPulse Reference(JsonNode? node) => node switch
    {
        null => new PulseReference(EfficiencyInversion.Default.Name),
        JsonObject inline => Inline("inline", inline),
        _ => new PulseReference(node.GetValue<string>()),
    };

    public static RfPulse Inline(string name, JsonNode node) => node.Text("kind") switch
    {
        "efficiency" => new EfficiencyInversion(name, node.Number("efficiency"), node.Number("efficiencySd", 0)),
        "hard" => new HardPulse(name, node.Number("flipAngle"), node.Number("duration")),
        "windowedSinc" => new WindowedSincPulse(name, node.Number("flipAngle"), node.Number("duration"), node.Number("timeBandwidth")),
        "gaussian" => new GaussianPulse(name, node.Number("flipAngle"), node.Number("duration"), node.Number("sigmaFraction")),
        "hyperbolicSecant" => new HyperbolicSecantPulse(
            name, node.Number("duration"), node.Number("beta"), node.Number("mu"), node.Number("peakB1")),
        "sampled" => new SampledPulse(name, node.Number("duration"), node.Numbers("amplitude"), node.Numbers("phase")),
        var kind => throw new ArgumentException($"No reader for pulse kind {kind}."),
    };
}
