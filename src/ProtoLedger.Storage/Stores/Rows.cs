using ProtoLedger.Application.Documents;

namespace ProtoLedger.Storage.Stores;

/// <summary>What several stores need to read their rows.</summary>
internal static class Rows
{
    /// <summary>Key of a kind's word and an identifier; the table's check constraint allows no other word.</summary>
    public static DocumentKey Key(string kind, string id) =>
        new(DocumentKey.KindOf(kind) ?? throw new InvalidOperationException($"'{kind}' is no kind of document."), id);
}
