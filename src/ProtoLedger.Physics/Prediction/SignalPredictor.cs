using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Prediction;

/// <summary>Predicts the signals of a series: series → pulse program → engine over lanes.</summary>
public static class SignalPredictor
{
    /// <summary>Predicts the signal of every lane.</summary>
    /// <param name="series">The series; any preparation with any readout.</param>
    /// <param name="setting">Field strength and treatment of pulses.</param>
    /// <param name="lanes">The lanes.</param>
    /// <param name="outputs">What to compute beside the effective echo.</param>
    /// <returns>Finite values for every lane.</returns>
    /// <exception cref="ArgumentException">A value of the series or of a lane is outside its range, or a lane lacks what the readout needs; the message names the field, the value and the limit.</exception>
    public static SignalTable Predict(
        Series series, PredictionSetting setting, LaneTable lanes, PredictionOutputs outputs = PredictionOutputs.EffectiveEcho) =>
        throw new NotSupportedException("The engine is being built.");
}
