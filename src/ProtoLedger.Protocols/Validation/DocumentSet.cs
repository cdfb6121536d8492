using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Validation;

/// <summary>The documents that are current together: at most one of each kind and identifier.</summary>
public sealed class DocumentSet
{
    private readonly Dictionary<(DocumentKind Kind, string Id), LedgerDocument> documents;

    /// <summary>A set of documents.</summary>
    /// <param name="documents">A later document replaces an earlier one of the same kind and identifier.</param>
    public DocumentSet(IEnumerable<LedgerDocument> documents)
    {
        this.documents = [];
        foreach (var document in documents)
            this.documents[(document.Kind, document.Id)] = document;
    }

    /// <summary>The same set with one document put in, or in the place of its predecessor.</summary>
    /// <param name="document">The document.</param>
    public DocumentSet With(LedgerDocument document) => new([.. documents.Values, document]);

    /// <summary>A document, or null where there is none.</summary>
    /// <typeparam name="T">Type that belongs to <paramref name="kind"/>.</typeparam>
    /// <param name="kind">Kind.</param>
    /// <param name="id">Identifier.</param>
    public T? Find<T>(DocumentKind kind, string id)
        where T : LedgerDocument => documents.GetValueOrDefault((kind, id)) as T;

    /// <summary>All documents of a type, by identifier.</summary>
    /// <typeparam name="T">The type.</typeparam>
    public IReadOnlyList<T> All<T>()
        where T : LedgerDocument => [.. documents.Values.OfType<T>().OrderBy(document => document.Id, StringComparer.Ordinal)];
}
