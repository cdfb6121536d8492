using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Drift;

/// <summary>What differs between two predictions of one protocol version on one scanner, or of two versions.</summary>
/// <param name="Moved">Observables that both have and whose nominal value or interval moved, plus those that only one has.</param>
/// <param name="Transitions">One for each expectation of either side.</param>
public sealed record RunDifference(IReadOnlyList<MovedObservable> Moved, IReadOnlyList<ExpectationTransition> Transitions);

/// <summary>A number that moved.</summary>
/// <param name="Observable">Which.</param>
/// <param name="OldNominal">NaN where the older side has none.</param>
/// <param name="NewNominal">NaN where the newer side has none.</param>
public sealed record MovedObservable(ObservableKey Observable, double OldNominal, double NewNominal);

/// <summary>What became of the verdict on one expectation.</summary>
/// <param name="ExpectationId">Identifier within its document.</param>
/// <param name="Transition">What became of it.</param>
/// <param name="Old">Null where the expectation is new.</param>
/// <param name="New">Null where the expectation is gone.</param>
public sealed record ExpectationTransition(string ExpectationId, Transition Transition, VerdictRecord? Old, VerdictRecord? New);

/// <summary>A stored verdict.</summary>
/// <param name="Verdict">Over the draws.</param>
/// <param name="NominalVerdict">At the means.</param>
/// <param name="Probability">Of holding; NaN where not predictable.</param>
public sealed record VerdictRecord(Verdict Verdict, Verdict NominalVerdict, double Probability);
