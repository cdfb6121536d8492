namespace ProtoLedger.Protocols.Documents;

/// <summary>The words by which documents and addresses name the kinds.</summary>
public static class DocumentKinds
{
    /// <summary>All kinds.</summary>
    public static IReadOnlyList<DocumentKind> All { get; } = Enum.GetValues<DocumentKind>();

    /// <summary>All words: protocol, scanner, conditions, catalogue, expectations.</summary>
    public static IReadOnlyList<string> Words { get; } = [.. All.Select(Word)];

    /// <summary>The word of a kind.</summary>
    /// <param name="kind">The kind.</param>
    public static string Word(DocumentKind kind) => kind switch
    {
        DocumentKind.Protocol => "protocol",
        DocumentKind.Scanner => "scanner",
        DocumentKind.Conditions => "conditions",
        DocumentKind.Catalogue => "catalogue",
        DocumentKind.Expectations => "expectations",
        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "No such kind of document."),
    };

    /// <summary>The kind of a word, exactly as written.</summary>
    /// <param name="word">The word, or null.</param>
    /// <param name="kind">Its kind.</param>
    /// <returns>False where there is none.</returns>
    public static bool TryParse(string? word, out DocumentKind kind)
    {
        kind = All.FirstOrDefault(candidate => Word(candidate) == word);
        return word is not null && Words.Contains(word);
    }
}
