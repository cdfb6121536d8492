using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Tests.Catalogue;

public sealed class MappingTests
{
    private static readonly ProtocolDocument Protocol = (ProtocolDocument)Samples.Read(Samples.Protocol).Document;
    private static readonly CatalogueDocument Tissues = (CatalogueDocument)Samples.Read(Samples.Catalogue).Document;

    [Fact]
    public void Resolve_PulseOfTheScannersList_ComesBeforeTheBuiltInOne()
    {
        var own = (ScannerDocument)Samples.Read(Samples.Scanner.With("  sampled:", "  adiabatic: {kind: efficiency, efficiency: 0.9}\n  sampled:")).Document;
        var plain = (ScannerDocument)Samples.Read(Samples.Scanner).Document;
        Assert.Equal(new EfficiencyInversion("adiabatic", 0.9), Pulse(own));
        Assert.Equal(EfficiencyInversion.Default, Pulse(plain));
    }

    [Fact]
    public void Resolve_InversionWithoutAPulse_IsTheDefaultOne()
    {
        var series = SeriesMapping.Resolve(Protocol.Series[1].Acquisition, null).Require();
        Assert.All(series.Preparations, block => Assert.Equal(EfficiencyInversion.Default, Assert.IsType<Inversion>(block).Pulse));
    }

    [Fact]
    public void Map_TissueAtAFieldOfTheTable_CarriesMeanSpreadAndWeakestEvidence()
    {
        var mapped = CatalogueMapping.Map(Tissues, "white-matter", "adult", 2.96).Require();
        Assert.Equal(new Tissue("white-matter", 850, 72, 50, 0.69, 0.72), mapped.Mean);
        Assert.Equal((120, 9, 6, Evidence.Recalled), (mapped.T1Sd, mapped.T2Sd, mapped.T2StarSd!.Value, mapped.Weakest));
    }

    [Theory]
    [InlineData("bile", "adult", 3, false, "white-matter, csf")]
    [InlineData("csf", "infant", 3, false, "adult")]
    [InlineData("white-matter", "adult", 1.56, false, "1.5 T, 3 T")]
    [InlineData("white-matter", "adult", 1.5, true, "3 T")]
    public void Map_WhatTheCatalogueLacks_IsRefusedWithWhatItHolds(string tissue, string ageGroup, double field, bool needsT2Star, string present)
    {
        var refused = Assert.IsType<MappingResult<TissueDistribution>.Refused>(CatalogueMapping.Map(Tissues, tissue, ageGroup, field, needsT2Star, "/tissue"));
        var error = Assert.Single(refused.Errors);
        Assert.Equal(("/tissue", present), (error.Pointer, error.Limit));
    }

    // The off-resonance of tissue grows with B0; a range stated at 3 T is half as wide at 1.5 T.
    [Theory]
    [InlineData("    offResonanceField: 3\n", 30)]
    [InlineData("", 60)]
    public void OffResonance_AtHalfTheField_ScalesWhereTheFieldIsNamed(string fieldLine, double high)
    {
        var conditions = (ConditionsDocument)Samples.Read(Samples.Conditions.With("    offResonanceField: 3\n", fieldLine)).Document;
        Assert.Equal(new ValueRange(-high, high), ConditionMapping.OffResonance(conditions.Conditions[0], 1.5));
    }

    private static RfPulse Pulse(ScannerDocument scanner) =>
        ((Inversion)SeriesMapping.Resolve(Protocol.Series[0], scanner).Require().Preparations[0]).Pulse;
}
