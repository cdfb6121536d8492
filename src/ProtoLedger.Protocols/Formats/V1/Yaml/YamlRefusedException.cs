using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Formats.V1.Yaml;

/// <summary>Ends the reading of a YAML text; never leaves <see cref="YamlTree"/>.</summary>
internal sealed class YamlRefusedException(DocumentError error) : Exception(error.Detail)
{
    public DocumentError Error { get; } = error;
}
