using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Prediction;

/// <summary>How the signed signal answers to a relative change of a tissue value, lane by lane.</summary>
/// <param name="Signed">The signed signal; of a balanced gradient echo the magnitude, since its phase turns with the field.</param>
/// <param name="ByLogT1">∂S/∂ln T1.</param>
/// <param name="ByLogT2">∂S/∂ln of the transverse constant that the readout uses: T2, or T2* of an ideally spoiled gradient echo.</param>
/// <param name="ByLogProtonDensity">∂S/∂ln PD, equal to the signal.</param>
/// <param name="ByLogDiffusion">∂S/∂ln ADC; 0 where the readout is not diffusion-weighted.</param>
public sealed record SignalDerivatives(
    double[] Signed, double[] ByLogT1, double[] ByLogT2, double[] ByLogProtonDensity, double[] ByLogDiffusion)
{
    private const double Step = 1e-3;

    /// <summary>Differentiates the engine's own signal.</summary>
    /// <param name="series">The series.</param>
    /// <param name="setting">Field strength and treatment of pulses.</param>
    /// <param name="lanes">The lanes.</param>
    /// <param name="echo">Number of the echo, from 0; null is the effective echo.</param>
    /// <remarks>Central differences with steps 10⁻³ and 5·10⁻⁴ in the logarithm, extrapolated (Richardson); error below 10⁻⁹.</remarks>
    /// <exception cref="ArgumentException">As <see cref="SignalPredictor.Predict"/>, or no such echo.</exception>
    public static SignalDerivatives Of(Series series, PredictionSetting setting, LaneTable lanes, int? echo = null)
    {
        ArgumentNullException.ThrowIfNull(series);
        ArgumentNullException.ThrowIfNull(lanes);
        var signed = Signal(series, setting, lanes, echo);
        var usesT2Star = series.Readout is SpoiledGradientEcho { SpoilingIncrement: null } or SpoiledGradientEchoTrain
            || (series.Readout is SpoiledGradientEcho && series.Preparations.Count > 0);
        var diffusion = series.Readout is DiffusionSpinEcho { DiffusionBValue: > 0 } b
            ? [.. signed.Select((s, i) => -b.DiffusionBValue * 1e-3 * lanes.ApparentDiffusionCoefficient[i] * s)]
            : new double[lanes.Count];
        return new SignalDerivatives(
            signed,
            Derivative(series, setting, lanes, echo, table => table.T1),
            Derivative(series, setting, lanes, echo, table => usesT2Star ? table.T2Star : table.T2),
            signed,
            diffusion);
    }

    private static double[] Derivative(Series series, PredictionSetting setting, LaneTable lanes, int? echo, Func<LaneTable, double[]> column)
    {
        var coarse = Difference(Step);
        var fine = Difference(Step / 2);
        return [.. fine.Select((f, i) => (4 * f - coarse[i]) / 3)];

        double[] Difference(double step)
        {
            var up = Scaled(Kernels.Elementary.Exp(step));
            var down = Scaled(Kernels.Elementary.Exp(-step));
            return [.. up.Select((u, i) => (u - down[i]) / (2 * step))];
        }

        double[] Scaled(double factor)
        {
            var scaled = lanes.Select([.. Enumerable.Range(0, lanes.Count)]);
            var values = column(scaled);
            for (var i = 0; i < values.Length; i++)
                values[i] *= factor;
            return Signal(series, setting, scaled, echo);
        }
    }

    private static double[] Signal(Series series, PredictionSetting setting, LaneTable lanes, int? echo)
    {
        var table = SignalPredictor.Predict(series, setting, lanes, echo is null ? PredictionOutputs.EffectiveEcho : PredictionOutputs.AllEchoes);
        var magnitude = series.Readout is BalancedGradientEcho;
        if (echo is not { } number)
            return magnitude ? table.Magnitude : table.Signed;
        var count = table.EchoTimes.Count;
        if (number < 0 || number >= count)
            throw new ArgumentException($"echo: {number} must lie in [0, {count - 1}].", nameof(echo));
        var source = magnitude ? table.EchoMagnitudes : table.Echoes;
        return [.. Enumerable.Range(0, lanes.Count).Select(i => source[i * count + number])];
    }
}
