using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Formats.V1.Yaml;

/// <summary>What reading a YAML text gives.</summary>
internal abstract record YamlTreeResult
{
    public sealed record Parsed(JsonNode? Tree, YamlPlaces Places) : YamlTreeResult;

    public sealed record Refused(IReadOnlyList<DocumentError> Errors) : YamlTreeResult;
}

/// <summary>Line and column of each pointer of a YAML text.</summary>
internal sealed class YamlPlaces
{
    private readonly Dictionary<string, (int Line, int Column)> places = [];
    private readonly HashSet<string> plain = [];

    public void Note(string pointer, long line, long column) => places.TryAdd(pointer, ((int)line, (int)column));

    public void NotePlain(string pointer) => plain.Add(pointer);

    /// <summary>True for a scalar written without quotes.</summary>
    public bool IsPlain(string pointer) => plain.Contains(pointer);

    /// <summary>The error with the place of its field, or of the nearest field around it.</summary>
    public DocumentError Locate(DocumentError error)
    {
        for (var pointer = error.Pointer; ; pointer = pointer[..pointer.LastIndexOf('/')])
        {
            if (places.TryGetValue(pointer, out var place))
                return error with { Line = place.Line, Column = place.Column };
            if (!pointer.Contains('/', StringComparison.Ordinal))
                return error;
        }
    }
}
