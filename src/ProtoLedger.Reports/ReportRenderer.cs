using ProtoLedger.Reports.Html;
using ProtoLedger.Reports.Markdown;
using ProtoLedger.Reports.Model;

namespace ProtoLedger.Reports;

/// <summary>Turns a report model into its three forms. The same model gives the same bytes.</summary>
public static class ReportRenderer
{
    /// <summary>Renders a change report.</summary>
    /// <param name="report">The model; every number finite.</param>
    /// <exception cref="ArgumentException">A number is not finite, or arrays of one plot differ in length.</exception>
    public static RenderedReport Render(ChangeReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        var json = ReportJson.Write("changeReport", report);
        var markdown = ChangeReportMarkdown.Write(report);
        return new RenderedReport(json, Utf8.GetBytes(markdown), Utf8.GetBytes(ChangeReportHtml.Write(report, markdown)));
    }

    private static readonly System.Text.UTF8Encoding Utf8 = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);
}
