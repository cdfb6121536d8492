using System.Text;

namespace ProtoLedger.Reports;

/// <summary>Gives pages of the site what a stored report says, so that the page and the signed file never differ.</summary>
public static class ReportPage
{
    private const string Start = "<main>\n";
    private const string End = "</main>";

    /// <summary>What stands in the <c>main</c> element of a stored report: opening, first screen, details. It was sanitised when the report was made.</summary>
    /// <param name="html">Bytes of the HTML form of a report from <see cref="ReportRenderer"/>.</param>
    /// <exception cref="FormatException">The bytes are no such report.</exception>
    public static string Fragment(ReadOnlySpan<byte> html)
    {
        var page = Encoding.UTF8.GetString(html);
        var start = page.IndexOf(Start, StringComparison.Ordinal);
        var end = page.LastIndexOf(End, StringComparison.Ordinal);
        return start >= 0 && end > start
            ? page[(start + Start.Length)..end]
            : throw new FormatException("The bytes are no report of this program.");
    }
}
