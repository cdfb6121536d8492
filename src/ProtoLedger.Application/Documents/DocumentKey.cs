using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.Documents;

/// <summary>Names a document.</summary>
/// <param name="Kind">Kind.</param>
/// <param name="Id">Identifier within the kind.</param>
public readonly record struct DocumentKey(DocumentKind Kind, string Id)
{
    /// <summary>As words: <c>protocol brain-standard</c>.</summary>
    public override string ToString() => $"{KindWord} {Id}";

    /// <summary>The kind in lower case, as tables and addresses spell it.</summary>
    public string KindWord => Word(Kind);

    /// <summary>The kind in lower case, as tables and addresses spell it.</summary>
    /// <param name="kind">Kind.</param>
    public static string Word(DocumentKind kind) => kind switch
    {
        DocumentKind.Protocol => "protocol",
        DocumentKind.Scanner => "scanner",
        DocumentKind.Conditions => "conditions",
        DocumentKind.Catalogue => "catalogue",
        DocumentKind.Expectations => "expectations",
        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "No such kind of document."),
    };

    /// <summary>The kind of a word, or null.</summary>
    /// <param name="word">One of the five, lower case.</param>
    public static DocumentKind? KindOf(string word)
    {
        foreach (var kind in Enum.GetValues<DocumentKind>())
            if (Word(kind) == word)
                return kind;
        return null;
    }
}
