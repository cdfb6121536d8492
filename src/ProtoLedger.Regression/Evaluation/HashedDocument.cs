using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Regression.Evaluation;

/// <summary>A document together with its canonical bytes and their identity.</summary>
/// <typeparam name="T">Kind of document.</typeparam>
/// <param name="Document">The parsed and validated document.</param>
/// <param name="Sha256">SHA-256 of <paramref name="CanonicalBytes"/>, lower-case hexadecimal.</param>
/// <param name="CanonicalBytes">RFC 8785 bytes of the document: comparisons and hybrids of two versions are made from them.</param>
public sealed record HashedDocument<T>(T Document, string Sha256, byte[] CanonicalBytes)
    where T : LedgerDocument;

/// <summary>Makes hashed documents.</summary>
public static class HashedDocument
{
    /// <summary>From what reading a document gave.</summary>
    /// <typeparam name="T">Kind of document.</typeparam>
    /// <param name="parsed">A document that was read.</param>
    /// <exception cref="ArgumentException">The document is of another kind.</exception>
    public static HashedDocument<T> From<T>(ParseResult.Parsed parsed)
        where T : LedgerDocument
    {
        ArgumentNullException.ThrowIfNull(parsed);
        return parsed.Document is T document
            ? new(document, parsed.Sha256, parsed.CanonicalBytes)
            : throw new ArgumentException($"A {parsed.Document.Kind} document is no {typeof(T).Name}.", nameof(parsed));
    }
}
