using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
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
/// <param name="Document">Kind of the document.</param>
/// <param name="DocumentId">Identifier of the document.</param>
/// <param name="Change">The change: pointer, name, label, unit, old and new value.</param>
public sealed record ChangedParameter(DocumentKind Document, string DocumentId, ParameterChange Change);
