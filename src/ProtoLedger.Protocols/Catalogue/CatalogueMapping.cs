using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Catalogue;

/// <summary>Catalogue tissues onto the acquisition model. What the catalogue lacks is refused, never interpolated or taken from adults.</summary>
public static class CatalogueMapping
{
    /// <summary>Largest distance between a scanner's field and a catalogue field that counts as the same, T.</summary>
    public const double FieldTolerance = 0.05;

    /// <summary>A tissue of an age group at a field strength.</summary>
    /// <param name="catalogue">The catalogue.</param>
    /// <param name="tissue">Name of the tissue.</param>
    /// <param name="ageGroup">Age group.</param>
    /// <param name="fieldStrength">T.</param>
    /// <param name="needsT2Star">True where a gradient echo asks for T2*.</param>
    /// <param name="pointer">Begins the pointer of every error.</param>
    public static MappingResult<TissueDistribution> Map(
        CatalogueDocument catalogue, string tissue, string ageGroup, double fieldStrength, bool needsT2Star = false, string pointer = "")
    {
        var named = catalogue.Tissues.Where(candidate => candidate.Name == tissue).ToArray();
        if (named.Length == 0)
            return Refuse(pointer, tissue, catalogue.Tissues.Select(candidate => candidate.Name).Distinct(), $"The catalogue {catalogue.Id} holds no tissue \"{tissue}\".");
        var row = named.FirstOrDefault(candidate => candidate.AgeGroup == ageGroup);
        if (row is null)
            return Refuse(
                pointer, ageGroup, named.Select(candidate => candidate.AgeGroup),
                $"The catalogue {catalogue.Id} holds no values of \"{tissue}\" for age group \"{ageGroup}\"; values of another age group are not taken in their place.");
        var values = row.Fields.FirstOrDefault(field => Math.Abs(field.FieldStrength - fieldStrength) <= FieldTolerance);
        if (values is null)
            return Refuse(
                pointer, ShownValue.Of(fieldStrength) + " T", row.Fields.Select(field => ShownValue.Of(field.FieldStrength) + " T"),
                $"The catalogue {catalogue.Id} holds no values of \"{tissue}\" within {ShownValue.Of(FieldTolerance)} T of this field; values are not interpolated.");
        return needsT2Star && values.T2Star is null
            ? Refuse(
                pointer, tissue, row.Fields.Where(field => field.T2Star is not null).Select(field => $"{ShownValue.Of(field.FieldStrength)} T"),
                $"T2* of \"{tissue}\" at {ShownValue.Of(fieldStrength)} T is unknown in catalogue {catalogue.Id}; a gradient echo needs it.")
            : new MappingResult<TissueDistribution>.Mapped(Distribution(row, values));
    }

    private static TissueDistribution Distribution(CatalogueTissue row, TissueAtField values) => new(
        new Tissue(
            row.Name, values.T1.Mean, values.T2.Mean, values.T2Star?.Mean, row.ProtonDensity.Mean, row.ApparentDiffusionCoefficient?.Mean, row.IsFat),
        row.Title,
        values.T1.Sd,
        values.T2.Sd,
        values.T2Star?.Sd,
        row.ProtonDensity.Sd,
        row.ApparentDiffusionCoefficient?.Sd,
        new[] { values.T1.Evidence, values.T2.Evidence, row.ProtonDensity.Evidence }.Max());

    private static MappingResult<TissueDistribution>.Refused Refuse(string pointer, string value, IEnumerable<string> present, string detail) =>
        new([new DocumentError(pointer, value, string.Join(", ", present), detail)]);
}
