using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Mz after a pulse on equilibrium, over off-resonance.</summary>
internal sealed class InversionPulsesFamily : IQualificationFamily
{
    public string Name => "inversion_pulses";

    public IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question)
    {
        var pulse = PulseInputs.Read(inputs);
        var offResonance = inputs.Numbers("off_resonance_Hz");
        var (b1, kept, recovered) = (new double[offResonance.Length], new double[offResonance.Length], new double[offResonance.Length]);
        Array.Fill(b1, inputs.Number("B1", 1));
        if (inputs.Has("T1_ms") || inputs.Has("T2_ms"))
        {
            var (t1, t2) = (new double[b1.Length], new double[b1.Length]);
            Array.Fill(t1, inputs.Number("T1_ms", double.PositiveInfinity));
            Array.Fill(t2, inputs.Number("T2_ms", double.PositiveInfinity));
            PulseResponse.Longitudinal(pulse, b1, offResonance, t1, t2, kept, recovered);
        }
        else
        {
            PulseResponse.Longitudinal(pulse, b1, offResonance, kept);
        }

        double[] mz = [.. kept.Select((k, i) => k + recovered[i])];
        return new Dictionary<string, ComputedQuantity> { ["mz"] = inputs.IsList("off_resonance_Hz") ? mz : mz[0] };
    }
}
