using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Prediction;

/// <summary>One prediction of many.</summary>
/// <param name="Series">The series.</param>
/// <param name="Setting">Field strength and treatment of pulses.</param>
/// <param name="Lanes">The lanes; may be shared between requests.</param>
/// <param name="Outputs">What to compute beside the effective echo.</param>
public sealed record PredictionRequest(
    Series Series, PredictionSetting Setting, LaneTable Lanes, PredictionOutputs Outputs = PredictionOutputs.EffectiveEcho);
