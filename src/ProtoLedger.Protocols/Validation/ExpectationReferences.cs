using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Validation;

/// <summary>What expectations refer to: the protocol, its series, scanners and conditions, and tissue values at each scanner's field.</summary>
internal static class ExpectationReferences
{
    public static IReadOnlyList<DocumentError> Validate(ExpectationsDocument document, DocumentSet set)
    {
        var errors = new ErrorList();
        if (set.Find<ProtocolDocument>(DocumentKind.Protocol, document.Protocol) is not { } protocol)
        {
            errors.Add("/protocol", $"\"{document.Protocol}\"", "an existing protocol", "There is no protocol of this name.");
            return errors.All;
        }

        for (var i = 0; i < document.Expectations.Count; i++)
            Check(document.Expectations[i], protocol, set, JsonPointer.Append("/expectations", i), errors);
        return errors.All;
    }

    private static void Check(Expectation expectation, ProtocolDocument protocol, DocumentSet set, string pointer, ErrorList errors)
    {
        RequireKnown(expectation.Scanners, protocol.Scanners, pointer + "/scanners", $"Protocol {protocol.Id} is not assigned to this scanner.", errors);
        if (set.Find<ConditionsDocument>(DocumentKind.Conditions, protocol.Conditions) is { } conditions)
            RequireKnown(
                expectation.Conditions, [.. conditions.Conditions.Select(condition => condition.Name)], pointer + "/conditions",
                $"The conditions document {conditions.Id} holds no such condition.", errors);
        if (protocol.Series.FirstOrDefault(series => series.Id == expectation.Series) is { } named)
            CheckTissues(expectation, named, protocol, set, pointer + "/observable", errors);
        else
            errors.Add(
                pointer + "/series", $"\"{expectation.Series}\"", string.Join(", ", protocol.Series.Select(series => series.Id)),
                $"Protocol {protocol.Id} holds no series of this name.");
    }

    private static void RequireKnown(
        IReadOnlyList<string> names, IReadOnlyList<string> known, string pointer, string detail, ErrorList errors)
    {
        for (var i = 0; i < names.Count; i++)
            if (!known.Contains(names[i]))
                errors.Add(JsonPointer.Append(pointer, i), $"\"{names[i]}\"", string.Join(", ", known), detail);
    }

    private static void CheckTissues(
        Expectation expectation, ProtocolSeries series, ProtocolDocument protocol, DocumentSet set, string pointer, ErrorList errors)
    {
        var needsT2Star = series.Acquisition.Readout is SpoiledGradientEcho or SpoiledGradientEchoTrain;
        var scanners = expectation.Scanners.Count == 0 ? protocol.Scanners : expectation.Scanners;
        var fields = scanners.Select(id => set.Find<ScannerDocument>(DocumentKind.Scanner, id)?.MagneticFieldStrength).OfType<double>().Distinct();
        foreach (var field in fields)
        {
            RequireTissue(expectation.Observable.Tissue, field, pointer + "/tissue");
            RequireTissue(expectation.Observable.Reference, field, pointer + "/reference");
        }

        void RequireTissue(string? tissue, double field, string place)
        {
            if (tissue is null)
                return;
            var found = set.All<CatalogueDocument>()
                .Select(catalogue => CatalogueMapping.Map(catalogue, tissue, protocol.AgeGroup, field, needsT2Star, place))
                .ToArray();
            if (found.Length == 0)
                errors.Add(place, $"\"{tissue}\"", "none: there is no catalogue", "There is no catalogue to take tissue values from.");
            else if (!found.Any(result => result is MappingResult<TissueDistribution>.Mapped))
                errors.AddAll(found.OfType<MappingResult<TissueDistribution>.Refused>().First().Errors);
        }
    }
}
