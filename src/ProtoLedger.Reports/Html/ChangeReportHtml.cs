using ProtoLedger.Reports.Markdown;
using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Plots;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Html;

/// <summary>The page made from a change report's Markdown.</summary>
internal static class ChangeReportHtml
{
    private const int ShortHash = 12;

    public static string Write(ChangeReport report, string markdown, ReportFigures figures)
    {
        var identity = report.Identity;
        var header = new PageHeader(
            "Change report",
            identity.DocumentId,
            $"version {Numbers.Whole(identity.ProposedVersion)}, proposed",
            identity.Hashes.FirstOrDefault(h => h.Name == "proposed document") is { } hash ? hash.Sha256[..Math.Min(ShortHash, hash.Sha256.Length)] : "",
            Numbers.Date(identity.ComputedAt));
        return Page.Write($"{identity.DocumentTitle}: change report", header, Body(markdown, figures));
    }

    /// <summary>The report without the frame of a page: opening, first screen, contents, details.</summary>
    public static string Body(string markdown, ReportFigures figures)
    {
        var (opening, sections) = PageParts.Split(PageParts.Dress(SafeHtml.From(markdown)));
        var first = FirstScreen.Headings.Count;
        var html = $"<div class=\"opening\">{opening.TrimEnd()}</div>\n"
            + $"<div class=\"first\">\n{string.Concat(sections.Take(first).Select(s => s.Html))}</div>\n"
            + $"<nav class=\"contents\" aria-label=\"Details\">{string.Concat(sections.Skip(first).Select(s => $"<a href=\"#{s.Id}\">{s.Title}</a>"))}</nav>\n"
            + string.Concat(sections.Skip(first).Select(s => s.Html));
        return PageParts.Place(html, figures.Plots, figures.Pictures);
    }
}
