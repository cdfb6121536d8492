using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Formats;

/// <summary>JSON Schema (draft 2020-12) of each kind of document, for editors. The reader itself checks more.</summary>
public static class JsonSchemas
{
    private static readonly JsonSerializerOptions Indented = new()
    {
        WriteIndented = true,
        NewLine = "\n",
        Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping,
    };

    /// <summary>The schema as indented JSON text that ends in a line feed.</summary>
    /// <param name="kind">Kind of document.</param>
    public static string Write(DocumentKind kind)
    {
        var schema = new JsonObject
        {
            ["$schema"] = "https://json-schema.org/draft/2020-12/schema",
            ["title"] = $"ProtoLedger {DocumentKinds.Word(kind)}, format {DocumentShapes.Format}",
        };
        foreach (var (name, value) in Of(DocumentShapes.Of(kind)))
            schema[name] = value?.DeepClone();
        return schema.ToJsonString(Indented) + "\n";
    }

    private static JsonObject Of(Shape shape) => shape switch
    {
        NumberShape number => OfNumber(number),
        TextShape text => OfText(text),
        ChoiceShape choice => new JsonObject { ["enum"] = new JsonArray([.. choice.Words.Select(word => (JsonNode)word)]) },
        FlagShape => new JsonObject { ["type"] = "boolean" },
        ListShape list => new JsonObject
        {
            ["type"] = "array", ["minItems"] = list.Minimum, ["maxItems"] = list.Maximum, ["items"] = Of(list.Item),
        },
        MapShape map => new JsonObject
        {
            ["type"] = "object", ["maxProperties"] = map.Maximum, ["propertyNames"] = Of(map.Key), ["additionalProperties"] = Of(map.Value),
        },
        ObjectShape block => OfObject(block),
        VariantShape variant => new JsonObject { ["oneOf"] = new JsonArray([.. variant.Options.Select(option => OfObject(option.Shape))]) },
        NameOrObjectShape either => new JsonObject { ["oneOf"] = new JsonArray(Of(either.Text), Of(either.Object)) },
        _ => throw new ArgumentException($"No schema for {shape.GetType().Name}."),
    };

    private static JsonObject OfNumber(NumberShape number) => new()
    {
        ["type"] = number.Whole ? "integer" : "number",
        [number.LowOpen ? "exclusiveMinimum" : "minimum"] = number.Low,
        ["maximum"] = number.High,
    };

    private static JsonObject OfText(TextShape text)
    {
        var schema = new JsonObject { ["type"] = "string", ["minLength"] = 1, ["maxLength"] = text.MaximumLength };
        if (text.Pattern is { } pattern)
            schema["pattern"] = pattern.ToString();
        return schema;
    }

    private static JsonObject OfObject(ObjectShape block)
    {
        var properties = new JsonObject();
        foreach (var member in block.Members)
        {
            var property = Of(member.Shape);
            property["description"] = Describe(member);
            properties[member.Name] = property;
        }

        return new JsonObject
        {
            ["type"] = "object",
            ["required"] = new JsonArray([.. block.Members.Where(member => member.Required).Select(member => (JsonNode)member.Name)]),
            ["additionalProperties"] = false,
            ["properties"] = properties,
        };
    }

    private static string Describe(Member member)
    {
        var number = member.Shape as NumberShape ?? (member.Shape as ListShape)?.Item as NumberShape;
        var text = new StringBuilder(member.Label);
        if (number is { Unit.Length: > 0 })
            text.Append(", ").Append(number.Unit);
        if (member.Tag is { } tag)
            text.Append(", DICOM ").Append(member.Keyword).Append(' ').Append(tag);
        return text.ToString();
    }
}
