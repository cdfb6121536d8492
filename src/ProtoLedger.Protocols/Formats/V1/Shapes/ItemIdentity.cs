using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Protocols.Formats.V1.Shapes;

/// <summary>What follows an item of a list through versions: its identifying keys, or its order among equals.</summary>
internal static class ItemIdentity
{
    /// <summary>The identifying values of one item, or null where one is missing.</summary>
    public static string? Of(JsonNode? item, ListShape shape)
    {
        if (shape.Identity is [""])
            return item is JsonValue ? Text(item) : null;
        if (item is not JsonObject members)
            return null;
        var parts = shape.Identity.Select(key => members.TryGetPropertyValue(key, out var part) ? Text(part) : null).ToArray();
        return parts.Contains(null) ? null : string.Join(" ", parts);
    }

    /// <summary>Identities of all items, made distinct by their order among equals; by position where the shape has no identity.</summary>
    public static IReadOnlyList<string> OfAll(JsonArray items, ListShape shape)
    {
        var counts = new Dictionary<string, int>();
        return
        [
            .. items.Select((item, index) =>
            {
                var identity = (shape.Identity.Count == 0 ? null : Of(item, shape)) ?? $"#{index}";
                var earlier = counts.GetValueOrDefault(identity);
                counts[identity] = earlier + 1;
                return earlier == 0 ? identity : $"{identity}#{earlier}";
            }),
        ];
    }

    private static string? Text(JsonNode? node) => node is JsonValue value ? value.GetValueKind() switch
    {
        System.Text.Json.JsonValueKind.String => value.GetValue<string>(),
        System.Text.Json.JsonValueKind.Number => EcmaScriptNumber.Format(StrictJson.ToDouble(value)),
        _ => null,
    } : null;
}
