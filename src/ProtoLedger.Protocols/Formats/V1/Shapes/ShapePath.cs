using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Protocols.Formats.V1.Shapes;

/// <summary>Follows a pointer through a shape, guided by a document where kinds leave a choice.</summary>
internal static class ShapePath
{
    /// <summary>The shape at a pointer and the last named member on the way; null where the pointer leads out of the shape.</summary>
    /// <param name="shape">Shape of the root.</param>
    /// <param name="root">Document, or null: then the first kind that has the key is taken.</param>
    /// <param name="pointer">JSON pointer.</param>
    public static (Shape Shape, Member? Member)? Find(Shape shape, JsonNode? root, string pointer)
    {
        Member? member = null;
        var (current, node) = (shape, root);
        foreach (var token in JsonPointer.Tokens(pointer))
        {
            if (Step(current, node, token) is not { } step)
                return null;
            (current, member) = (step.Shape, step.Member ?? member);
            node = Child(node, token);
        }

        return (current, member);
    }

    private static (Shape Shape, Member? Member)? Step(Shape shape, JsonNode? node, string token)
    {
        switch (shape)
        {
            case ObjectShape block:
                return block.Find(token) is { } member ? (member.Shape, member) : null;
            case VariantShape variant:
                return Options(variant, node).Select(option => Step(option, node, token)).FirstOrDefault(step => step is not null);
            case NameOrObjectShape either:
                return Step(either.Object, node, token);
            case ListShape list when node is JsonArray items ? JsonPointer.TryIndex(token, items.Count, out _) : JsonPointer.TryIndex(token, int.MaxValue, out _):
                return (list.Item, null);
            case MapShape map when node is not JsonObject members || members.ContainsKey(token):
                return (map.Value, null);
            default:
                return null;
        }
    }

    private static IEnumerable<ObjectShape> Options(VariantShape variant, JsonNode? node) =>
        node is JsonObject members && variant.Find(ShapeCheck.KindOf(members["kind"])) is { } known
            ? [known]
            : variant.Options.Select(option => option.Shape);

    private static JsonNode? Child(JsonNode? node, string token) => node switch
    {
        JsonObject members => members[token],
        JsonArray items when JsonPointer.TryIndex(token, items.Count, out var index) => items[index],
        _ => null,
    };
}
