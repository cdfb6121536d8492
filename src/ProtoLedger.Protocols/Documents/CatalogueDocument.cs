namespace ProtoLedger.Protocols.Documents;

/// <summary>Tissue values with spread, source and strength of evidence.</summary>
/// <param name="Id">Identifier.</param>
/// <param name="Title">As people say it.</param>
/// <param name="Note">Free prose.</param>
/// <param name="Tissues">At least one.</param>
public sealed record CatalogueDocument(string Id, string Title, string? Note, IReadOnlyList<CatalogueTissue> Tissues)
    : LedgerDocument(Id, Title, Note)
{
    /// <inheritdoc/>
    public override DocumentKind Kind => DocumentKind.Catalogue;
}

/// <summary>One tissue of one age group.</summary>
/// <param name="Name">Identifier, such as <c>white-matter</c>.</param>
/// <param name="Title">As a report says it, such as "white matter".</param>
/// <param name="AgeGroup">Such as <c>adult</c>; other groups are refused where they are not listed.</param>
/// <param name="IsFat">True when its signal is the six-peak fat spectrum.</param>
/// <param name="ProtonDensity">Relative to cerebrospinal fluid.</param>
/// <param name="ApparentDiffusionCoefficient">10⁻³ mm²/s, or null where unknown.</param>
/// <param name="Fields">Relaxation times by field strength, ascending.</param>
public sealed record CatalogueTissue(
    string Name,
    string Title,
    string AgeGroup,
    bool IsFat,
    MeasuredValue ProtonDensity,
    MeasuredValue? ApparentDiffusionCoefficient,
    IReadOnlyList<TissueAtField> Fields);

/// <summary>Relaxation times at one field strength.</summary>
/// <param name="FieldStrength">T.</param>
/// <param name="T1">ms.</param>
/// <param name="T2">ms.</param>
/// <param name="T2Star">ms, or null where unknown: it is then refused, not guessed.</param>
public sealed record TissueAtField(double FieldStrength, MeasuredValue T1, MeasuredValue T2, MeasuredValue? T2Star);

/// <summary>A value with its spread and origin.</summary>
/// <param name="Mean">In the quantity's unit, &gt; 0.</param>
/// <param name="Sd">Standard deviation that covers the disagreement between sources, &gt; 0.</param>
/// <param name="Source">Where it comes from.</param>
/// <param name="Evidence">Strength of that.</param>
public sealed record MeasuredValue(double Mean, double Sd, string Source, Evidence Evidence);

/// <summary>Strength of evidence behind a catalogue value.</summary>
public enum Evidence
{
    /// <summary>Read in the publication.</summary>
    Seen,

    /// <summary>Read as quoted by another publication.</summary>
    SecondHand,

    /// <summary>From memory, not checked.</summary>
    Recalled,

    /// <summary>Estimated, interpolated or extrapolated.</summary>
    Estimated,
}
