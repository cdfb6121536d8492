using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>A pointer whose list positions are replaced by the items' identities, so that it means the same in another version.</summary>
internal static class StablePath
{
    /// <summary>Tokens of a pointer that exists in the tree, positions replaced by identities.</summary>
    public static IReadOnlyList<string> Of(Shape shape, JsonNode? tree, string pointer)
    {
        var tokens = JsonPointer.Tokens(pointer);
        var path = new string[tokens.Count];
        var place = "";
        for (var i = 0; i < path.Length; i++)
        {
            path[i] = tokens[i];
            if (Identities(shape, tree, place) is { } names && JsonPointer.TryIndex(tokens[i], names.Count, out var index))
                path[i] = names[index];
            place = JsonPointer.Append(place, tokens[i]);
        }

        return path;
    }

    /// <summary>The place of a path in another version, or null where it has none.</summary>
    public static (string Pointer, JsonNode? Value)? Find(Shape shape, JsonNode? tree, IReadOnlyList<string> path)
    {
        var place = "";
        foreach (var token in path)
        {
            if (Identities(shape, tree, place) is { } names)
            {
                var index = names.ToList().IndexOf(token);
                if (index < 0)
                    return null;
                place = JsonPointer.Append(place, index);
            }
            else
            {
                place = JsonPointer.Append(place, token);
            }
        }

        return JsonPointer.TryFind(tree, place, out var value) ? (place, value) : null;
    }

    private static IReadOnlyList<string>? Identities(Shape shape, JsonNode? tree, string place) =>
        ShapePath.Find(shape, tree, place)?.Shape is ListShape { Identity.Count: > 0 } list
        && JsonPointer.TryFind(tree, place, out var node) && node is JsonArray items
            ? ItemIdentity.OfAll(items, list)
            : null;
}
