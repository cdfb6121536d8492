using System.Text;
using ProtoLedger.Reports.Html;
using ProtoLedger.Reports.Markdown;
using ProtoLedger.Reports.Model.Binders;
using ProtoLedger.Reports.Plots;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports;

/// <summary>A page of a binder.</summary>
/// <param name="Name">File name; <c>index.html</c> stands at the top of a bundle, the others below <c>pages/</c>.</param>
/// <param name="Content">UTF-8.</param>
public sealed record BinderPage(string Name, byte[] Content);

/// <summary>Turns a binder into its pages. The same model gives the same bytes.</summary>
public static class BinderRenderer
{
    private const string TimelineName = "timeline";

    /// <summary>The pages in reading order, <c>index.html</c> first, and <c>binder.json</c> with the whole model last.</summary>
    /// <exception cref="ArgumentException">The period is empty, or a file name could lead elsewhere.</exception>
    public static IReadOnlyList<BinderPage> Render(Binder binder)
    {
        ArgumentNullException.ThrowIfNull(binder);
        if (binder.Identity.Until <= binder.Identity.From)
            throw new ArgumentException("The period of a binder ends after it begins.", nameof(binder));
        var rows = BinderTimeline.Rows(binder);
        var timeline = rows.Count == 0 ? null : TimelineChart.Draw(TimelineName, rows, binder.Identity.From, binder.Identity.Until);
        (string Name, string Title, string Words)[] pages =
        [
            ("index.html", "Binder", BinderMarkdown.Index(binder, BinderGaps.Of(binder))),
            ("effective.html", "What was effective", BinderMarkdown.Effective(binder, timeline)),
            ("changes.html", "Change log", BinderMarkdown.Log(binder)),
            ("signatures.html", "Signatures and facts", BinderMarkdown.Signatures(binder)),
        ];
        return
        [
            .. pages.Select(page => new BinderPage(page.Name, Html(binder, page.Title, page.Words, Links(pages, page.Name, binder), timeline))),
            new BinderPage("binder.json", ReportJson.Write("binder", binder)),
        ];
    }

    private static byte[] Html(Binder binder, string title, string words, string links, Figure? timeline)
    {
        var id = binder.Identity;
        var (opening, sections) = PageParts.Split(PageParts.Dress(SafeHtml.From(words)));
        var body = $"<div class=\"opening\">{opening.TrimEnd()}</div>\n{links}\n{string.Concat(sections.Select(s => s.Html))}";
        var header = new PageHeader(
            title, id.Protocol ?? "all protocols", $"{Numbers.Date(id.From)} to {Numbers.Date(id.Until)}",
            id.LedgerRoot.Length >= 12 ? id.LedgerRoot[..12] : id.LedgerRoot, Numbers.Date(id.MadeAt), "ledger");
        return Encoding.UTF8.GetBytes(Page.Write($"{title}: {id.Site}", header, PageParts.Place(body, timeline is null ? [] : [timeline], [])));
    }

    /// <summary>Links to the binder's pages and, on the first page, to the reports.</summary>
    private static string Links((string Name, string Title, string Words)[] pages, string here, Binder binder)
    {
        var links = pages.Select(p => p.Name == here
            ? $"<a href=\"{p.Name}\" aria-current=\"page\">{p.Title}</a>"
            : $"<a href=\"{Path(here, p.Name)}\">{p.Title}</a>");
        if (here == pages[0].Name)
            links = links.Concat(binder.Files.Where(f => f.Name.EndsWith(".html", StringComparison.Ordinal)).Select(f => $"<a href=\"{Inside(f.Name)}\">{PageParts.Attribute(f.What)}</a>"));
        return $"<nav class=\"contents\" aria-label=\"Pages\">{string.Concat(links)}</nav>";
    }

    /// <summary>The first page stands at the top of a bundle, the others below <c>pages/</c>.</summary>
    private static string Path(string here, string there) =>
        here == "index.html" ? "pages/" + there : there == "index.html" ? "../index.html" : there;

    private static string Inside(string name) =>
        name.Length > 0 && name[0] != '/' && !name.Contains("..", StringComparison.Ordinal) && name.All(c => char.IsAsciiLetterLower(c) || char.IsAsciiDigit(c) || c is '.' or '_' or '-' or '/')
            ? name
            : throw new ArgumentException($"\"{name}\" is no file name inside a bundle.", nameof(name));
}
