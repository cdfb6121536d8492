namespace ProtoLedger.Protocols.Documents;

/// <summary>What reading a document gives: the document with its canonical bytes, or what is wrong with it.</summary>
public abstract record ParseResult
{
    private ParseResult()
    {
    }

    /// <summary>The document is well formed and physically possible as far as it alone can tell.</summary>
    /// <param name="Document">The document.</param>
    /// <param name="CanonicalBytes">RFC 8785 bytes that are stored.</param>
    /// <param name="Sha256">Their SHA-256, lower-case hexadecimal.</param>
    public sealed record Parsed(LedgerDocument Document, byte[] CanonicalBytes, string Sha256) : ParseResult;

    /// <summary>The document is refused.</summary>
    /// <param name="Errors">At least one, in the order of the document.</param>
    public sealed record Refused(IReadOnlyList<DocumentError> Errors) : ParseResult;
}
