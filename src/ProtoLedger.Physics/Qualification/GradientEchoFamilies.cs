using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Spoiled gradient echo, ideal spoiling or RF spoiling.</summary>
internal sealed class SpoiledGradientEchoFamily : IProtocolFamily
{
    public string Name => "spoiled_gradient_echo";

    public FamilyProtocol Protocol(CaseInputs inputs)
    {
        double? increment = inputs.Text("spoiling") switch
        {
            "ideal" => null,
            "rf" => inputs.Number("rf_increment_deg"),
            var spoiling => throw new ArgumentException($"/spoiling: '{spoiling}' is none of ideal, rf."),
        };
        var protocol = FamilyProtocol.Of(
            new SpoiledGradientEcho(inputs.Number("TR_ms"), inputs.Number("TE_ms"), inputs.Number("flip_deg"), [], increment), inputs);
        if (increment is null && double.IsNaN(protocol.Lanes.T2Star[0]))
            protocol.Lanes.T2Star[0] = protocol.Lanes.T2[0];
        return protocol;
    }

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question) => Protocol(inputs).Signals();
}

/// <summary>Balanced gradient echo against off-resonance.</summary>
internal sealed class BalancedFamily : IProtocolFamily
{
    public string Name => "balanced_ssfp";

    public FamilyProtocol Protocol(CaseInputs inputs)
    {
        var repetition = inputs.Number("TR_ms");
        return FamilyProtocol.Of(new BalancedGradientEcho(repetition, inputs.Number("TE_ms", repetition / 2), inputs.Number("flip_deg")), inputs);
    }

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question)
    {
        var protocol = Protocol(inputs);
        var result = protocol.Signals();
        var readout = (BalancedGradientEcho)protocol.Series.Readout with { EchoTime = 0 };
        var after = SignalPredictor.Predict(protocol.Series with { Readout = readout }, FamilyProtocol.Setting, protocol.Lanes);
        result["signal_after_pulse"] = after.Magnitude[0];
        result["mz_after_pulse"] = after.LongitudinalAtEnd[0];
        return result;
    }
}

/// <summary>Inversion, then a train of spoiled gradient echoes and a recovery.</summary>
internal sealed class InversionGradientTrainFamily : IProtocolFamily
{
    public string Name => "mprage";

    public FamilyProtocol Protocol(CaseInputs inputs)
    {
        var spacing = inputs.Number("readout_spacing_ms");
        var count = (int)inputs.Number("n_readouts");
        var centre = inputs.Has("center_index") ? (int)inputs.Number("center_index") : count / 2;
        if (centre < 0 || centre >= count)
            throw new ArgumentException($"/center_index: {centre} must lie in [0, {count - 1}].");
        var readout = new SpoiledGradientEchoTrain(
            inputs.Number("TR_ms"), inputs.Number("TE_ms"), inputs.Number("flip_deg"), spacing, count, EncodingOrder.Linear);
        return FamilyProtocol.Of(readout, inputs, FamilyProtocol.Inversion(inputs, inputs.Number("TI_ms") - centre * spacing)) with { Echo = centre };
    }

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question)
    {
        var result = Protocol(inputs).Signals();
        var echoes = result["echoes_signed"].Values;
        result["first_readout_signed"] = echoes[0];
        result["last_readout_signed"] = echoes[^1];
        return result;
    }
}
