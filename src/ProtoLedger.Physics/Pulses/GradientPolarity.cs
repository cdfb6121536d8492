namespace ProtoLedger.Physics.Pulses;

/// <summary>Sign of a slice-selection gradient: which way off-resonance moves what the pulse selects.</summary>
public enum GradientPolarity
{
    /// <summary>Frequency rises with position: positive off-resonance moves the selection towards negative z.</summary>
    Positive = 1,

    /// <summary>Frequency falls with position: positive off-resonance moves the selection towards positive z.</summary>
    Negative = -1,
}
