using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Markdown;

/// <summary>The words of a change report.</summary>
internal static class ChangeReportMarkdown
{
    public static string Write(ChangeReport report) =>
        $"# Change report: {UserText.Literal(report.Identity.DocumentTitle)}\n\n{UserText.Literal(report.Identity.Reason)}\n";
}
