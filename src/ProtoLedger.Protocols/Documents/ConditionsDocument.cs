namespace ProtoLedger.Protocols.Documents;

/// <summary>Named B0/B1 conditions of a body region, habitus or cause.</summary>
/// <param name="Id">Identifier.</param>
/// <param name="Title">As people say it.</param>
/// <param name="Note">Free prose.</param>
/// <param name="Conditions">At least one.</param>
public sealed record ConditionsDocument(string Id, string Title, string? Note, IReadOnlyList<FieldCondition> Conditions)
    : LedgerDocument(Id, Title, Note)
{
    /// <inheritdoc/>
    public override DocumentKind Kind => DocumentKind.Conditions;
}

/// <summary>Ranges of the fields that a voxel can meet. A range with equal ends is a single point.</summary>
/// <param name="Name">Identifier within the document.</param>
/// <param name="Title">As a report says it.</param>
/// <param name="OffResonance">Hz at the named field strength; scaled with B0 when <paramref name="OffResonanceField"/> is given.</param>
/// <param name="OffResonanceField">T at which the range was stated, or null when it does not scale.</param>
/// <param name="B1Scale">Actual over nominal flip angle.</param>
/// <param name="UnpreparedInflow">Fractions at which residual fluid is reported, each in [0, 1]; empty for none.</param>
public sealed record FieldCondition(
    string Name,
    string Title,
    ValueRange OffResonance,
    double? OffResonanceField,
    ValueRange B1Scale,
    IReadOnlyList<double> UnpreparedInflow);

/// <summary>A closed range.</summary>
/// <param name="Low">Lowest value.</param>
/// <param name="High">Highest value, ≥ <paramref name="Low"/>.</param>
public readonly record struct ValueRange(double Low, double High);
