using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Steady-state spin echoes and echo trains, with a flip-back pulse or without.</summary>
/// <param name="name">Name of the family.</param>
internal sealed class SpinEchoFamily(string name) : IProtocolFamily
{
    public string Name => name;

    public FamilyProtocol Protocol(CaseInputs inputs) => FamilyProtocol.Of(FamilyProtocol.SpinEchoOrTrain(inputs), inputs);

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question) => Protocol(inputs).Signals();
}

/// <summary>All echoes of a train, first repetition from equilibrium.</summary>
internal sealed class MultiEchoSpinEchoFamily : IProtocolFamily
{
    public string Name => "multi_echo_spin_echo";

    public FamilyProtocol Protocol(CaseInputs inputs)
    {
        var echoes = inputs.Has("n_echoes") ? inputs.Number("n_echoes") : inputs.Numbers("refocus_deg").Length;
        var protocol = FamilyProtocol.Of(FamilyProtocol.SpinEchoOrTrain(inputs, echoes * inputs.Number("esp_ms")), inputs);
        return protocol with { Series = protocol.Series with { Timing = new SeriesTiming(State: StartState.FirstShot) } };
    }

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question) => Protocol(inputs).Signals();
}

/// <summary>Spin echo with diffusion weighting; b given, or from the gradient lobes.</summary>
internal sealed class DiffusionSpinEchoFamily : IProtocolFamily
{
    public string Name => "diffusion_spin_echo";

    public FamilyProtocol Protocol(CaseInputs inputs) => FamilyProtocol.Of(
        new DiffusionSpinEcho(
            inputs.Number("TR_ms"), inputs.Number("TE_ms"), inputs.Number("flip_deg", 90), inputs.Number("refocus_deg", 180), BValueOf(inputs)),
        inputs);

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question) =>
        new Dictionary<string, ComputedQuantity>(Protocol(inputs).Signals()) { ["b_s_per_mm2"] = BValueOf(inputs) };

    private static double BValueOf(CaseInputs inputs) => inputs.OptionalNumber("b_s_per_mm2") ?? BValue.Trapezoids(
        inputs.Number("G_mT_per_m"), inputs.Number("delta_ms"), inputs.Number("Delta_ms"), inputs.Number("ramp_ms", 0));
}
