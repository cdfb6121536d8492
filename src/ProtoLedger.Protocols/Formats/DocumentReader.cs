using System.Text.Json;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1;
using ProtoLedger.Protocols.Formats.V1.Shapes;
using ProtoLedger.Protocols.Formats.V1.Yaml;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Protocols.Formats;

/// <summary>Documents from JSON or YAML: parsed, checked against the format and against physics, and made canonical.</summary>
/// <remarks>
/// What a document refers to in other documents is checked by <see cref="CrossDocumentValidation"/>.
/// Texts of more than 1 MiB or deeper than 64 levels are refused.
/// </remarks>
public static class DocumentReader
{
    /// <summary>Reads a JSON text.</summary>
    /// <param name="json">UTF-8.</param>
    /// <param name="expected">Kind that the document must have, or null for any.</param>
    public static ParseResult ReadJson(ReadOnlySpan<byte> json, DocumentKind? expected = null)
    {
        try
        {
            return ReadTree(StrictJson.Parse(json), expected);
        }
        catch (CanonicalJsonException fault)
        {
            return Refuse(fault);
        }
    }

    /// <summary>Reads a JSON value that a framework has parsed already.</summary>
    /// <param name="json">The value; its original text is read again, so that duplicate keys are seen.</param>
    /// <param name="expected">Kind that the document must have, or null for any.</param>
    public static ParseResult ReadJson(JsonElement json, DocumentKind? expected = null) =>
        json.ValueKind == JsonValueKind.Undefined
            ? new ParseResult.Refused([new DocumentError("", null, null, "There is no document.")])
            : ReadJson(System.Text.Encoding.UTF8.GetBytes(json.GetRawText()), expected);

    /// <summary>Reads a YAML text; errors carry line and column.</summary>
    /// <param name="yaml">One document, block or flow style, no anchors, aliases, merge keys or tags.</param>
    /// <param name="expected">Kind that the document must have, or null for any.</param>
    public static ParseResult ReadYaml(string yaml, DocumentKind? expected = null)
    {
        switch (YamlTree.Parse(yaml, ShapeOf))
        {
            case YamlTreeResult.Refused(var errors):
                return new ParseResult.Refused(errors);
            case YamlTreeResult.Parsed(var tree, var places):
                return ReadTree(tree, expected) switch
                {
                    ParseResult.Refused refused => new ParseResult.Refused([.. refused.Errors.Select(places.Locate)]),
                    var read => read,
                };
            case var other:
                throw new InvalidOperationException(other.GetType().Name);
        }
    }

    /// <summary>Reads a tree, for instance one that was edited in memory.</summary>
    /// <param name="tree">The tree; it is not changed or kept.</param>
    /// <param name="expected">Kind that the document must have, or null for any.</param>
    public static ParseResult ReadTree(JsonNode? tree, DocumentKind? expected = null)
    {
        try
        {
            var bytes = CanonicalJson.Serialize(tree);
            if (tree is not JsonObject members)
                return new ParseResult.Refused([new DocumentError("", ShownValue.Of(tree), null, "A document is a mapping of keys to values.")]);
            if (KindOf(members, expected, out var kind) is { } fault)
                return new ParseResult.Refused([fault]);
            var errors = ShapeCheck.Run(members, DocumentShapes.Of(kind));
            if (errors.Count > 0)
                return new ParseResult.Refused(errors);
            var document = DocumentReading.Read(kind, members);
            errors = DocumentValidation.Validate(document, members);
            return errors.Count > 0
                ? new ParseResult.Refused(errors)
                : new ParseResult.Parsed(document, bytes, CanonicalJson.Sha256(bytes));
        }
        catch (CanonicalJsonException refused)
        {
            return Refuse(refused);
        }
    }

    private static ObjectShape? ShapeOf(JsonNode tree) =>
        tree is JsonObject members && DocumentKinds.TryParse(ShapeCheck.KindOf(members["kind"]), out var kind) ? DocumentShapes.Of(kind) : null;

    private static DocumentError? KindOf(JsonObject members, DocumentKind? expected, out DocumentKind kind)
    {
        kind = default;
        var words = string.Join(", ", DocumentKinds.Words);
        if (!members.TryGetPropertyValue("kind", out var node))
            return new DocumentError("/kind", null, words, "The key \"kind\" is missing.");
        if (!DocumentKinds.TryParse(ShapeCheck.KindOf(node), out kind))
            return new DocumentError("/kind", ShownValue.Of(node) ?? "null", words, "There is no such kind of document.");
        return expected is { } wanted && wanted != kind
            ? new DocumentError("/kind", ShownValue.Of(node), DocumentKinds.Word(wanted), "The document is of another kind than this place asks for.")
            : null;
    }

    private static ParseResult.Refused Refuse(CanonicalJsonException fault) =>
        new([new DocumentError(fault.Pointer, null, null, fault.Detail)]);
}
