using System.Text;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Protocols.Tests.Canonical;

public sealed class CanonicalJsonTests
{
    // RFC 8785, section 3.2.2: sample input and output of serialisation.
    [Fact]
    public void Canonicalize_SampleOfTheStandard_GivesItsText()
    {
        const string Input = """
            {
              "numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001],
              "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/",
              "literals": [null, true, false]
            }
            """;
        const string Expected = """{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\u000f\nA'B\"\\\\\"/"}""";
        Assert.Equal(Expected, Canonical(Input));
    }

    // RFC 8785, section 3.2.3: keys sort by UTF-16 code units.
    [Fact]
    public void Canonicalize_SortingSampleOfTheStandard_OrdersByCodeUnits()
    {
        const string Input = """
            {"\u20ac":"Euro Sign","\r":"Carriage Return","\ufb33":"Hebrew Letter Dalet With Dagesh","1":"One",
             "\ud83d\ude00":"Emoji: Grinning Face","\u0080":"Control","\u00f6":"Latin Small Letter O With Diaeresis"}
            """;
        var values = JsonNode.Parse(Canonical(Input))!.AsObject().Select(member => member.Value!.GetValue<string>());
        Assert.Equal(
            ["Carriage Return", "One", "Control", "Latin Small Letter O With Diaeresis", "Euro Sign", "Emoji: Grinning Face", "Hebrew Letter Dalet With Dagesh"],
            values);
    }

    [Theory]
    [InlineData("""{"a":{"b":1,"b":2}}""", "/a/b", "twice")]
    [InlineData("""{"a":[0,1e999]}""", "/a/1", "not finite")]
    [InlineData("""{"a":"x\u0000y"}""", "/a", "NUL")]
    [InlineData("""{"a":"\ud800"}""", "/a", "unpaired surrogate")]
    [InlineData("""{"a":"\udc00\ud800"}""", "/a", "unpaired surrogate")]
    [InlineData("""{"a":1}{"b":2}""", "", "Not JSON")]
    [InlineData("""{"a":1,}""", "", "Not JSON")]
    [InlineData("""{"a":NaN}""", "", "Not JSON")]
    [InlineData("", "", "Not JSON")]
    public void Canonicalize_WhatADocumentMayNotHold_IsRefused(string json, string pointer, string text)
    {
        var fault = Assert.Throws<CanonicalJsonException>(() => CanonicalJson.Canonicalize(Encoding.UTF8.GetBytes(json)));
        Assert.Equal(pointer, fault.Pointer);
        Assert.Contains(text, fault.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Serialize_TextWithUnpairedSurrogateInMemory_IsRefused()
    {
        var fault = Assert.Throws<CanonicalJsonException>(() => CanonicalJson.Serialize(new JsonObject { ["a"] = "x\ud800" }));
        Assert.Equal("/a", fault.Pointer);
    }

    [Fact]
    public void Serialize_NumberThatIsNotFinite_IsRefused()
    {
        var fault = Assert.Throws<CanonicalJsonException>(() => CanonicalJson.Serialize(new JsonArray(1, double.NaN)));
        Assert.Equal("/1", fault.Pointer);
    }

    [Theory]
    [InlineData(64, true)]
    [InlineData(65, false)]
    public void Canonicalize_NestedLists_AreAllowedUpTo64Levels(int depth, bool allowed)
    {
        var json = Encoding.UTF8.GetBytes(new string('[', depth) + new string(']', depth));
        if (allowed)
            Assert.Equal(json, CanonicalJson.Canonicalize(json));
        else
            Assert.Contains("64 levels", Assert.Throws<CanonicalJsonException>(() => CanonicalJson.Canonicalize(json)).Detail, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(64, true)]
    [InlineData(65, false)]
    public void Serialize_NestedLists_AreAllowedUpTo64Levels(int depth, bool allowed)
    {
        var tree = new JsonArray();
        for (var i = 1; i < depth; i++)
            tree = [tree];
        if (allowed)
            Assert.Equal(2 * depth, CanonicalJson.Serialize(tree).Length);
        else
            Assert.Throws<CanonicalJsonException>(() => CanonicalJson.Serialize(tree));
    }

    [Fact]
    public void Canonicalize_MoreThanOneMebibyte_IsRefused()
    {
        var json = Encoding.UTF8.GetBytes('"' + new string('x', CanonicalJson.MaximumBytes) + '"');
        Assert.Contains("1 MiB", Assert.Throws<CanonicalJsonException>(() => CanonicalJson.Canonicalize(json)).Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Serialize_NumbersMadeFromAnyType_AreWrittenAlike()
    {
        var tree = new JsonArray(JsonValue.Create(7), JsonValue.Create(7L), JsonValue.Create(7.0), JsonValue.Create(7m), JsonNode.Parse("7.0"));
        Assert.Equal("[7,7,7,7,7]", Encoding.UTF8.GetString(CanonicalJson.Serialize(tree)));
    }

    // FIPS 180-4 example: SHA-256 of "abc".
    [Fact]
    public void Sha256_OfTheStandardsExample_IsItsDigest() =>
        Assert.Equal("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad", CanonicalJson.Sha256("abc"u8));

    private static string Canonical(string json) => Encoding.UTF8.GetString(CanonicalJson.Canonicalize(Encoding.UTF8.GetBytes(json)));
}
