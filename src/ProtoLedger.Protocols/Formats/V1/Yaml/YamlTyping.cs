using System.Globalization;
using System.Text.Json.Nodes;
using System.Text.RegularExpressions;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Formats.V1.Yaml;

/// <summary>Makes numbers and flags of plain scalars where the shape asks for them; everything else stays a text for the check to judge.</summary>
internal sealed partial class YamlTyping
{
    private readonly YamlPlaces places;

    private YamlTyping(YamlPlaces places) => this.places = places;

    public static JsonNode Apply(JsonNode tree, Shape? shape, YamlPlaces places) =>
        shape is null ? tree : new YamlTyping(places).Convert(tree, shape, "")!;

    private JsonNode? Convert(JsonNode? node, Shape? shape, string pointer) => (node, shape) switch
    {
        (JsonObject members, ObjectShape block) => ConvertMembers(members, name => block.Find(name)?.Shape, pointer),
        (JsonObject members, MapShape map) => ConvertMembers(members, _ => map.Value, pointer),
        (JsonObject members, VariantShape variant) => Convert(members, variant.Find(ShapeCheck.KindOf(members["kind"])), pointer),
        (JsonObject, NameOrObjectShape either) => Convert(node, either.Object, pointer),
        (JsonArray items, ListShape list) =>
            new JsonArray([.. items.Select((item, index) => Convert(item, list.Item, JsonPointer.Append(pointer, index)))]),
        (JsonValue value, NumberShape or FlagShape) when places.IsPlain(pointer) => ConvertScalar(value.GetValue<string>(), shape, pointer),
        (JsonValue value, ObjectShape or MapShape or VariantShape or ListShape) when places.IsPlain(pointer) && IsNull(value.GetValue<string>()) => null,
        _ => node?.DeepClone(),
    };

    private JsonObject ConvertMembers(JsonObject members, Func<string, Shape?> shapeOf, string pointer)
    {
        var converted = new JsonObject();
        foreach (var (name, value) in members)
            converted.Add(name, Convert(value, shapeOf(name), JsonPointer.Append(pointer, name)));
        return converted;
    }

    private static JsonValue? ConvertScalar(string text, Shape shape, string pointer)
    {
        if (IsNull(text))
            return null;
        if (shape is FlagShape)
            return text is "true" or "false" ? JsonValue.Create(text == "true") : JsonValue.Create(text);
        if (NonFinite().IsMatch(text))
            throw new CanonicalJsonException(pointer, $"The number {text} is not finite.");
        if (!JsonNumber().IsMatch(text))
            return JsonValue.Create(text);
        var number = double.Parse(text, NumberStyles.Float, CultureInfo.InvariantCulture);
        return double.IsFinite(number)
            ? JsonValue.Create(number)
            : throw new CanonicalJsonException(pointer, $"The number {text} is beyond the range of a double, so it is not finite.");
    }

    private static bool IsNull(string text) => text is "" or "~" or "null" or "Null" or "NULL";

    [GeneratedRegex(@"^-?(0|[1-9]\d*)(\.\d+)?([eE][+-]?\d+)?\z")]
    private static partial Regex JsonNumber();

    [GeneratedRegex(@"^[+-]?\.?(inf|nan|infinity)\z", RegexOptions.IgnoreCase)]
    private static partial Regex NonFinite();
}
