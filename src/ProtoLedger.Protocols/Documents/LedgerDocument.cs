namespace ProtoLedger.Protocols.Documents;

/// <summary>A parsed and validated document of any kind.</summary>
/// <param name="Id">Lower-case words joined by hyphens, unique within its kind, never reused.</param>
/// <param name="Title">As people say it.</param>
/// <param name="Note">Free prose, or null.</param>
public abstract record LedgerDocument(string Id, string Title, string? Note)
{
    /// <summary>Kind of the document.</summary>
    public abstract DocumentKind Kind { get; }
}
