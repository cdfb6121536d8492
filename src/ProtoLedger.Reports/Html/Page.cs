using System.Security.Cryptography;
using System.Text;

namespace ProtoLedger.Reports.Html;

/// <summary>What stands in the running header and footer of every page.</summary>
/// <param name="Kind">Change report, binder.</param>
/// <param name="Document">Identifier of the document.</param>
/// <param name="Version">In words, such as "version 8, proposed".</param>
/// <param name="Hash">Short form of the content hash, or empty.</param>
/// <param name="Date">Date of making.</param>
/// <param name="HashOf">What the hash is of: content or ledger.</param>
internal sealed record PageHeader(string Kind, string Document, string Version, string Hash, string Date, string HashOf = "content");

/// <summary>A self-contained page: own style, no script, nothing from outside, and a policy that says so.</summary>
internal static class Page
{
    private static readonly string Style = Load();

    public static string Write(string title, PageHeader header, string body)
    {
        var style = Style + Running(header);
        var hash = Convert.ToBase64String(SHA256.HashData(Encoding.UTF8.GetBytes(style)));
        return $"""
            <!doctype html>
            <html lang="en">
            <head>
            <meta charset="utf-8">
            <meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'sha256-{hash}'; img-src data:; base-uri 'none'; form-action 'none'">
            <meta name="viewport" content="width=device-width, initial-scale=1">
            <title>{PageParts.Attribute(title)}</title>
            <style>{style}</style>
            </head>
            <body>
            <header class="strip"><b>{PageParts.Attribute(header.Kind)}</b> <span>{PageParts.Attribute(header.Document)}</span> <span>{PageParts.Attribute(header.Version)}</span>{Short(header)} <span>made {header.Date}</span> <span>uncontrolled when printed</span></header>
            <main>
            {body}</main>
            </body>
            </html>

            """;
    }

    private static string Short(PageHeader header) =>
        header.Hash.Length > 0 ? $" <span>{header.HashOf} <code>{PageParts.Attribute(header.Hash)}</code></span>" : "";

    /// <summary>Margin boxes of printed pages. Identifiers are escaped so that no text can leave its string.</summary>
    private static string Running(PageHeader header)
    {
        var left = $"{header.Document}, {header.Version}";
        var right = header.Hash.Length > 0 ? $"{header.HashOf} {header.Hash}" : header.Kind;
        return $$"""
            @page { margin: 2cm 1.6cm; font: 8pt sans-serif;
              @top-left { content: {{CssString(left)}}; } @top-right { content: {{CssString(right)}}; }
              @bottom-left { content: {{CssString($"Uncontrolled when printed; made {header.Date}")}}; } @bottom-right { content: "Page " counter(page) " of " counter(pages); } }

            """;
    }

    private static string CssString(string text)
    {
        var css = new StringBuilder("\"");
        foreach (var rune in text.EnumerateRunes())
        {
            if (Rune.IsLetterOrDigit(rune) || rune.Value is ' ' or '-' or ',' or ';' or '.')
                css.Append(rune.ToString());
            else
                css.Append(System.Globalization.CultureInfo.InvariantCulture, $"\\{rune.Value:x} ");
        }

        return css.Append('"').ToString();
    }

    private static string Load()
    {
        using var stream = typeof(Page).Assembly.GetManifestResourceStream("ProtoLedger.Reports.report.css")!;
        using var reader = new StreamReader(stream, Encoding.UTF8);
        return "\n" + reader.ReadToEnd().ReplaceLineEndings("\n");
    }
}
