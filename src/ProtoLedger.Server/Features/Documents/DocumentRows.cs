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
/// <param name="Label">In trade words.</param>
/// <param name="Value">As text.</param>
/// <param name="Unit">Unit, or null.</param>
/// <param name="Parameter">What is known about it, or null.</param>
internal sealed record DocumentRow(string Pointer, string Label, string Value, string? Unit, ParameterInfo? Parameter);

/// <summary>Lays a document out in rows, so that every value has a place and an address.</summary>
internal static class DocumentRows
{
    private static readonly string[] Listed = ["series", "tissues", "conditions", "expectations"];
    private static readonly string[] Hidden = ["format", "kind", "id"];

    /// <summary>General values first, then a group for each series, tissue, condition or expectation.</summary>
    public static IReadOnlyList<RowGroup> Of(DocumentKind kind, ReadOnlySpan<byte> canonical)
    {
        var document = JsonNode.Parse(canonical)!.AsObject();
        var general = new List<DocumentRow>();
        var groups = new List<RowGroup>();
        foreach (var (name, value) in document)
        {
            if (Hidden.Contains(name) || value is null)
                continue;
            var pointer = JsonPointer.Append("", name);
            if (Listed.Contains(name) && value is JsonArray items && items.All(item => item is JsonObject))
                groups.AddRange(items.Select((item, index) => Group(kind, document, item!.AsObject(), JsonPointer.Append(pointer, index))));
            else
                Walk(kind, document, value, pointer, "", general);
        }

        return general.Count == 0 ? groups : [new RowGroup("General", "", general), .. groups];
    }

    private static RowGroup Group(DocumentKind kind, JsonObject document, JsonObject item, string pointer)
    {
        var rows = new List<DocumentRow>();
        foreach (var (name, value) in item)
        {
            if (name is not ("id" or "title") && value is not null)
                Walk(kind, document, value, JsonPointer.Append(pointer, name), "", rows);
        }

        var title = item["title"] ?? item["name"] ?? item["id"];
        return new RowGroup(title?.GetValue<string>() ?? pointer, pointer, rows);
    }

    private static void Walk(DocumentKind kind, JsonObject document, JsonNode value, string pointer, string within, List<DocumentRow> rows)
    {
        var parameter = Parameters.Describe(kind, pointer, document);
        var label = parameter?.Label ?? pointer[(pointer.LastIndexOf('/') + 1)..];
        switch (value)
        {
            case JsonObject block:
                foreach (var (name, inner) in block)
                {
                    if (inner is not null)
                        Walk(kind, document, inner, JsonPointer.Append(pointer, name), Name(block) ?? label, rows);
                }

                break;
            case JsonArray list when list.Any(item => item is JsonObject):
                for (var i = 0; i < list.Count; i++)
                    Walk(kind, document, list[i]!, JsonPointer.Append(pointer, i), label, rows);
                break;
            default:
                rows.Add(new DocumentRow(pointer, within.Length == 0 || within == label ? label : $"{label}, {within}", Text(value), parameter?.Unit, parameter));
                break;
        }
    }

    private static string? Name(JsonObject block) => (block["name"] ?? block["kind"]) is JsonValue name && name.TryGetValue<string>(out var text) ? text : null;

    private static string Text(JsonNode value) => value switch
    {
        JsonArray list => string.Join(", ", list.Select(item => Text(item!))),
        JsonValue single when single.TryGetValue<string>(out var text) => text,
        JsonValue single when single.TryGetValue<double>(out var number) => number.ToString("R", CultureInfo.InvariantCulture),
        _ => value.ToJsonString(),
    };
}
