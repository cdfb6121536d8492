using System.Collections.Concurrent;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Application.Documents;

/// <summary>Parsed documents by the hash of their bytes: a stored document never changes, so it is parsed once.</summary>
public sealed class DocumentShelf
{
    private const int Most = 20_000;
    private readonly ConcurrentDictionary<string, LedgerDocument> parsed = new(StringComparer.Ordinal);

    /// <summary>The document of stored canonical bytes.</summary>
    /// <exception cref="InvalidOperationException">The bytes are no valid document: the store was altered.</exception>
    internal LedgerDocument Read(byte[] sha256, byte[] bytes)
    {
        var key = Convert.ToHexStringLower(sha256);
        if (parsed.TryGetValue(key, out var known))
            return known;
        var document = DocumentReader.ReadJson(bytes) switch
        {
            ParseResult.Parsed(var read, _, var hash) when hash == key => read,
            ParseResult.Refused(var errors) => throw new InvalidOperationException($"Stored document {key} is not valid: {errors[0].Pointer}: {errors[0].Detail}"),
            _ => throw new InvalidOperationException($"Stored document {key} has other bytes than its hash says."),
        };
        if (parsed.Count >= Most)
            parsed.Clear();
        parsed[key] = document;
        return document;
    }

    /// <summary>The document of a stored version.</summary>
    internal LedgerDocument Read(StoredVersion version) => Read(version.Sha256, version.Bytes);

    /// <summary>Newest versions of every document together.</summary>
    internal async Task<DocumentSet> CurrentAsync(IStores stores, CancellationToken cancellationToken)
    {
        var documents = new List<LedgerDocument>();
        foreach (var kind in Enum.GetValues<DocumentKind>())
            foreach (var version in await stores.Documents.NewestOfEachAsync(kind, null, int.MaxValue, cancellationToken))
                documents.Add(Read(version));
        return new DocumentSet(documents);
    }
}

/// <summary>Faults of documents as refusals.</summary>
internal static class DocumentFaults
{
    /// <summary>Refusal of a document that stands at <paramref name="place"/> in the request.</summary>
    public static Invalid ToRefusal(this IReadOnlyList<DocumentError> errors, string place = "/document") =>
        new(
            errors.Count == 1 ? errors[0].Detail : $"The document has {errors.Count} faults.",
            [.. errors.Select(error => new FieldError(place + error.Pointer, error.Value, error.Limit ?? "", error.Detail))]);
}
