using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Validation;

/// <summary>Every series must be playable; ranges and recorded values must refer to what is there.</summary>
internal static class ProtocolValidation
{
    public static IReadOnlyList<DocumentError> Validate(ProtocolDocument protocol, JsonNode tree)
    {
        var errors = new ErrorList();
        if (protocol.VariantOf == protocol.Id)
            errors.Add("/variantOf", $"\"{protocol.Id}\"", "another protocol", "A protocol cannot be a variant of itself.");
        for (var i = 0; i < protocol.Series.Count; i++)
        {
            var (series, pointer) = (protocol.Series[i], JsonPointer.Append("/series", i));
            errors.AddAll(SeriesValidation.Validate(series.Acquisition, pointer));
            AllowedRangeValidation.Check(series, tree["series"]![i]!, pointer, errors);
            foreach (var scanner in series.Recorded.Keys.Where(scanner => !protocol.Scanners.Contains(scanner)))
                errors.Add(
                    JsonPointer.Append(pointer + "/recorded", scanner), $"\"{scanner}\"", string.Join(", ", protocol.Scanners),
                    "Values are recorded for a scanner to which the protocol is not assigned.");
        }

        return errors.All;
    }
}
