namespace ProtoLedger.Physics.Observables;

/// <summary>Constants of the proton and the frequencies that follow from them.</summary>
public static class Proton
{
    /// <summary>Gyromagnetic ratio over 2π of the free proton, Hz/T.</summary>
    /// <remarks>CODATA 2018, 42.577478518(18) MHz/T; every frequency here uses it. Water's shielded proton is lower by 25.7 ppm.</remarks>
    public const double HzPerTesla = 42.577478518e6;

    /// <summary>Gyromagnetic ratio over 2π of the proton shielded in a sphere of water at 25 °C, Hz/T.</summary>
    /// <remarks>CODATA 2022, 42.57638543(17) MHz/T.</remarks>
    public const double ShieldedHzPerTesla = 42.57638543e6;

    private const double PlanckJouleSeconds = 6.62607015e-34;
    private const double BoltzmannJoulePerKelvin = 1.380649e-23;

    /// <summary>Larmor frequency, Hz.</summary>
    /// <param name="fieldStrength">B0, T, &gt; 0.</param>
    public static double LarmorHz(double fieldStrength) => HzPerTesla * fieldStrength;

    /// <summary>Frequency of a chemical shift, Hz, signed as the shift.</summary>
    /// <param name="ppm">Chemical shift, parts per million.</param>
    /// <param name="fieldStrength">B0, T, &gt; 0.</param>
    public static double ShiftHz(double ppm, double fieldStrength) => ppm * 1e-6 * HzPerTesla * fieldStrength;

    /// <summary>Thermal polarisation tanh(h f₀ / 2 k T), no unit.</summary>
    /// <param name="fieldStrength">B0, T, &gt; 0.</param>
    /// <param name="kelvin">Absolute temperature; 310.15 K is the body's.</param>
    /// <remarks>Boltzmann statistics of a spin ½ (derived).</remarks>
    public static double Polarization(double fieldStrength, double kelvin = 310.15) =>
        Math.Tanh(PlanckJouleSeconds * LarmorHz(fieldStrength) / (2 * BoltzmannJoulePerKelvin * kelvin));
}
