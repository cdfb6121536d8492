using System.Text.Json;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;

namespace ProtoLedger.Protocols.Tests.Formats;

public sealed class SeriesReaderTests
{
    private const string Train = """ "kind":"echoTrain","RepetitionTime":9000,"EchoTime":120,"ExcitationFlipAngle":90,"echoSpacing":10,"EchoTrainLength":24,"RefocusingFlipAngles":[150] """;

    [Fact]
    public void Read_ReadoutAlone_TakesTheModelsDefaults()
    {
        var series = Read("""{"readout":{0}}""").Require();
        Assert.Empty(series.Preparations);
        Assert.Equal((new SeriesTiming(), new SeriesGeometry()), (series.Timing, series.Geometry));
        Assert.Equal(24, Assert.IsType<EchoTrain>(series.Readout).EchoTrainLength);
    }

    [Fact]
    public void Read_InlinePulse_IsThatPulse()
    {
        var series = Read("""{"preparations":[{"kind":"inversion","InversionTime":2400,"pulse":{"kind":"efficiency","efficiency":0.9,"efficiencySd":0.05}}],"readout":{0}}""").Require();
        Assert.Equal(new EfficiencyInversion("inline", 0.9, 0.05), Assert.IsType<Inversion>(series.Preparations[0]).Pulse);
    }

    [Theory]
    [InlineData("""{"kind":"spinEcho","RepetitionTime":500,"EchoTime":15,"ExcitationFlipAngle":90,"RefocusingFlipAngles":[170]}""", typeof(SpinEcho))]
    [InlineData("""{"kind":"spoiledGradientEcho","RepetitionTime":150,"EchoTime":2.3,"ExcitationFlipAngle":70,"spoilingIncrement":50}""", typeof(SpoiledGradientEcho))]
    [InlineData("""{"kind":"balancedGradientEcho","RepetitionTime":4,"EchoTime":2,"ExcitationFlipAngle":50}""", typeof(BalancedGradientEcho))]
    [InlineData("""{"kind":"spoiledGradientEchoTrain","RepetitionTime":2300,"EchoTime":3,"ExcitationFlipAngle":9,"readoutSpacing":7,"readoutTrainLength":176,"encodingOrder":"centric"}""", typeof(SpoiledGradientEchoTrain))]
    [InlineData("""{"kind":"diffusionSpinEcho","RepetitionTime":5000,"EchoTime":70,"ExcitationFlipAngle":90,"RefocusingFlipAngles":[180],"DiffusionBValue":1000}""", typeof(DiffusionSpinEcho))]
    public void Read_EveryReadout_IsItsRecord(string readout, Type type) =>
        Assert.IsType(type, Read("{\"readout\":" + readout + "}").Require().Readout);

    [Theory]
    [InlineData("""{"preparations":[{"kind":"inversion","InversionTime":2400,"pulse":"secret"}],"readout":{0}}""", "/series/preparations/0/pulse", "no pulse \"secret\" among the built-in pulses")]
    [InlineData("""{"readout":{0},"tissue":"csf"}""", "/series/tissue", "unknown in series")]
    [InlineData("""{"preparations":[{"kind":"inversion","InversionTime":8990}],"readout":{0}}""", "/series/readout/RepetitionTime", "do not fit")]
    [InlineData("""{"readout":{0},"readout":{0}}""", "/series/readout", "twice")]
    [InlineData("{}", "/series/readout", "missing")]
    [InlineData("7", "/series", "mapping is needed")]
    public void Read_WhatCannotBe_IsRefusedAtItsPlace(string json, string pointer, string text)
    {
        var refused = Assert.IsType<MappingResult<Series>.Refused>(Read(json));
        Assert.Contains(refused.Errors, error => error.Pointer == pointer && error.Detail.Contains(text, StringComparison.Ordinal));
    }

    private static MappingResult<Series> Read(string json)
    {
        using var document = JsonDocument.Parse(json.Replace("{0}", "{" + Train + "}", StringComparison.Ordinal));
        return SeriesReader.Read(document.RootElement, null, "/series");
    }
}
