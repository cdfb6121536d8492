using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Chemically selective saturation, then excitation; fat (one line) and water apart.</summary>
internal sealed class FatSaturationFamily : IQualificationFamily
{
    public string Name => "fat_saturation";

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question)
    {
        var field = inputs.Number("B0_T");
        var b1 = inputs.Number("B1", 1);
        var pulse = inputs.Object("pulse");
        var response = new SpectralResponse(PulseInputs.Read(pulse), inputs.Number("carrier_detune_Hz", 0), field);
        var steady = new SpectralSteadyState(
            pulse.Number("duration_ms"),
            inputs.Number("delay_ms"),
            inputs.Number("TE_ms"),
            inputs.Number("TR_ms"),
            1,
            b1 * inputs.Number("flip_deg"),
            Refocusing(inputs) * b1);
        var offResonance = inputs.Number("off_resonance_Hz", 0);
        var result = new Dictionary<string, ComputedQuantity> { ["fat_shift_Hz"] = Proton.ShiftHz(FatSpectrum.CarrierPpm, field) };
        Add(result, "fat", Species(inputs.Object("fat"), FatSpectrum.CarrierPpm));
        Add(result, "water", Species(inputs.Object("water"), 0));
        return result;

        SpectralSignal Species(CaseInputs tissue, double shiftPpm)
        {
            var (t1, t2) = (tissue.Number("T1_ms"), tissue.Number("T2_ms"));
            return steady.Solve(response.Longitudinal(shiftPpm, b1, offResonance, t1, t2), t1, t2);
        }
    }

    private static double? Refocusing(CaseInputs inputs) => inputs.Text("readout") switch
    {
        "spin_echo" => inputs.Number("refocus_deg", 180),
        "gradient_echo" => null,
        var readout => throw new ArgumentException($"/readout: '{readout}' is none of spin_echo, gradient_echo."),
    };

    private static void Add(Dictionary<string, ComputedQuantity> result, string species, SpectralSignal signal)
    {
        result[$"{species}_mz_after_pulse"] = signal.AfterPulse;
        result[$"{species}_mz_before_excitation"] = signal.BeforeExcitation;
        result[$"{species}_signed"] = signal.Signed;
        result[$"{species}_signal"] = Math.Abs(signal.Signed);
    }
}
