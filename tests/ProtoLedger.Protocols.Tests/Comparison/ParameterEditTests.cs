using System.Text;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Tests.Comparison;

public sealed class ParameterEditTests
{
    private static readonly byte[] Old = Samples.Read(Samples.Protocol).CanonicalBytes;

    [Fact]
    public void Apply_TwoNumbers_GivesTheDocumentWithBoth()
    {
        var edited = Assert.IsType<ParseResult.Parsed>(ParameterEdit.Apply(
            Old,
            new ParameterSetting("/series/0/readout/RepetitionTime", 8600),
            new ParameterSetting("/series/0/preparations/0/InversionTime", 2350.5)));
        var expected = Samples.Protocol.With("RepetitionTime: 9000", "RepetitionTime: 8600").With("InversionTime: 2400", "InversionTime: 2350.5");
        Assert.Equal(Encoding.UTF8.GetString(Samples.Read(expected).CanonicalBytes), Encoding.UTF8.GetString(edited.CanonicalBytes));
    }

    [Fact]
    public void Apply_ValueThatCannotBePlayed_SaysWhere()
    {
        var refused = Assert.IsType<ParseResult.Refused>(ParameterEdit.Apply(Old, new ParameterSetting("/series/0/readout/EchoTime", 125)));
        Assert.Equal("/series/0/readout/EchoTime", Assert.Single(refused.Errors).Pointer);
    }

    [Fact]
    public void Apply_RemovalAndAddition_ChangeLists()
    {
        var edited = Assert.IsType<ParseResult.Parsed>(ParameterEdit.Apply(
            Old, new ParameterSetting("/series/1", null), new ParameterSetting("/scanners/-", "birch-15t"), new ParameterSetting("/sheet/indication", null)));
        var protocol = Assert.IsType<ProtocolDocument>(edited.Document);
        Assert.Equal(["fluid-nulled", "opposed"], protocol.Series.Select(series => series.Id));
        Assert.Equal(["linden-3t", "birch-15t"], protocol.Scanners);
        Assert.Null(protocol.Sheet.Indication);
    }

    [Theory]
    [InlineData("/series/9/readout/EchoTime")]
    [InlineData("/series/00")]
    [InlineData("")]
    public void Apply_PlaceThatIsNotThere_IsRefused(string pointer)
    {
        var refused = Assert.IsType<ParseResult.Refused>(ParameterEdit.Apply(Old, new ParameterSetting(pointer, JsonValue.Create(1))));
        Assert.Equal(pointer, Assert.Single(refused.Errors).Pointer);
    }
}
