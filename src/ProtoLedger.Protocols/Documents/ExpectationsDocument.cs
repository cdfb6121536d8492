namespace ProtoLedger.Protocols.Documents;

/// <summary>Written limits on predicted numbers, for the series of one protocol.</summary>
/// <param name="Id">Identifier.</param>
/// <param name="Title">As people say it.</param>
/// <param name="Note">Free prose.</param>
/// <param name="Protocol">Identifier of the protocol that they speak about.</param>
/// <param name="Expectations">At least one.</param>
public sealed record ExpectationsDocument(string Id, string Title, string? Note, string Protocol, IReadOnlyList<Expectation> Expectations)
    : LedgerDocument(Id, Title, Note)
{
    /// <inheritdoc/>
    public override DocumentKind Kind => DocumentKind.Expectations;
}

/// <summary>A written limit on one observable.</summary>
/// <param name="Id">Unique within the document.</param>
/// <param name="Title">In words, such as "ventricles and sulci stay dark".</param>
/// <param name="Why">Why the department wants it.</param>
/// <param name="Series">Series identifier.</param>
/// <param name="Observable">What is limited.</param>
/// <param name="Conditions">Names of the conditions over which it must hold; at least one.</param>
/// <param name="Basis">Absolute, or paired with the version before.</param>
/// <param name="Relation">Which side of the limit is good.</param>
/// <param name="Limit">In the observable's unit; for a paired expectation the greatest change allowed, as new over old.</param>
/// <param name="Scanners">Scanners for which it is written; empty for all.</param>
public sealed record Expectation(
    string Id,
    string Title,
    string Why,
    string Series,
    ObservableSpecification Observable,
    IReadOnlyList<string> Conditions,
    ExpectationBasis Basis,
    LimitRelation Relation,
    double Limit,
    IReadOnlyList<string> Scanners);

/// <summary>An observable and the tissues it speaks of.</summary>
/// <param name="Name">One of the observables' names, such as <c>residualRatio</c>.</param>
/// <param name="Tissue">Catalogue name of the tissue, or null where none is needed.</param>
/// <param name="Reference">Catalogue name of the second tissue, or null.</param>
public sealed record ObservableSpecification(string Name, string? Tissue, string? Reference);

/// <summary>What an expectation compares with.</summary>
public enum ExpectationBasis
{
    /// <summary>The number itself against the limit.</summary>
    Absolute,

    /// <summary>New over old for the same tissue draw against the limit.</summary>
    Paired,
}

/// <summary>Which side of a limit is good.</summary>
public enum LimitRelation
{
    /// <summary>The value must not exceed the limit.</summary>
    AtMost,

    /// <summary>The value must reach the limit.</summary>
    AtLeast,
}
