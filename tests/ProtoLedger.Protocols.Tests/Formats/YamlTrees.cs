using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Formats.V1.Shapes;
using ProtoLedger.Protocols.Formats.V1.Yaml;

namespace ProtoLedger.Protocols.Tests.Formats;

/// <summary>Trees of protocol texts that need not be valid.</summary>
internal static class YamlTrees
{
    public static JsonNode Of(string yaml) =>
        Assert.IsType<YamlTreeResult.Parsed>(YamlTree.Parse(yaml, _ => DocumentShapes.Protocol)).Tree!;
}
