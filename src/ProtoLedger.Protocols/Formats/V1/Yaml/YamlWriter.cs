using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Formats.V1.Yaml;

/// <summary>Writes a checked tree: blocks indented by two, small objects and lists of plain values on one line.</summary>
internal sealed class YamlWriter
{
    private readonly StringBuilder text = new();

    private YamlWriter()
    {
    }

    public static string Write(JsonObject tree, ObjectShape shape)
    {
        var writer = new YamlWriter();
        writer.WriteMembers(tree, shape, 0, startsInline: false);
        return writer.text.ToString();
    }

    private void WriteMembers(JsonObject members, Shape shape, int indent, bool startsInline)
    {
        foreach (var (name, value, memberShape) in Ordered(members, shape))
        {
            if (!startsInline)
                text.Append(' ', indent);
            startsInline = false;
            text.Append(YamlText.Key(name)).Append(':');
            WriteValue(value, memberShape, indent);
        }
    }

    /// <summary>Writes what stands after a key's colon, up to and including the end of its last line.</summary>
    private void WriteValue(JsonNode value, Shape shape, int indent)
    {
        if (IsInline(value, shape))
        {
            text.Append(' ');
            WriteInline(value, shape, inFlow: false);
            text.Append('\n');
            return;
        }

        text.Append('\n');
        if (value is JsonArray items)
            WriteItems(items, ((ListShape)shape).Item, indent + 2);
        else
            WriteMembers(value.AsObject(), shape, indent + 2, startsInline: false);
    }

    private void WriteItems(JsonArray items, Shape shape, int indent)
    {
        foreach (var item in items)
        {
            text.Append(' ', indent).Append("- ");
            if (IsInline(item!, shape))
            {
                WriteInline(item!, shape, inFlow: false);
                text.Append('\n');
            }
            else
            {
                WriteMembers(item!.AsObject(), shape, indent + 2, startsInline: true);
            }
        }
    }

    private void WriteInline(JsonNode value, Shape shape, bool inFlow)
    {
        switch (value)
        {
            case JsonObject members:
                text.Append('{');
                var first = true;
                foreach (var (name, member, memberShape) in Ordered(members, shape))
                {
                    text.Append(first ? "" : ", ").Append(YamlText.Key(name)).Append(": ");
                    first = false;
                    WriteInline(member, memberShape, inFlow: true);
                }

                text.Append('}');
                break;
            case JsonArray items:
                text.Append('[');
                for (var i = 0; i < items.Count; i++)
                {
                    text.Append(i == 0 ? "" : ", ");
                    WriteInline(items[i]!, ((ListShape)shape).Item, inFlow: true);
                }

                text.Append(']');
                break;
            default:
                text.Append(Scalar(value, inFlow));
                break;
        }
    }

    private static string Scalar(JsonNode value, bool inFlow) => value.GetValueKind() switch
    {
        JsonValueKind.Number => EcmaScriptNumber.Format(StrictJson.ToDouble(value.AsValue())),
        JsonValueKind.True => "true",
        JsonValueKind.False => "false",
        _ => YamlText.Value(value.GetValue<string>(), inFlow),
    };

    private static bool IsInline(JsonNode value, Shape shape) => value switch
    {
        JsonObject { Count: 0 } => true,
        JsonObject => shape is ObjectShape { Flow: true } or MapShape { Value: TextShape } or VariantShape or NameOrObjectShape,
        JsonArray { Count: 0 } => true,
        JsonArray => ((ListShape)shape).Item is NumberShape or TextShape or ChoiceShape,
        _ => true,
    };

    private static IEnumerable<(string Name, JsonNode Value, Shape Shape)> Ordered(JsonObject members, Shape shape) => shape switch
    {
        ObjectShape block => block.Members.Where(member => members.ContainsKey(member.Name))
            .Select(member => (member.Name, members[member.Name]!, member.Shape)),
        VariantShape variant => Ordered(members, variant.Find(ShapeCheck.KindOf(members["kind"]))!),
        NameOrObjectShape either => Ordered(members, either.Object),
        MapShape map => members.OrderBy(member => member.Key, StringComparer.Ordinal).Select(member => (member.Key, member.Value!, map.Value)),
        _ => throw new ArgumentException($"{shape.GetType().Name} has no members."),
    };
}
