using System.Net;
using System.Text;
using System.Text.RegularExpressions;
using ProtoLedger.Reports.Pictures;
using ProtoLedger.Reports.Plots;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Html;

/// <summary>Turns sanitised HTML into the parts of a page: sections under their headings, marks, tables that scroll, figures in place.</summary>
internal static partial class PageParts
{
    /// <summary>A section under a second-level heading.</summary>
    /// <param name="Id">Made from the heading.</param>
    /// <param name="Title">HTML of the heading.</param>
    /// <param name="Html">The complete element.</param>
    public sealed record Section(string Id, string Title, string Html);

    /// <summary>Splits at second-level headings.</summary>
    public static (string Opening, IReadOnlyList<Section> Sections) Split(string html)
    {
        var parts = html.Split("<h2>");
        var sections = new List<Section>();
        foreach (var part in parts.Skip(1))
        {
            var end = part.IndexOf("</h2>", StringComparison.Ordinal);
            var title = part[..end];
            var id = Slug(title, sections);
            sections.Add(new Section(id, title, $"<section aria-labelledby=\"{id}-h\" id=\"{id}\">\n<h2 id=\"{id}-h\">{title}</h2>\n<div class=\"entry\">{part[(end + 5)..].TrimEnd()}</div>\n</section>\n"));
        }

        return (parts[0], sections);
    }

    /// <summary>Marks, table heads, alignment, units that stay with their number.</summary>
    public static string Dress(string html)
    {
        var dressed = html
            .Replace(" style=\"text-align: right\"", " class=\"number\"", StringComparison.Ordinal)
            .Replace("<th", "<th scope=\"col\"", StringComparison.Ordinal)
            .Replace("<th scope=\"col\"ead>", "<thead>", StringComparison.Ordinal)
            .Replace("</table>", "</table></div>", StringComparison.Ordinal);
        var tables = 0;
        dressed = TableStart().Replace(dressed, _ => $"<div class=\"scroll\" tabindex=\"0\" role=\"group\" aria-label=\"Table {++tables}\"><table>");
        foreach (var mark in Mark.All)
        {
            var plain = $"<strong>{mark.Shape} {mark.Word}</strong>";
            var marked = $"<strong class=\"mark {mark.Tone}\"><span aria-hidden=\"true\">{mark.Shape}</span> {mark.Word}</strong>";
            dressed = dressed
                .Replace($"<ul>\n<li>{plain}", $"<ul class=\"findings\">\n<li class=\"finding {mark.Tone}\">{marked}", StringComparison.Ordinal)
                .Replace($"<li>{plain}", $"<li class=\"finding {mark.Tone}\">{marked}", StringComparison.Ordinal)
                .Replace(plain, marked, StringComparison.Ordinal);
        }

        return Date().Replace(Unit().Replace(dressed, "\u00A0$1"), "<span class=\"date\">$0</span>");
    }

    /// <summary>Puts plots and pictures where the Markdown refers to them.</summary>
    /// <exception cref="InvalidOperationException">The Markdown refers to a figure that was not drawn.</exception>
    public static string Place(string html, IEnumerable<Figure> plots, IEnumerable<PictureSet> pictures)
    {
        var figures = plots.ToDictionary(p => p.Name, Element, StringComparer.Ordinal);
        foreach (var set in pictures)
            figures.Add(set.Name, Element(set));
        return Reference().Replace(html, match =>
            figures.TryGetValue(match.Groups[1].Value, out var figure)
                ? figure
                : throw new InvalidOperationException($"No figure is named {match.Groups[1].Value}."));
    }

    private static string Element(Figure figure) =>
        $"<figure><div class=\"scroll\" tabindex=\"0\" role=\"group\" aria-label=\"{Attribute(figure.Title)}\">{figure.Svg}</div>"
        + $"<figcaption>{Attribute(figure.Text)}</figcaption></figure>";

    private static string Element(PictureSet set)
    {
        var html = new StringBuilder($"<div class=\"pictures\" role=\"group\" aria-label=\"{Attribute(set.Title)}\">");
        foreach (var (word, png) in ((string, byte[])[])[("Before", set.Before), ("After", set.After), ("Difference", set.Difference)])
            html.Append("<figure><img src=\"data:image/png;base64,").Append(Convert.ToBase64String(png))
                .Append($"\" width=\"{set.Size}\" height=\"{set.Size}\" alt=\"{word}, predicted. {(word == "Difference" ? "Grey is no change." : "The text below says what it shows.")}\"><figcaption>{word}</figcaption></figure>");
        return html.Append("</div>").ToString();
    }

    /// <summary>Text for an attribute or an element, hidden characters shown.</summary>
    public static string Attribute(string text) => WebUtility.HtmlEncode(UserText.Visible(text));

    private static string Slug(string title, List<Section> taken)
    {
        var slug = NotSlug().Replace(WebUtility.HtmlDecode(title).ToLowerInvariant(), "-").Trim('-');
        return taken.Any(s => s.Id == slug) || slug.Length == 0 ? $"{slug}-{taken.Count + 1}" : slug;
    }

    [GeneratedRegex("<p><img src=\"figures/([a-z0-9-]+)\" alt=\"[^\"]*\"></p>")]
    private static partial Regex Reference();

    [GeneratedRegex("<table>")]
    private static partial Regex TableStart();

    [GeneratedRegex("[^a-z0-9]+")]
    private static partial Regex NotSlug();

    /// <summary>A date in text, which must not break at its hyphens.</summary>
    [GeneratedRegex("(?<=>[^<]*)\\b[0-9]{4}-[0-9]{2}-[0-9]{2}\\b")]
    private static partial Regex Date();

    /// <summary>A blank between a number and its unit, in text.</summary>
    [GeneratedRegex("(?<=>[^<]*[0-9]) (ms|Hz|px|min|mm|T|%)(?=[^A-Za-z0-9])")]
    private static partial Regex Unit();
}
