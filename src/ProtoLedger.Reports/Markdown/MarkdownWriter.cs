using System.Text;

namespace ProtoLedger.Reports.Markdown;

/// <summary>Writes headings, paragraphs, lists and tables. Whoever calls it has made user text literal.</summary>
internal sealed class MarkdownWriter
{
    private readonly StringBuilder text = new();

    /// <summary>A heading of a level from 1.</summary>
    public MarkdownWriter Heading(int level, string title) => Block(new string('#', level) + " " + title);

    /// <summary>A paragraph.</summary>
    public MarkdownWriter Paragraph(string words) => Block(words);

    /// <summary>A list; nothing where it has no items.</summary>
    public MarkdownWriter List(IEnumerable<string> items, bool numbered = false)
    {
        var lines = items.Select((item, i) => (numbered ? $"{i + 1}. " : "- ") + item).ToList();
        return lines.Count == 0 ? this : Block(string.Join('\n', lines));
    }

    /// <summary>A table; columns whose heading starts with a blank are set right.</summary>
    public MarkdownWriter Table(IReadOnlyList<string> headings, IEnumerable<IReadOnlyList<string>> rows)
    {
        var table = new StringBuilder().Append("| ").AppendJoin(" | ", headings.Select(h => h.Trim())).Append(" |\n|");
        foreach (var heading in headings)
            table.Append(heading.StartsWith(' ') ? " ---: |" : " --- |");
        foreach (var row in rows)
            table.Append("\n| ").AppendJoin(" | ", row.Select(cell => cell.Length == 0 ? "\u00A0" : cell)).Append(" |");
        return Block(table.ToString());
    }

    /// <summary>Everything written so far.</summary>
    public override string ToString() => text.ToString();

    private MarkdownWriter Block(string block)
    {
        if (text.Length > 0)
            text.Append('\n');
        text.Append(block).Append('\n');
        return this;
    }
}
