using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Store;

/// <summary>Names of the folders of a protocol store.</summary>
public static class StoreFolder
{
    /// <summary>Folder of a kind: protocols, scanners, conditions, catalogue, expectations.</summary>
    /// <param name="kind">The kind.</param>
    public static string Of(DocumentKind kind) => kind switch
    {
        DocumentKind.Protocol => "protocols",
        DocumentKind.Scanner => "scanners",
        _ => DocumentKinds.Word(kind),
    };
}
