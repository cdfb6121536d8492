using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Attribution;

/// <summary>Which changed parameters moved one observable, and by how much each.</summary>
/// <param name="Observable">Which number; the shares add up to the change of its signed value.</param>
/// <param name="Lane">"nominal" or "worst", the latter for a broken expectation's worst lane.</param>
/// <param name="OldSigned">Signed value before.</param>
/// <param name="NewSigned">Signed value after.</param>
/// <param name="OldMagnitude">Magnitude before: two signed errors can cancel there.</param>
/// <param name="NewMagnitude">Magnitude after.</param>
/// <param name="Shares">Largest absolute share first.</param>
/// <param name="Orders">Number of orders averaged when sampled; 0 when exact.</param>
public sealed record AttributionResult(
    ObservableKey Observable,
    string Lane,
    double OldSigned,
    double NewSigned,
    double OldMagnitude,
    double NewMagnitude,
    IReadOnlyList<AttributionShare> Shares,
    int Orders);

/// <summary>Share of one changed parameter, or of several that are not valid apart.</summary>
/// <param name="Changes">The changes: one, or several coupled ones, or a block added or removed.</param>
/// <param name="Share">Its part of the signed change, in the observable's unit.</param>
/// <param name="StandardError">0 when exact.</param>
public sealed record AttributionShare(IReadOnlyList<ChangedParameter> Changes, double Share, double StandardError);

/// <summary>One changed parameter of any document that predictions depend on.</summary>
/// <param name="Document">protocol, scanner, conditions, catalogue or expectations.</param>
/// <param name="Pointer">JSON pointer in that document.</param>
/// <param name="Name">Parameter name as documents spell it, such as RepetitionTime.</param>
/// <param name="Where">Series or tissue that it belongs to, or null.</param>
/// <param name="Old">Canonical JSON text of the old value, null where it is added.</param>
/// <param name="New">Canonical JSON text of the new value, null where it is removed.</param>
/// <param name="Unit">Unit, or null.</param>
public sealed record ChangedParameter(string Document, string Pointer, string Name, string? Where, string? Old, string? New, string? Unit);
