using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Plots;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Markdown;

/// <summary>The words of a change report, first screen first.</summary>
internal static class ChangeReportMarkdown
{
    public static string Write(ChangeReport report, ReportFigures figures)
    {
        var page = new MarkdownWriter();
        var words = new ReportWords(report);
        Opening(page, report.Identity);
        FirstScreen.Write(page, report, words);
        Details.Write(page, report, figures, words);
        return page.ToString();
    }

    private static void Opening(MarkdownWriter page, ReportIdentity identity)
    {
        var version = identity.BaseVersion is { } from
            ? $"version {Numbers.Whole(from)} to {Numbers.Whole(identity.ProposedVersion)}"
            : $"new, version {Numbers.Whole(identity.ProposedVersion)}";
        page.Heading(1, $"Change report: {UserText.Literal(identity.DocumentTitle)}")
            .Paragraph(
                $"{ReportWords.Capital(UserText.Literal(identity.DocumentKind))} {ReportWords.Code(identity.DocumentId)}, {version}. "
                + $"Proposed by {UserText.Literal(identity.AuthorName)} ({ReportWords.Code(identity.Author)}) on {Numbers.Time(identity.SubmittedAt)}.")
            .Paragraph($"Reason given: {(UserText.Visible(identity.Reason).Length == 0 ? "none" : $"\u201C{UserText.Literal(identity.Reason)}\u201D")}");
    }
}
