using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Validation;

/// <summary>An expectation must name the tissues that its observable speaks of.</summary>
internal static class ExpectationsValidation
{
    public static IReadOnlyList<DocumentError> Validate(ExpectationsDocument document)
    {
        var errors = new ErrorList();
        for (var i = 0; i < document.Expectations.Count; i++)
            Check(document.Expectations[i], JsonPointer.Append("/expectations", i), errors);
        return errors.All;
    }

    private static void Check(Expectation expectation, string pointer, ErrorList errors)
    {
        var (name, tissue, reference) = expectation.Observable;
        if (ObservableNames.NeedsTissue(name) && tissue is null)
            errors.Add(pointer + "/observable/tissue", (string?)null, "a tissue of the catalogue", $"The observable {name} speaks of a tissue; none is named.");
        if (ObservableNames.NeedsReference(name) && reference is null)
            errors.Add(
                pointer + "/observable/reference", (string?)null, "a tissue of the catalogue",
                $"The observable {name} compares a tissue with a reference; none is named.");
        if (reference is not null && reference == tissue)
            errors.Add(pointer + "/observable/reference", $"\"{reference}\"", "another tissue", "A tissue is compared with itself.");
        if (expectation.Basis == ExpectationBasis.Paired && expectation.Limit <= 0)
            errors.Add(pointer + "/limit", expectation.Limit, "> 0, as new over old", "The limit of a paired expectation is a ratio, so it is above 0.");
    }
}
