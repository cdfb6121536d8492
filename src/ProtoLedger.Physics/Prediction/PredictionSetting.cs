namespace ProtoLedger.Physics.Prediction;

/// <summary>What a prediction needs beside the series: the field and how pulses are treated.</summary>
/// <param name="FieldStrength">B0, tesla, &gt; 0.</param>
/// <param name="Pulses">Whether shaped pulses are integrated or taken as ideal rotations.</param>
public sealed record PredictionSetting(double FieldStrength, PulseModelling Pulses = PulseModelling.Modelled);

/// <summary>How radio-frequency pulses enter a prediction.</summary>
public enum PulseModelling
{
    /// <summary>Excitation and refocusing are instantaneous rotations scaled by B1+; inversion pulses keep their named efficiency.</summary>
    Ideal,

    /// <summary>Shaped pulses are integrated over off-resonance and B1+.</summary>
    Modelled,
}
