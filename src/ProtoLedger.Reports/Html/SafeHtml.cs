using Ganss.Xss;
using Markdig;

namespace ProtoLedger.Reports.Html;

/// <summary>Markdown to HTML of a short list of elements. Raw HTML is shown as text; links, styles and scripts do not survive.</summary>
internal static class SafeHtml
{
    private static readonly MarkdownPipeline Pipeline = new MarkdownPipelineBuilder().UsePipeTables().DisableHtml().Build();

    /// <summary>Converts, then sanitises: the converter's own option leaves script links alive.</summary>
    public static string From(string markdown)
    {
        var sanitizer = new HtmlSanitizer(new HtmlSanitizerOptions
        {
            AllowedTags = new HashSet<string>(StringComparer.OrdinalIgnoreCase)
            {
                "h1", "h2", "h3", "p", "ul", "ol", "li", "strong", "em", "code", "table", "thead", "tbody", "tr", "th", "td", "img", "br",
            },
            AllowedAttributes = new HashSet<string>(StringComparer.OrdinalIgnoreCase) { "src", "alt", "style" },
            AllowedCssProperties = new HashSet<string>(StringComparer.OrdinalIgnoreCase) { "text-align" },
            AllowedSchemes = new HashSet<string>(StringComparer.OrdinalIgnoreCase),
            UriAttributes = new HashSet<string>(StringComparer.OrdinalIgnoreCase) { "src" },
        });
        return sanitizer.Sanitize(Markdig.Markdown.ToHtml(markdown, Pipeline));
    }
}
