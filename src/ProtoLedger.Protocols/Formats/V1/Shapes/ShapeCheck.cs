using System.Text.Json;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Formats.V1.Shapes;

/// <summary>Checks a tree against a shape; collects every error rather than the first.</summary>
internal sealed class ShapeCheck
{
    private readonly List<DocumentError> errors = [];

    private ShapeCheck()
    {
    }

    public static IReadOnlyList<DocumentError> Run(JsonNode? node, Shape shape, string pointer = "")
    {
        var check = new ShapeCheck();
        check.Check(node, shape, pointer);
        return check.errors;
    }

    private void Check(JsonNode? node, Shape shape, string pointer)
    {
        if (node is null)
        {
            Add(pointer, null, null, "The value is null; leave an optional key out instead.", "null");
            return;
        }

        switch (shape)
        {
            case NumberShape number:
                CheckNumber(node, number, pointer);
                break;
            case TextShape text:
                CheckText(node, text, pointer);
                break;
            case ChoiceShape choice:
                CheckChoice(node, choice, pointer);
                break;
            case FlagShape when node.GetValueKind() is not (JsonValueKind.True or JsonValueKind.False):
                Add(pointer, node, "true or false", "The value must be true or false.");
                break;
            case ListShape list:
                CheckList(node, list, pointer);
                break;
            case MapShape map:
                CheckMap(node, map, pointer);
                break;
            case ObjectShape block:
                CheckObject(node, block, pointer);
                break;
            case VariantShape variant:
                CheckVariant(node, variant, pointer);
                break;
            case NameOrObjectShape either:
                Check(node, node is JsonObject ? either.Object : either.Text, pointer);
                break;
        }
    }

    private void CheckNumber(JsonNode node, NumberShape shape, string pointer)
    {
        if (node.GetValueKind() != JsonValueKind.Number)
            Add(pointer, node, shape.Limit, $"A number{InUnit(shape)} is needed here.");
        else if (!shape.Contains(StrictJson.ToDouble(node.AsValue())))
            Add(pointer, node, shape.Limit, shape.Whole ? "The value is no whole number in the allowed range." : "The value is outside the allowed range.");
    }

    private void CheckText(JsonNode node, TextShape shape, string pointer)
    {
        if (node.GetValueKind() != JsonValueKind.String)
        {
            Add(pointer, node, null, "A text is needed here.");
            return;
        }

        var text = node.GetValue<string>();
        var limit = $"1 to {shape.MaximumLength} characters";
        if (text.Length == 0)
            Add(pointer, node, limit, "The text is empty; leave an optional key out instead.");
        else if (text.Length > shape.MaximumLength)
            Add(pointer, node, limit, $"The text has {text.Length} characters.");
        else if (text.Any(character => char.IsControl(character) && character is not ('\n' or '\t')))
            Add(pointer, node, "no control characters but line feed and tab", "The text holds a control character.");
        else if (shape.Pattern?.IsMatch(text) == false || (shape.Pattern is not null && text.EndsWith('\n')))
            Add(pointer, node, shape.PatternInWords, "The text has not the form that is needed here.");
    }

    private void CheckChoice(JsonNode node, ChoiceShape shape, string pointer)
    {
        if (node.GetValueKind() != JsonValueKind.String || !shape.Words.Contains(node.GetValue<string>()))
            Add(pointer, node, string.Join(", ", shape.Words), "The value is none of the allowed words.");
    }

    private void CheckList(JsonNode node, ListShape shape, string pointer)
    {
        if (node is not JsonArray items)
        {
            Add(pointer, node, null, "A list is needed here.");
            return;
        }

        if (items.Count < shape.Minimum || items.Count > shape.Maximum)
            Add(pointer, null, $"{shape.Minimum} to {shape.Maximum} items", $"The list has {items.Count} items.", $"{items.Count} items");
        for (var i = 0; i < items.Count; i++)
            Check(items[i], shape.Item, JsonPointer.Append(pointer, i));
        if (shape.Identity.Count > 0 && shape.Distinct)
            CheckDistinct(items, shape, pointer);
    }

    private void CheckDistinct(JsonArray items, ListShape shape, string pointer)
    {
        var seen = new HashSet<string>();
        for (var i = 0; i < items.Count; i++)
        {
            var identity = ItemIdentity.Of(items[i], shape);
            if (identity is not null && !seen.Add(identity))
                Add(JsonPointer.Append(pointer, i), items[i], "each once", $"\"{identity}\" stands in this list twice.");
        }
    }

    private void CheckMap(JsonNode node, MapShape shape, string pointer)
    {
        if (node is not JsonObject members)
        {
            Add(pointer, node, null, "A mapping is needed here.");
            return;
        }

        if (members.Count > shape.Maximum)
            Add(pointer, null, $"at most {shape.Maximum} keys", $"The mapping has {members.Count} keys.", $"{members.Count} keys");
        foreach (var (name, value) in members)
        {
            var place = JsonPointer.Append(pointer, name);
            CheckText(JsonValue.Create(name), shape.Key, place);
            Check(value, shape.Value, place);
        }
    }

    private void CheckObject(JsonNode node, ObjectShape shape, string pointer)
    {
        if (node is not JsonObject members)
        {
            Add(pointer, node, null, $"A mapping is needed here: {shape.Name}.");
            return;
        }

        var allowed = string.Join(", ", shape.Members.Select(member => member.Name));
        foreach (var (name, value) in members)
        {
            var place = JsonPointer.Append(pointer, name);
            if (shape.Find(name) is { } member)
                Check(value, member.Shape, place);
            else
                Add(place, value, allowed, $"The key \"{name}\" is unknown in {shape.Name}.", value is null ? "null" : null);
        }

        foreach (var member in shape.Members.Where(member => member.Required && !members.ContainsKey(member.Name)))
            Add(JsonPointer.Append(pointer, member.Name), null, Limit(member.Shape), $"The key \"{member.Name}\" ({member.Label}) is missing in {shape.Name}.");
    }

    private void CheckVariant(JsonNode node, VariantShape shape, string pointer)
    {
        if (node is not JsonObject members)
        {
            Add(pointer, node, null, $"A mapping is needed here: {shape.Name}.");
            return;
        }

        var kinds = string.Join(", ", shape.Options.Select(option => option.Kind));
        var place = JsonPointer.Append(pointer, "kind");
        if (!members.TryGetPropertyValue("kind", out var kind))
            Add(place, null, kinds, $"The key \"kind\" is missing in {shape.Name}.");
        else if (KindOf(kind) is { } name && shape.Find(name) is { } option)
            CheckObject(node, option, pointer);
        else
            Add(place, kind, kinds, $"There is no such kind of {shape.Name}.", kind is null ? "null" : null);
    }

    internal static string? KindOf(JsonNode? kind) =>
        kind?.GetValueKind() == JsonValueKind.String ? kind.GetValue<string>() : null;

    private static string? Limit(Shape shape) => shape switch
    {
        NumberShape number => number.Limit,
        ChoiceShape choice => string.Join(", ", choice.Words),
        TextShape text => text.PatternInWords,
        _ => null,
    };

    private static string InUnit(NumberShape shape) => shape.Unit.Length == 0 ? "" : $" in {shape.Unit}";

    private void Add(string pointer, JsonNode? value, string? limit, string detail, string? shown = null) =>
        errors.Add(new DocumentError(pointer, shown ?? ShownValue.Of(value), limit, detail));
}
