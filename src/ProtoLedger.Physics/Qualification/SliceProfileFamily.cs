using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Excitation and refocusing profiles, and a spin echo integrated through the slice.</summary>
internal sealed class SliceProfileFamily : IQualificationFamily
{
    public string Name => "slice_profile";

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question) => inputs.Text("kind") switch
    {
        "excitation" => Profile(inputs, SliceProfile.Excitation, "mxy", "mz"),
        "refocusing" => Profile(inputs, SliceProfile.Refocusing, "refocusing_efficiency", "mz_multiplier"),
        "integrated_spin_echo" => SpinEcho(inputs),
        var kind => throw new ArgumentException($"/kind: '{kind}' is none of excitation, refocusing, integrated_spin_echo."),
    };

    private delegate void ProfileOf(
        SliceSelection selection, double b1Scale, double offResonanceHz, ReadOnlySpan<double> z, Span<double> first, Span<double> second);

    private static Dictionary<string, ComputedQuantity> Profile(CaseInputs inputs, ProfileOf profile, string firstName, string secondName)
    {
        var z = inputs.Numbers("z");
        var (first, second) = (new double[z.Length], new double[z.Length]);
        profile(Selection(inputs, "pulse"), inputs.Number("B1", 1), inputs.Number("off_resonance_Hz", 0), z, first, second);
        return inputs.IsList("z")
            ? new() { [firstName] = first, [secondName] = second }
            : new() { [firstName] = first[0], [secondName] = second[0] };
    }

    private static Dictionary<string, ComputedQuantity> SpinEcho(CaseInputs inputs)
    {
        var echo = new SelectiveSpinEcho(
            Selection(inputs, "excitation"),
            Selection(inputs, "refocusing"),
            inputs.Number("TE_ms"),
            inputs.OptionalNumber("TR_ms"),
            inputs.Number("B1", 1),
            inputs.Number("off_resonance_Hz", 0),
            inputs.Number("z_max", 3));
        var signal = SliceProfile.Integrate(echo, inputs.Number("T1_ms"), inputs.Number("T2_ms"));
        return new() { ["signal_coherent"] = signal.Coherent, ["signal_magnitude_integral"] = signal.MagnitudeIntegral };
    }

    private static SliceSelection Selection(CaseInputs inputs, string name)
    {
        var pulse = inputs.Object(name);
        return new SliceSelection(PulseInputs.Read(pulse, pulse.Has("shape") ? null : "hamming_sinc"));
    }
}
