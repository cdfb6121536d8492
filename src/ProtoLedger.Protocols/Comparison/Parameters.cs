using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>The catalogue of parameters: what stands at a pointer, in the words of the trade, with unit, range and DICOM keyword.</summary>
public static class Parameters
{
    /// <summary>What stands at a pointer; null where the format has nothing there.</summary>
    /// <param name="kind">Kind of the document.</param>
    /// <param name="pointer">JSON pointer, such as <c>/series/0/readout/RepetitionTime</c>.</param>
    /// <param name="document">The document, which settles what a choice of kinds leaves open; null for none.</param>
    public static ParameterInfo? Describe(DocumentKind kind, string pointer, JsonNode? document = null)
    {
        if (ShapePath.Find(DocumentShapes.Of(kind), document, pointer) is not ({ } shape, { } member))
            return null;
        var number = (shape as ListShape)?.Item as NumberShape ?? shape as NumberShape;
        return new ParameterInfo(
            member.Name,
            member.Label,
            number is { Unit.Length: > 0 } ? number.Unit : null,
            member.Keyword,
            member.Tag,
            number?.Low,
            number?.High,
            number?.Whole ?? false,
            (shape as ChoiceShape)?.Words ?? []);
    }

    /// <summary>How a scanner's console words a parameter, or null where the scanner's document does not say.</summary>
    /// <param name="scanner">The scanner.</param>
    /// <param name="name">Key of the parameter, such as <c>RepetitionTime</c>.</param>
    public static ConsoleWord? ConsoleWording(ScannerDocument scanner, string name) => scanner.ConsoleWording.GetValueOrDefault(name);
}
