using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;
using ProtoLedger.Protocols.Formats.V1.Yaml;

namespace ProtoLedger.Protocols.Formats;

/// <summary>The canonical YAML of a document: keys in the order of the format, one text for one document.</summary>
public static class YamlExport
{
    /// <summary>YAML of a stored document; reading it gives the same canonical bytes.</summary>
    /// <param name="canonical">Canonical bytes of a document that was read before.</param>
    /// <exception cref="ArgumentException">The bytes are no document.</exception>
    public static string Write(ReadOnlySpan<byte> canonical)
    {
        var tree = StrictJson.Parse(canonical) as JsonObject;
        return DocumentKinds.TryParse(ShapeCheck.KindOf(tree?["kind"]), out var kind)
            ? YamlWriter.Write(tree!, DocumentShapes.Of(kind))
            : throw new ArgumentException("The bytes hold no document of a known kind.", nameof(canonical));
    }
}
