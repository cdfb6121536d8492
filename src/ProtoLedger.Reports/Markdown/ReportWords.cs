using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Markdown;

/// <summary>Phrases that several sections of a change report need.</summary>
internal sealed class ReportWords(ChangeReport report)
{
    /// <summary>A scanner's title as literal text.</summary>
    public string Scanner(string id) => UserText.Literal(report.Scanners.FirstOrDefault(s => s.ScannerId == id)?.Title ?? id);

    /// <summary>Titles joined, "all scanners" where none is named or all are.</summary>
    public string Scanners(IReadOnlyCollection<string> ids) =>
        ids.Count == 0 || (ids.Count == report.Scanners.Count && ids.Count > 1) ? "all scanners" : Join(ids.Select(Scanner).ToList());

    /// <summary>"a", "a and b", "a, b and c".</summary>
    public static string Join(IReadOnlyList<string> parts) => parts.Count switch
    {
        0 => "",
        1 => parts[0],
        _ => $"{string.Join(", ", parts.Take(parts.Count - 1))} and {parts[^1]}",
    };

    /// <summary>A meaning as documents spell it, such as <c>toExcitation</c>, in words; other text as it is.</summary>
    public static string Meaning(string meaning) => meaning.Contains(' ', StringComparison.Ordinal)
        ? UserText.Literal(meaning)
        : UserText.Literal(string.Concat(meaning.Select((c, i) => i > 0 && char.IsAsciiLetterUpper(c) && char.IsAsciiLetterLower(meaning[i - 1]) ? $" {char.ToLowerInvariant(c)}" : c.ToString())));

    /// <summary>First letter in upper case, a full stop at the end.</summary>
    public static string Sentence(string words)
    {
        var text = Capital(words.TrimEnd());
        return text.Length > 0 && text[^1] is not ('.' or '!' or '?') ? text + "." : text;
    }

    /// <summary>First letter in upper case.</summary>
    public static string Capital(string words) =>
        words.Length > 0 ? char.ToUpperInvariant(words[0]) + words[1..] : words;

    /// <summary>An observable's name in a table, as literal text.</summary>
    public static string Label(string observable, string? subject, string? reference) =>
        UserText.Literal(Capital(ObservableWords.Label(observable, subject, reference)));

    /// <summary>Old and new with their unit, as literal text.</summary>
    public static (string Old, string New) Values(string observable, double? before, double? after, string unit)
    {
        var (old, @new) = ObservableWords.Values(observable, before, after, unit);
        return (UserText.Literal(old), UserText.Literal(@new));
    }

    /// <summary>A number with its unit, as literal text.</summary>
    public static string WithUnit(string number, string unit) => UserText.Literal(ObservableWords.WithUnit(number, unit));

    /// <summary>A count and its noun.</summary>
    public static string Count(int number, string one, string many) => $"{Numbers.Whole(number)} {(number == 1 ? one : many)}";

    /// <summary>Code span for identifiers; a text that a code span could not hold is set as literal text.</summary>
    public static string Code(string text) =>
        text.Length > 0 && text.All(c => char.IsAsciiLetterOrDigit(c) || c is '-' or '.' or '/' or '_' or ':' or '+') ? $"`{text}`" : UserText.Literal(text);
}
