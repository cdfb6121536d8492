using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Validation;

/// <summary>Relaxation times must be possible, and fields in order.</summary>
internal static class CatalogueValidation
{
    public static IReadOnlyList<DocumentError> Validate(CatalogueDocument catalogue)
    {
        var errors = new ErrorList();
        for (var i = 0; i < catalogue.Tissues.Count; i++)
            for (var j = 0; j < catalogue.Tissues[i].Fields.Count; j++)
                CheckField(catalogue.Tissues[i].Fields, j, JsonPointer.Append($"{JsonPointer.Append("/tissues", i)}/fields", j), errors);
        return errors.All;
    }

    private static void CheckField(IReadOnlyList<TissueAtField> fields, int index, string pointer, ErrorList errors)
    {
        var field = fields[index];
        if (field.T2.Mean > 2 * field.T1.Mean)
            errors.Add(
                pointer + "/T2/mean", field.T2.Mean, $"≤ {ShownValue.Of(2 * field.T1.Mean)} ms",
                "T2 is longer than twice T1, which no tissue can have.");
        if (field.T2Star is { } star && star.Mean > field.T2.Mean)
            errors.Add(
                pointer + "/T2star/mean", star.Mean, $"≤ {ShownValue.Of(field.T2.Mean)} ms", "T2* is longer than T2, which no tissue can have.");
        if (index > 0 && field.FieldStrength < fields[index - 1].FieldStrength)
            errors.Add(
                pointer + "/fieldStrength", field.FieldStrength, $"> {ShownValue.Of(fields[index - 1].FieldStrength)} T",
                "Field strengths stand in ascending order.");
    }
}
