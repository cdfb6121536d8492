using Ganss.Xss;
using ProtoLedger.Reports.Model;

namespace ProtoLedger.Reports.Html;

/// <summary>The page made from a change report's Markdown.</summary>
internal static class ChangeReportHtml
{
    public static string Write(ChangeReport report, string markdown) =>
        $"<!doctype html>\n<html lang=\"en\"><head><title>{System.Net.WebUtility.HtmlEncode(report.Identity.DocumentId)}</title></head><body>"
        + new HtmlSanitizer().Sanitize(Markdig.Markdown.ToHtml(markdown)) + "</body></html>\n";
}
