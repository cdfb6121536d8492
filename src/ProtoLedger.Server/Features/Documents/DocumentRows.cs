using System.Globalization;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Server.Features.Documents;

/// <summary>A group of rows under one heading: the sheet's text, one series, one tissue.</summary>
/// <param name="Title">Heading.</param>
/// <param name="Pointer">Where the group stands.</param>
/// <param name="Rows">Its values, in the document's order.</param>
internal sealed record RowGroup(string Title, string Pointer, IReadOnlyList<DocumentRow> Rows);

/// <summary>One value of a document.</summary>
/// <param name="Pointer">JSON pointer.</param>
/// <param name="Block">Part of the group that it belongs to, such as "readout: echo train", or empty.</param>
/// <param name="Label">In trade words.</param>
/// <param name="Value">As text.</param>
/// <param name="Unit">Unit, or null.</param>
/// <param name="Parameter">What is known about it, or null.</param>
internal sealed record DocumentRow(string Pointer, string Block, string Label, string Value, string? Unit, ParameterInfo? Parameter);

/// <summary>Lays a document out in rows, so that every value has a place and an address.</summary>
internal static class DocumentRows
{
    private static readonly string[] Listed = ["series", "tissues", "conditions", "expectations"];
    private static readonly string[] Hidden = ["format", "kind", "id"];

    /// <summary>What is read first stands first; a name that is not here follows in the document's order.</summary>
    private static readonly string[] Order =
    [
        "title", "note", "bodyRegion", "ageGroup", "variantOf", "scanners", "MagneticFieldStrength", "location", "sheet",
        "preparations", "readout", "timing", "geometry", "contrastConcentration", "meanings", "allowedRanges", "recorded",
        "kind", "InversionTime", "RepetitionTime", "EchoTime", "ExcitationFlipAngle", "RefocusingFlipAngles", "EchoTrainLength", "echoSpacing",
        "indication", "coil", "positioning", "coverage", "landmarks", "contrastAgent", "order", "fallback", "limits", "pulses", "consoleWording",
        "why", "series", "observable", "name", "tissue", "reference", "relation", "limit", "conditions", "basis",
        "T1", "T2", "T2star", "protonDensity", "mean", "sd", "source", "evidence", "requiredSignatures", "role", "meaning", "deputies",
    ];

    /// <summary>General values first, then a group for each series, tissue, condition or expectation.</summary>
    public static IReadOnlyList<RowGroup> Of(DocumentKind kind, ReadOnlySpan<byte> canonical)
    {
        var document = JsonNode.Parse(canonical)!.AsObject();
        var general = new List<DocumentRow>();
        var groups = new List<RowGroup>();
        foreach (var (name, value) in Ordered(document))
        {
            if (Hidden.Contains(name) || value is null)
                continue;
            var pointer = JsonPointer.Append("", name);
            if (Listed.Contains(name) && value is JsonArray items && items.All(item => item is JsonObject))
                groups.AddRange(items.Select((item, index) => Group(kind, document, item!.AsObject(), JsonPointer.Append(pointer, index))));
            else
                Walk(kind, document, value, pointer, new Place("", "", ""), general);
        }

        return general.Count == 0 ? groups : [new RowGroup("General", "", general), .. groups];
    }

    private static RowGroup Group(DocumentKind kind, JsonObject document, JsonObject item, string pointer)
    {
        var rows = new List<DocumentRow>();
        foreach (var (name, value) in Ordered(item))
        {
            if (name is not ("id" or "title") && value is not null)
                Walk(kind, document, value, JsonPointer.Append(pointer, name), new Place("", "", ""), rows);
        }

        var title = item["title"] ?? item["name"] ?? item["id"];
        return new RowGroup(title?.GetValue<string>() ?? pointer, pointer, rows);
    }

    private static void Walk(DocumentKind kind, JsonObject document, JsonNode value, string pointer, Place place, List<DocumentRow> rows)
    {
        var parameter = Parameters.Describe(kind, pointer, document);
        var key = pointer[(pointer.LastIndexOf('/') + 1)..];
        // An entry of a map is described as the map itself: its key tells it from the others.
        var label = parameter is not null && parameter.Label != place.Label ? parameter.Label : key;
        switch (value)
        {
            case JsonObject block:
                var inside = Inside(place, label, Named(block));
                foreach (var (name, inner) in Ordered(block))
                {
                    if (inner is not null)
                        Walk(kind, document, inner, JsonPointer.Append(pointer, name), inside, rows);
                }

                break;
            case JsonArray list when list.Any(item => item is JsonObject):
                for (var i = 0; i < list.Count; i++)
                {
                    var title = list.Count == 1 ? label : string.Create(CultureInfo.InvariantCulture, $"{label} {i + 1}");
                    foreach (var (name, inner) in Ordered(list[i]!.AsObject()))
                        Walk(kind, document, inner!, JsonPointer.Append(JsonPointer.Append(pointer, i), name), Inside(place, title, Named(list[i]!.AsObject())), rows);
                }

                break;
            default:
                rows.Add(new DocumentRow(pointer, place.Block, place.Within.Length == 0 ? label : $"{label}, {place.Within}", Text(value), parameter?.Unit, parameter));
                break;
        }
    }

    /// <summary>The first block within a group is a heading; deeper ones are named beside the value.</summary>
    private static Place Inside(Place place, string label, string? name)
    {
        var title = name is null ? label : $"{label}: {Words(name)}";
        return place.Block.Length == 0 ? new Place(title, "", label) : place with { Within = title, Label = label };
    }

    private static IEnumerable<KeyValuePair<string, JsonNode?>> Ordered(JsonObject block) =>
        block.OrderBy(member => Array.IndexOf(Order, member.Key) is >= 0 and var rank ? rank : Order.Length);

    private static string? Named(JsonObject block) => (block["name"] ?? block["kind"]) is JsonValue name && name.TryGetValue<string>(out var text) ? text : null;

    /// <summary>echoTrain becomes echo train; identifiers stay.</summary>
    private static string Words(string name) =>
        string.Concat(name.Select(letter => char.IsAsciiLetterUpper(letter) ? " " + char.ToLowerInvariant(letter) : letter.ToString())).Trim();

    private static string Text(JsonNode value) => value switch
    {
        JsonArray list => string.Join(", ", list.Select(item => Text(item!))),
        JsonValue single when single.TryGetValue<string>(out var text) => text,
        JsonValue single when single.TryGetValue<double>(out var number) => number.ToString("R", CultureInfo.InvariantCulture),
        _ => value.ToJsonString(),
    };

    /// <summary>Where a value stands while the document is walked.</summary>
    private readonly record struct Place(string Block, string Within, string Label);
}
