using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Validation;

/// <summary>What a protocol refers to: scanners and their pulses, conditions, a variant's origin, tissue values of its age group.</summary>
internal static class ProtocolReferences
{
    public static IReadOnlyList<DocumentError> Validate(ProtocolDocument protocol, DocumentSet set)
    {
        var errors = new ErrorList();
        if (set.Find<ConditionsDocument>(DocumentKind.Conditions, protocol.Conditions) is null)
            errors.Add(
                "/conditions", $"\"{protocol.Conditions}\"", Ids(set.All<ConditionsDocument>()), "There is no conditions document of this name.");
        if (protocol.VariantOf is { } origin && set.Find<ProtocolDocument>(DocumentKind.Protocol, origin) is null)
            errors.Add("/variantOf", $"\"{origin}\"", "an existing protocol", "There is no protocol of this name of which this one could be a variant.");
        CheckAgeGroup(protocol, set, errors);
        for (var i = 0; i < protocol.Scanners.Count; i++)
        {
            var scanner = set.Find<ScannerDocument>(DocumentKind.Scanner, protocol.Scanners[i]);
            if (scanner is null)
                errors.Add(
                    JsonPointer.Append("/scanners", i), $"\"{protocol.Scanners[i]}\"", Ids(set.All<ScannerDocument>()), "There is no scanner of this name.");
            else
                CheckOnScanner(protocol, scanner, errors);
        }

        return errors.All;
    }

    private static void CheckAgeGroup(ProtocolDocument protocol, DocumentSet set, ErrorList errors)
    {
        var groups = set.All<CatalogueDocument>().SelectMany(catalogue => catalogue.Tissues).Select(tissue => tissue.AgeGroup).Distinct().ToArray();
        if (!groups.Contains(protocol.AgeGroup))
            errors.Add(
                "/ageGroup", $"\"{protocol.AgeGroup}\"", groups.Length == 0 ? "none: there is no catalogue" : string.Join(", ", groups),
                "No catalogue holds tissue values for this age group; values of another age group are not taken in their place.");
    }

    private static void CheckOnScanner(ProtocolDocument protocol, ScannerDocument scanner, ErrorList errors)
    {
        for (var i = 0; i < protocol.Series.Count; i++)
        {
            var (series, pointer) = (protocol.Series[i], JsonPointer.Append("/series", i));
            switch (SeriesMapping.Resolve(series, scanner, pointer))
            {
                case MappingResult<Series>.Refused(var unknown):
                    errors.AddAll(unknown);
                    break;
                case MappingResult<Series>.Mapped(var resolved):
                    errors.AddAll(SeriesValidation.Validate(resolved, pointer)
                        .Select(error => error with { Detail = $"On scanner {scanner.Id}: {error.Detail}" }));
                    break;
            }

            CheckEchoSpacing(series.Acquisition.Readout, scanner, pointer, errors);
        }
    }

    private static void CheckEchoSpacing(Readout readout, ScannerDocument scanner, string pointer, ErrorList errors)
    {
        if (readout is EchoTrain train && train.EchoSpacing < scanner.Limits.MinimumEchoSpacing)
            errors.Add(
                pointer + "/readout/echoSpacing", train.EchoSpacing, $"≥ {ShownValue.Of(scanner.Limits.MinimumEchoSpacing)} ms",
                $"The echo spacing is shorter than scanner {scanner.Id} can play.");
    }

    private static string Ids(IEnumerable<LedgerDocument> documents) => string.Join(", ", documents.Select(document => document.Id));
}
