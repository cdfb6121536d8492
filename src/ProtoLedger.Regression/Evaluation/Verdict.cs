namespace ProtoLedger.Regression.Evaluation;

/// <summary>What a prediction says about a written limit.</summary>
public enum Verdict
{
    /// <summary>The limit holds for more than 95 % of the tissue draws, by more than two standard errors.</summary>
    Holds,

    /// <summary>The limit is broken for more than 95 % of the tissue draws, by more than two standard errors.</summary>
    Fails,

    /// <summary>Anything between: the tissue values known today do not decide.</summary>
    Uncertain,

    /// <summary>The number cannot be predicted; the reason is stated with it.</summary>
    NotPredictable,
}

/// <summary>What became of a verdict.</summary>
public enum Transition
{
    /// <summary>Held before, holds now.</summary>
    StillHolds,

    /// <summary>Did not fail before, fails now.</summary>
    NewlyFails,

    /// <summary>Did not hold before, holds now.</summary>
    NewlyHolds,

    /// <summary>Failed before, fails now.</summary>
    StillFails,

    /// <summary>Was decided before, is uncertain now.</summary>
    NewlyUncertain,

    /// <summary>Was uncertain before, is uncertain now.</summary>
    StillUncertain,

    /// <summary>Could not be predicted before or cannot now, or the expectation is new or gone.</summary>
    NotComparable,
}
