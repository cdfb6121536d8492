using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Validation;

/// <summary>A scanner's pulses must be playable by it.</summary>
internal static class ScannerValidation
{
    public static IReadOnlyList<DocumentError> Validate(ScannerDocument scanner)
    {
        var errors = new ErrorList();
        foreach (var (name, pulse) in scanner.Pulses)
            PulseValidation.Check(pulse, JsonPointer.Append("/pulses", name), scanner.Limits.MaximumB1Hz, errors);
        return errors.All;
    }
}
