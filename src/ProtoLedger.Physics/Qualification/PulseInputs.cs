using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Reads a pulse under the names of the reference files.</summary>
internal static class PulseInputs
{
    /// <param name="inputs">The object that holds the pulse's members.</param>
    /// <param name="shape">Shape where the family has only one; null to read <c>shape</c>.</param>
    public static RfPulse Read(CaseInputs inputs, string? shape = null)
    {
        shape ??= inputs.Text("shape");
        var duration = inputs.Number("duration_ms");
        return shape switch
        {
            "hard" => new HardPulse(shape, inputs.Number("flip_deg"), duration),
            "hamming_sinc" => new WindowedSincPulse(shape, inputs.Number("flip_deg"), duration, inputs.Number("time_bandwidth")),
            "gaussian" => new GaussianPulse(shape, inputs.Number("flip_deg"), duration, inputs.Number("sigma_fraction")),
            "hs" => new HyperbolicSecantPulse(shape, duration, inputs.Number("beta_rad_per_s"), inputs.Number("mu"), inputs.Number("peak_B1_Hz")),
            _ => throw new ArgumentException($"/shape: '{shape}' is none of hard, hamming_sinc, gaussian, hs."),
        };
    }
}
