using System.Collections;
using System.Collections.Concurrent;
using System.Text;
using AngleSharp.Dom;
using AngleSharp.Html.Parser;
using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Tests.Html;

/// <summary>Hostile text in every text field at once: it is shown, and the page keeps its structure.</summary>
public sealed class InjectionTests
{
    private static readonly HashSet<string> Allowed = new(StringComparer.OrdinalIgnoreCase)
    {
        "html", "head", "meta", "title", "style", "body", "header", "main", "nav", "a", "div", "section", "h1", "h2", "h3", "p", "ul", "li",
        "table", "thead", "tbody", "tr", "th", "td", "strong", "code", "span", "b", "figure", "figcaption", "img",
        "svg", "desc", "defs", "pattern", "line", "polyline", "rect", "path", "text",
    };

    private static readonly ConcurrentDictionary<string, AngleSharp.Html.Dom.IHtmlDocument> Pages = new();

    private static readonly IReadOnlyList<string> Plain = Elements(Page("word"));

    /// <summary>The families of the table of injections: SQL, HTML, Markdown, SVG, YAML, CSV formula, log lines, paths, headers, direction overrides, NUL.</summary>
    public static TheoryData<string> Payloads { get; } = new(
        "'; DROP TABLE document; --",
        "\" OR 1=1 --",
        "<script>alert(1)</script>",
        "<img src=x onerror=alert(1)>",
        "<svg onload=alert(1)>",
        "<svg><script>alert(1)</script></svg>",
        "</style><script>alert(1)</script>",
        "</title><script>alert(1)</script>",
        "</desc></svg><script>alert(1)</script>",
        "\"><script>alert(1)</script>",
        "' onmouseover='alert(1)",
        "<a href=\"javascript:alert(1)\">x</a>",
        "<iframe srcdoc='<script>alert(1)</script>'></iframe>",
        "<math><mtext></mtext><mglyph><style><!--</style><img title=\"--&gt;&lt;img src=1 onerror=alert(1)&gt;\">",
        "<!-- comment --> <![CDATA[ x ]]>",
        "&lt;script&gt;alert(1)&lt;/script&gt; &#x3C;b&#x3E;",
        "[link](javascript:alert(1))",
        "[link](data:text/html;base64,PHNjcmlwdD5hbGVydCgxKTwvc2NyaXB0Pg==)",
        "![picture](http://attacker.example/x.png)",
        "![figure](figures/recovery-1)",
        "<javascript:alert(1)>",
        "<http://attacker.example/>",
        "[ref]: http://attacker.example/ \"t\"",
        "# heading",
        "## What this edit does",
        "---",
        "***",
        "> quote",
        "- item",
        "1. item",
        "a | b | c",
        "|---|---|",
        "`code` ``` fence",
        "~~~ fence",
        "**✕ newly fails** _em_ ~~gone~~",
        "\\*\\_\\[",
        "ends with a backslash\\",
        "=cmd|' /C calc'!A0",
        "+SUM(1)",
        "@import url(http://attacker.example/x.css)",
        "line one\r\nSet-Cookie: a=b\r\n\r\nbody",
        "!!python/object/apply:os.system [ls] &anchor *alias",
        "../../etc/passwd",
        "abc\u202Egnp.exe",
        "\u2066isolate\u2069 \u200Bzero\uFEFF",
        "nul\0byte \u001B[31m",
        "${7*7} {{7*7}} <%= 7 %>",
        "\"; content: url(http://attacker.example/)");

    [Theory]
    [MemberData(nameof(Payloads))]
    public void Page_WithHostileTextInEveryField_ShowsItAndKeepsItsStructure(string payload)
    {
        var document = Page(payload);
        Assert.Equal(Plain, Elements(document));
        Assert.Contains(UserText.Visible(payload), document.QuerySelector("h1")!.TextContent.Replace('\u00A0', ' '), StringComparison.Ordinal);
        foreach (var element in document.All)
        {
            Assert.Contains(element.LocalName, Allowed);
            foreach (var attribute in element.Attributes)
            {
                Assert.False(attribute.Name.StartsWith("on", StringComparison.OrdinalIgnoreCase), attribute.Name);
                Assert.NotEqual("style", attribute.Name);
                if (attribute.Name is "href" or "src")
                    Assert.Matches("^(#[a-z0-9-]+|data:image/png;base64,[A-Za-z0-9+/=]+)$", attribute.Value);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Payloads))]
    public void Style_WithHostileIdentifiers_KeepsItsRules(string payload)
    {
        var style = Page(payload).QuerySelector("style")!.TextContent;
        var running = style[style.IndexOf("@page", StringComparison.Ordinal)..];
        Assert.Equal(4, running.Split("content: \"").Length - 1);
        Assert.Equal(5, running.Count(c => c == '{'));
        Assert.DoesNotContain("url(", running, StringComparison.OrdinalIgnoreCase);
    }

    [Fact]
    public void Pictures_WithHostileText_ShowIt()
    {
        const string Payload = "\"><script>alert(1)</script> **x** `";
        var report = SampleReport.Empty with { Appearances = Fill(SampleReport.Cut, Payload).Appearances };
        var document = new HtmlParser().ParseDocument(Encoding.UTF8.GetString(ReportRenderer.Render(report).Html));
        Assert.Empty(document.QuerySelectorAll("script"));
        Assert.Contains(Payload, document.QuerySelector("#predicted-appearance h3")!.TextContent, StringComparison.Ordinal);
        Assert.Contains(Payload, document.QuerySelector(".pictures")!.GetAttribute("aria-label")!, StringComparison.Ordinal);
    }

    [Fact]
    public void Render_HalfASurrogatePair_IsRefused()
    {
        var report = SampleReport.Cut with { Identity = SampleReport.Cut.Identity with { Reason = "half \uD800 pair" } };
        Assert.Throws<ArgumentException>(() => ReportRenderer.Render(report));
    }

    [Fact]
    public void Render_MegabyteOfMarkup_IsShownAsText()
    {
        var reason = string.Concat(Enumerable.Repeat("<b>[x](javascript:y)</b>", 40_000));
        var rendered = ReportRenderer.Render(SampleReport.Empty with { Identity = SampleReport.Cut.Identity with { Reason = reason } });
        var document = new HtmlParser().ParseDocument(Encoding.UTF8.GetString(rendered.Html));
        Assert.Contains(reason, document.QuerySelector(".opening")!.TextContent, StringComparison.Ordinal);
    }

    private static AngleSharp.Html.Dom.IHtmlDocument Page(string payload) => Pages.GetOrAdd(payload, Render);

    private static AngleSharp.Html.Dom.IHtmlDocument Render(string payload) =>
        new HtmlParser().ParseDocument(Encoding.UTF8.GetString(ReportRenderer.Render(Fill(SampleReport.Cut with { Appearances = [] }, payload)).Html));

    /// <summary>Names of the elements in order, without the code spans that only well-formed identifiers get.</summary>
    private static List<string> Elements(IDocument document) => [.. document.All.Select(e => e.LocalName).Where(n => n != "code")];

    /// <summary>A copy of a record in which every text is the payload.</summary>
    private static T Fill<T>(T model, string payload) => (T)Fill(typeof(T), model, payload)!;

    private static object? Fill(Type type, object? value, string payload)
    {
        if (type == typeof(string))
            return payload;
        if (value is null || type.IsEnum || type.IsPrimitive || Nullable.GetUnderlyingType(type) is not null || type == typeof(DateTimeOffset) || type == typeof(CurvePoint))
            return value;
        if (value is IEnumerable items)
        {
            var item = type.GenericTypeArguments[0];
            var filled = items.Cast<object?>().Select(i => Fill(item, i, payload)).ToList();
            var array = Array.CreateInstance(item, filled.Count);
            for (var i = 0; i < filled.Count; i++)
                array.SetValue(filled[i], i);
            return array;
        }

        var constructor = type.GetConstructors().MaxBy(c => c.GetParameters().Length)!;
        return constructor.Invoke([.. constructor.GetParameters().Select(p => Fill(p.ParameterType, type.GetProperty(p.Name!)!.GetValue(value), payload))]);
    }
}
