namespace ProtoLedger.Physics.Prediction;

/// <summary>What to compute beside the effective echo.</summary>
[Flags]
public enum PredictionOutputs
{
    /// <summary>The effective echo alone: the fastest.</summary>
    EffectiveEcho = 0,

    /// <summary>Every echo of the readout.</summary>
    AllEchoes = 1,
}
