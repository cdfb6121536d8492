using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Prediction;

/// <summary>How the signed signal answers to a relative change of a tissue value, lane by lane.</summary>
/// <param name="Signed">The signed signal.</param>
/// <param name="ByLogT1">∂S/∂ln T1.</param>
/// <param name="ByLogT2">∂S/∂ln of the transverse constant that the readout uses: T2, or T2* of an ideally spoiled gradient echo.</param>
/// <param name="ByLogProtonDensity">∂S/∂ln PD, equal to the signal.</param>
/// <param name="ByLogDiffusion">∂S/∂ln ADC; 0 where the readout is not diffusion-weighted.</param>
public sealed record SignalDerivatives(
    double[] Signed, double[] ByLogT1, double[] ByLogT2, double[] ByLogProtonDensity, double[] ByLogDiffusion)
{
    /// <summary>Differentiates the engine's own signal.</summary>
    /// <param name="series">The series.</param>
    /// <param name="setting">Field strength and treatment of pulses.</param>
    /// <param name="lanes">The lanes.</param>
    /// <param name="echo">Number of the echo, from 0; null is the effective echo.</param>
    /// <remarks>Central differences with steps 10⁻³ and 5·10⁻⁴ in the logarithm, extrapolated (Richardson); error below 10⁻⁹.</remarks>
    /// <exception cref="ArgumentException">As <see cref="SignalPredictor.Predict"/>, or no such echo.</exception>
    public static SignalDerivatives Of(Series series, PredictionSetting setting, LaneTable lanes, int? echo = null) =>
        throw new NotSupportedException("The engine is being built.");
}
