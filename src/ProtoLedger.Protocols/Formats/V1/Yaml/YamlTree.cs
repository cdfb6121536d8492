using System.Text;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;
using YamlDotNet.Core;
using YamlDotNet.Core.Events;

namespace ProtoLedger.Protocols.Formats.V1.Yaml;

/// <summary>
/// A YAML text as a plain tree. Events are read one by one, so that nothing is expanded or constructed; every scalar is a
/// text at first, and <see cref="YamlTyping"/> then makes of it what the format asks for at its place.
/// </summary>
internal sealed class YamlTree
{
    private readonly Parser parser;
    private readonly YamlPlaces places;

    private YamlTree(string yaml, YamlPlaces places) => (parser, this.places) = (new Parser(new StringReader(yaml)), places);

    /// <param name="yaml">The text.</param>
    /// <param name="shapeOf">Shape of the whole, once its tree of texts is known; null where there is none.</param>
    public static YamlTreeResult Parse(string yaml, Func<JsonNode, Shape?> shapeOf)
    {
        var places = new YamlPlaces();
        try
        {
            var bytes = Encoding.UTF8.GetByteCount(yaml);
            if (bytes > CanonicalJson.MaximumBytes)
                throw new CanonicalJsonException("", $"The text has {bytes} bytes; the limit is {CanonicalJson.MaximumBytes} (1 MiB).");
            StrictJson.RequireText(yaml, "");
            var tree = new YamlTree(yaml, places).ReadStream();
            return new YamlTreeResult.Parsed(YamlTyping.Apply(tree, shapeOf(tree), places), places);
        }
        catch (YamlRefusedException fault)
        {
            return new YamlTreeResult.Refused([fault.Error]);
        }
        catch (CanonicalJsonException fault)
        {
            return new YamlTreeResult.Refused([places.Locate(new DocumentError(fault.Pointer, null, null, fault.Detail))]);
        }
        catch (YamlException fault)
        {
            return new YamlTreeResult.Refused(
                [new DocumentError("", null, null, $"Not YAML: {fault.Message}", (int)fault.Start.Line, (int)fault.Start.Column)]);
        }
        catch (Exception fault) when (fault is InvalidOperationException or ArgumentException or IndexOutOfRangeException)
        {
            // The scanner throws these, without a place, at a text that ends within a flow collection and the like.
            return new YamlTreeResult.Refused([new DocumentError("", null, null, "Not YAML: the text ends or breaks off within a value.")]);
        }
    }

    private JsonNode ReadStream()
    {
        parser.Consume<StreamStart>();
        if (parser.Accept<StreamEnd>(out var end))
            throw Refuse(end, "", null, "The text holds no document.");
        var start = parser.Consume<DocumentStart>();
        if (start.Version is not null)
            throw Refuse(start, "", "%YAML", "Directives are refused.");
        var tree = ReadNode("", 0);
        parser.Consume<DocumentEnd>();
        return parser.Accept<StreamEnd>(out _)
            ? tree
            : throw Refuse(parser.Current!, "", null, "The text holds more than one document; exactly one is allowed.");
    }

    private JsonNode ReadNode(string pointer, int depth)
    {
        if (parser.TryConsume<AnchorAlias>(out var alias))
            throw Refuse(alias, pointer, "*" + alias.Value, "Aliases are refused: write the value out.");
        var node = parser.Current as NodeEvent ?? throw new InvalidOperationException($"Unexpected {parser.Current}.");
        places.Note(pointer, node.Start.Line, node.Start.Column);
        RequirePlain(node, pointer);
        if (parser.TryConsume<Scalar>(out var scalar))
        {
            if (scalar.Style == ScalarStyle.Plain)
                places.NotePlain(pointer);
            return JsonValue.Create(scalar.Value)!;
        }

        if (depth >= CanonicalJson.MaximumDepth)
            throw Refuse(node, pointer, null, $"Nested deeper than {CanonicalJson.MaximumDepth} levels.");
        return parser.TryConsume<SequenceStart>(out _) ? ReadSequence(pointer, depth) : ReadMapping(pointer, depth);
    }

    private JsonArray ReadSequence(string pointer, int depth)
    {
        var items = new JsonArray();
        while (!parser.TryConsume<SequenceEnd>(out _))
            items.Add(ReadNode(JsonPointer.Append(pointer, items.Count), depth + 1));
        return items;
    }

    private JsonObject ReadMapping(string pointer, int depth)
    {
        parser.Consume<MappingStart>();
        var members = new JsonObject();
        while (!parser.TryConsume<MappingEnd>(out _))
        {
            if (parser.Current is not Scalar key)
                throw Refuse(parser.Current!, pointer, null, "A key must be a plain text, no alias, list or mapping.");
            RequirePlain(key, pointer);
            parser.Consume<Scalar>();
            var place = JsonPointer.Append(pointer, key.Value);
            if (key is { Value: "<<", Style: ScalarStyle.Plain })
                throw Refuse(key, place, "<<", "Merge keys are refused: write the values out.");
            if (members.ContainsKey(key.Value))
                throw Refuse(key, place, key.Value, $"The key \"{key.Value}\" stands here twice; each key may stand once.");
            members.Add(key.Value, ReadNode(place, depth + 1));
        }

        return members;
    }

    private static void RequirePlain(NodeEvent node, string pointer)
    {
        if (!node.Anchor.IsEmpty)
            throw Refuse(node, pointer, "&" + node.Anchor.Value, "Anchors are refused: write the value out where it is needed.");
        if (!node.Tag.IsEmpty)
            throw Refuse(node, pointer, node.Tag.Value, "Tags are refused: the format says what each value is.");
    }

    private static YamlRefusedException Refuse(ParsingEvent at, string pointer, string? value, string detail) =>
        new(new DocumentError(pointer, value, null, detail, (int)at.Start.Line, (int)at.Start.Column));
}
