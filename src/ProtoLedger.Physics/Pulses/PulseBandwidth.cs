using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Pulses;

/// <summary>Nominal bandwidth of a pulse: the frequency that one slice (or slab) thickness of its gradient spans.</summary>
public static class PulseBandwidth
{
    /// <summary>Nominal bandwidth, Hz.</summary>
    /// <param name="pulse">A pulse with a shape and a duration above 0.</param>
    /// <returns>
    /// Windowed sinc: TBW/T, by definition. Hyperbolic secant: μβ/π, from Mz = 0 to Mz = 0 (Silver, Joseph, Hoult, Phys Rev A 1985;31:2753, from memory).
    /// Gaussian: full width at half height of its spectrum, √(2 ln 2)/(π s). Hard: full width at half height of |sinc|, 1.20671/T.
    /// Sampled: full width at half height of the magnitude of its spectrum, numerically.
    /// </returns>
    /// <exception cref="ArgumentException">The pulse has no shape or no duration.</exception>
    public static double Hz(RfPulse pulse) => pulse switch
    {
        WindowedSincPulse p => p.TimeBandwidth / (p.Duration * 1e-3),
        HyperbolicSecantPulse p => p.Mu * p.Beta / Math.PI,
        GaussianPulse p => Math.Sqrt(2 * Elementary.Log(2)) / (Math.PI * p.SigmaFraction * p.Duration * 1e-3),
        HardPulse { Duration: > 0 } p => 1.2067091288032283 / (p.Duration * 1e-3), // root of sin(πx/2)/(πx/2) = ½
        SampledPulse p => SpectrumWidth(p),
        _ => throw new ArgumentException($"Pulse '{pulse.Name}' has no bandwidth: only a shaped pulse of finite length selects a slice.", nameof(pulse)),
    };

    private static double SpectrumWidth(SampledPulse pulse)
    {
        var resolution = 1 / (pulse.Duration * 1e-3 * 64);
        var reach = 64 * Math.Max(8, pulse.AmplitudeHz.Count / 2);
        var magnitudes = new double[2 * reach + 1];
        for (var i = 0; i < magnitudes.Length; i++)
            magnitudes[i] = Spectrum(pulse, (i - reach) * resolution);
        var half = magnitudes.Max() / 2;
        var first = Array.FindIndex(magnitudes, m => m >= half);
        var last = Array.FindLastIndex(magnitudes, m => m >= half);
        return (last - first) * resolution;
    }

    private static double Spectrum(SampledPulse pulse, double frequencyHz)
    {
        var step = pulse.Duration * 1e-3 / pulse.AmplitudeHz.Count;
        double real = 0, imaginary = 0;
        for (var k = 0; k < pulse.AmplitudeHz.Count; k++)
        {
            var phase = pulse.PhaseDegrees[k] * (Math.PI / 180) - 2 * Math.PI * frequencyHz * (k + 0.5) * step;
            real += pulse.AmplitudeHz[k] * Elementary.Cos(phase);
            imaginary += pulse.AmplitudeHz[k] * Elementary.Sin(phase);
        }

        return Math.Sqrt(real * real + imaginary * imaginary);
    }
}
