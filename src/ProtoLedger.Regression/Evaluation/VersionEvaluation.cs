namespace ProtoLedger.Regression.Evaluation;

/// <summary>Predicts one protocol version on one scanner. Thread safe; series that are equal in all that counts are computed once.</summary>
public sealed class VersionEvaluation
{
    /// <summary>Number of series that were computed.</summary>
    public int ComputedSeries { get; private set; }

    /// <summary>Number of series that were shared with an earlier call.</summary>
    public int SharedSeries { get; private set; }

    /// <summary>Evaluates.</summary>
    /// <param name="input">What to predict.</param>
    /// <param name="before">The state that paired expectations compare with: the base version of a proposal, the version before of a stored one, or the same version under the documents before the edit; null where there is none.</param>
    public EvaluationResult Evaluate(EvaluationInput input, EvaluationInput? before = null) => throw new NotImplementedException();
}
