using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Validation;

/// <summary>Ranges of conditions must run from low to high.</summary>
internal static class ConditionsValidation
{
    public static IReadOnlyList<DocumentError> Validate(ConditionsDocument document)
    {
        var errors = new ErrorList();
        for (var i = 0; i < document.Conditions.Count; i++)
        {
            var (condition, pointer) = (document.Conditions[i], JsonPointer.Append("/conditions", i));
            errors.RequireOrder(pointer + "/offResonance", condition.OffResonance.Low, condition.OffResonance.High, "Hz");
            errors.RequireOrder(pointer + "/b1Scale", condition.B1Scale.Low, condition.B1Scale.High, "");
        }

        return errors.All;
    }
}
