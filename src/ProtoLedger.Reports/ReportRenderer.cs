using System.Text;
using ProtoLedger.Reports.Html;
using ProtoLedger.Reports.Markdown;
using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Plots;

namespace ProtoLedger.Reports;

/// <summary>Turns a report model into its three forms. The same model gives the same bytes.</summary>
public static class ReportRenderer
{
    private static readonly UTF8Encoding Utf8 = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>Renders a change report.</summary>
    /// <param name="report">The model; every number finite.</param>
    /// <exception cref="ArgumentException">A number is not finite, or arrays of one plot differ in length.</exception>
    public static RenderedReport Render(ChangeReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        var figures = new ReportFigures(report);
        var markdown = ChangeReportMarkdown.Write(report, figures);
        return new RenderedReport(
            ReportJson.Write("changeReport", report),
            Utf8.GetBytes(markdown),
            Utf8.GetBytes(ChangeReportHtml.Write(report, markdown, figures)));
    }
}
