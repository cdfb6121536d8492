using System.Globalization;
using System.Text;

namespace ProtoLedger.Reports.Wording;

/// <summary>Makes text that people typed safe to stand in a report: it is shown, and does nothing.</summary>
internal static class UserText
{
    /// <summary>Characters that Markdown reads as markup anywhere in a line.</summary>
    private const string Markup = "\\`*_[]<>&|~!^${}@";

    /// <summary>The text on one line, with direction overrides, zero-width and control characters shown by their code point.</summary>
    /// <exception cref="ArgumentException">The text holds half of a surrogate pair.</exception>
    public static string Visible(string text)
    {
        if (HoldsHalfAPair(text))
            throw new ArgumentException("A text holds half of a surrogate pair, which no UTF-8 file can carry.", nameof(text));
        var shown = new StringBuilder(text.Length);
        var space = false;
        foreach (var rune in text.EnumerateRunes())
        {
            if (Rune.IsWhiteSpace(rune) || rune.Value is '\r' or '\n' or '\t')
            {
                space = shown.Length > 0;
                continue;
            }

            if (space)
                shown.Append(' ');
            space = false;
            if (IsHidden(rune))
                shown.Append(CultureInfo.InvariantCulture, $"\u27E8U+{rune.Value:X4}\u27E9");
            else
                shown.Append(rune.ToString());
        }

        return shown.ToString();
    }

    /// <summary>The text as literal Markdown, fit for a paragraph, a list item or a table cell.</summary>
    public static string Literal(string text)
    {
        var visible = Visible(text);
        var literal = new StringBuilder(visible.Length + 8);
        foreach (var character in visible)
        {
            if (Markup.Contains(character, StringComparison.Ordinal))
                literal.Append('\\');
            literal.Append(character);
        }

        return EscapeBlockStart(literal.ToString());
    }

    /// <summary>A list marker, heading or rule means something only where a block begins, and only before a blank or its like.</summary>
    private static string EscapeBlockStart(string text)
    {
        var sign = text.TakeWhile(char.IsAsciiDigit).Count();
        if (sign == text.Length)
            return text;
        var marker = sign == 0 ? text[0] is '#' or '+' or '-' or '=' : text[sign] is '.' or ')';
        var marks = marker && (sign + 1 == text.Length || text[sign + 1] == ' ' || text[sign + 1] == text[sign]);
        return marks ? text.Insert(sign, "\\") : text;
    }

    private static bool HoldsHalfAPair(string text)
    {
        for (var i = 0; i < text.Length; i++)
        {
            if (!char.IsSurrogate(text[i]))
                continue;
            if (i + 1 == text.Length || !char.IsSurrogatePair(text[i], text[i + 1]))
                return true;
            i++;
        }

        return false;
    }

    private static bool IsHidden(Rune rune) =>
        Rune.GetUnicodeCategory(rune) is UnicodeCategory.Control or UnicodeCategory.Format
            or UnicodeCategory.PrivateUse or UnicodeCategory.OtherNotAssigned;
}
