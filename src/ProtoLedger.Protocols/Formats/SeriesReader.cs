using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1;
using ProtoLedger.Protocols.Formats.V1.Shapes;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Protocols.Formats;

/// <summary>A series alone: <c>{"preparations": […], "readout": {…}, "timing": {…}, "geometry": {…}}</c>; only the readout is needed.</summary>
public static class SeriesReader
{
    /// <summary>Reads and checks a series; pulses named in it are looked up in the scanner's list, then among the built-in ones.</summary>
    /// <param name="json">The series.</param>
    /// <param name="scanner">Scanner whose pulses may be named, or null for the built-in ones alone.</param>
    /// <param name="pointer">Where the series stands in the request, such as <c>/series</c>; begins the pointer of every error.</param>
    public static MappingResult<Series> Read(JsonElement json, ScannerDocument? scanner = null, string pointer = "") =>
        Guard(() => json.ValueKind == JsonValueKind.Undefined ? null : StrictJson.Parse(Encoding.UTF8.GetBytes(json.GetRawText())), scanner, pointer);

    /// <summary>Reads and checks a series given as a tree.</summary>
    /// <param name="tree">The series.</param>
    /// <param name="scanner">Scanner whose pulses may be named, or null for the built-in ones alone.</param>
    /// <param name="pointer">Begins the pointer of every error.</param>
    public static MappingResult<Series> Read(JsonNode? tree, ScannerDocument? scanner, string pointer) =>
        Guard(() => StrictJson.Parse(CanonicalJson.Serialize(tree)), scanner, pointer);

    private static MappingResult<Series> Guard(Func<JsonNode?> read, ScannerDocument? scanner, string pointer)
    {
        try
        {
            return ReadStrict(read(), scanner, pointer);
        }
        catch (CanonicalJsonException fault)
        {
            return new MappingResult<Series>.Refused([new DocumentError(pointer + fault.Pointer, null, null, fault.Detail)]);
        }
    }

    private static MappingResult<Series> ReadStrict(JsonNode? tree, ScannerDocument? scanner, string pointer)
    {
        var errors = ShapeCheck.Run(tree, SeriesShapes.Bare, pointer);
        if (errors.Count > 0)
            return new MappingResult<Series>.Refused(errors);
        var series = SeriesReading.Acquisition(tree!);
        return SeriesMapping.Resolve(series, scanner, pointer) switch
        {
            MappingResult<Series>.Mapped(var resolved) when SeriesValidation.Validate(resolved, pointer) is { Count: > 0 } found =>
                new MappingResult<Series>.Refused(found),
            var result => result,
        };
    }
}
