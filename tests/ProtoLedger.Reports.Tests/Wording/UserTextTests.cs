using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Tests.Wording;

public sealed class UserTextTests
{
    [Theory]
    [InlineData("abc\u202Etxt", "abc⟨U+202E⟩txt")]
    [InlineData("a\r\n\tb\0", "a b⟨U+0000⟩")]
    [InlineData("  zero\u200Bwidth\uFEFF ", "zero⟨U+200B⟩width⟨U+FEFF⟩")]
    public void Visible_HiddenCharacters_AreShownByCodePoint(string typed, string shown) =>
        Assert.Equal(shown, UserText.Visible(typed));

    [Theory]
    [InlineData("# heading")]
    [InlineData("1. item")]
    [InlineData("- item")]
    [InlineData("*strong* _em_ `code` ~~gone~~")]
    [InlineData("[link](javascript:alert(1))")]
    [InlineData("![x](http://example.org/x.png)")]
    [InlineData("<img src=x onerror=alert(1)>")]
    [InlineData("<javascript:alert(1)>")]
    [InlineData("a | b | c")]
    [InlineData("&lt;script&gt; &#106;")]
    [InlineData("back\\slash \\* end\\")]
    public void Literal_AfterMarkdown_IsTheTypedText(string typed)
    {
        var html = Markdig.Markdown.ToHtml(UserText.Literal(typed));
        Assert.Equal($"<p>{System.Net.WebUtility.HtmlEncode(typed).Replace("&#39;", "'", StringComparison.Ordinal)}</p>\n", html);
    }
}
