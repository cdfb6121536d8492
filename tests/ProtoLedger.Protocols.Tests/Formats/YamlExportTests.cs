using System.Text;
using CsCheck;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;

namespace ProtoLedger.Protocols.Tests.Formats;

public sealed class YamlExportTests
{
    [Theory]
    [InlineData(DocumentKind.Protocol)]
    [InlineData(DocumentKind.Scanner)]
    [InlineData(DocumentKind.Conditions)]
    [InlineData(DocumentKind.Catalogue)]
    [InlineData(DocumentKind.Expectations)]
    public void Write_OfACanonicalText_IsThatText(DocumentKind kind) =>
        Assert.Equal(Samples.Of(kind), YamlExport.Write(Samples.Read(Samples.Of(kind)).CanonicalBytes));

    [Theory]
    [InlineData("NO")]
    [InlineData("yes")]
    [InlineData("null")]
    [InlineData("~")]
    [InlineData("1e3")]
    [InlineData("- dash")]
    [InlineData("a: b")]
    [InlineData("a #b")]
    [InlineData("ends with colon:")]
    [InlineData("\"quoted\" and \\ and 'single'")]
    [InlineData("two\nlines\n")]
    [InlineData("tab\tinside")]
    [InlineData(" leading")]
    [InlineData("trailing ")]
    [InlineData("µ ≥ — “ ” 🙂")]
    [InlineData("<script>alert(1)</script>")]
    [InlineData("%percent")]
    [InlineData("@at `back`")]
    [InlineData("\u2028separator\u00A0no-break\uFEFF")]
    public void Write_AnyText_IsReadBackAsWritten(string text) => AssertReadBack(text);

    [Fact]
    public void Write_RandomTexts_AreReadBackAsWritten() =>
        Gen.Char[" -~äöü€\n\t"].Array[1, 40].Select(characters => new string(characters)).Sample(AssertReadBack, iter: 2000, seed: "0N0XIzNsQ0O2");

    private static void AssertReadBack(string text)
    {
        var tree = System.Text.Json.Nodes.JsonNode.Parse(Samples.Read(Samples.Protocol).CanonicalBytes)!;
        tree["title"] = text;
        tree["sheet"]!["contrastAgent"]!["agent"] = text;
        var parsed = Assert.IsType<ParseResult.Parsed>(DocumentReader.ReadTree(tree));
        var again = Samples.Read(YamlExport.Write(parsed.CanonicalBytes));
        Assert.Equal(text, again.Document.Title);
        Assert.Equal(Encoding.UTF8.GetString(parsed.CanonicalBytes), Encoding.UTF8.GetString(again.CanonicalBytes));
    }
}
