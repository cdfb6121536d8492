using System.Text;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Tests.Comparison;

public sealed class DocumentDifferenceTests
{
    private static readonly byte[] Old = Samples.Read(Samples.Protocol).CanonicalBytes;

    [Fact]
    public void Between_OneNumber_SaysPointerValuesUnitAndWords()
    {
        var change = Assert.Single(Compare(Samples.Protocol.With("RepetitionTime: 9000", "RepetitionTime: 8600")).Changes);
        Assert.Equal((ChangeKind.Set, "/series/0/readout/RepetitionTime", "RepetitionTime"), (change.Kind, change.Pointer, change.Keyword));
        Assert.Equal(("repetition time", "ms", "fluid-nulled"), (change.Label, change.Unit, change.SeriesId));
        Assert.Equal((9000, 8600), (change.Old!.GetValue<double>(), change.New!.GetValue<double>()));
    }

    [Fact]
    public void Between_SeriesMovedAndEdited_IsFollowedByItsIdentifier()
    {
        var parts = Samples.Protocol.Split("  - id: ");
        var moved = string.Concat(parts[0], "  - id: ", parts[2], "  - id: ", parts[1].With("RepetitionTime: 9000", "RepetitionTime: 8600"), "  - id: ", parts[3]);
        var changes = Compare(moved).Changes;
        Assert.Equal([ChangeKind.Reordered, ChangeKind.Set], changes.Select(change => change.Kind));
        Assert.Equal(("/series/0/readout/RepetitionTime", "/series/1/readout/RepetitionTime"), (changes[1].OldPointer, changes[1].Pointer));
    }

    [Fact]
    public void Between_PreparationAdded_IsOneChange()
    {
        var changed = Samples.Protocol.With(
            "preparations:\n      - {kind: inversion, InversionTime: 2400, pulse: adiabatic}",
            "preparations:\n      - {kind: t2Preparation, preparationTime: 40}\n      - {kind: inversion, InversionTime: 2400, pulse: adiabatic}");
        var change = Assert.Single(Compare(changed).Changes);
        Assert.Equal((ChangeKind.Added, "/series/0/preparations/0"), (change.Kind, change.Pointer));
        Assert.Equal(("T2 preparation", 40), (change.Label, change.New!["preparationTime"]!.GetValue<double>()));
    }

    [Theory]
    [InlineData("InversionTime: 2400", "InversionTime: 2300", "inversion time")]
    [InlineData("InversionTime: 500", "InversionTime: 480", "inversion time, second inversion")]
    [InlineData("low: 8500", "low: 8600", "lowest allowed value, /readout/RepetitionTime")]
    [InlineData("scanTimeSeconds: 216", "scanTimeSeconds: 200", "recorded scan time, linden-3t")]
    [InlineData("dose: 0.1", "dose: 0.2", "contrast dose")]
    public void Between_OneValue_IsNamedInTradeWords(string old, string replacement, string label) =>
        Assert.Equal(label, Assert.Single(Compare(Samples.Protocol.With(old, replacement)).Changes).Label);

    [Fact]
    public void Between_SecondInversionAdded_IsNamedByItsOrder()
    {
        var change = Assert.Single(Compare(Samples.Protocol.With(
            "{kind: inversion, InversionTime: 2400, pulse: adiabatic}", "{kind: inversion, InversionTime: 2400, pulse: adiabatic}\n      - {kind: inversion, InversionTime: 400}")).Changes);
        Assert.Equal((ChangeKind.Added, "second inversion"), (change.Kind, change.Label));
    }

    [Fact]
    public void Between_FirstOfTwoInversionsRemoved_IsTheSecondRemovedAndTheFirstChanged()
    {
        // Inversions are followed by their order, since they have no other identity.
        var changes = Compare(Samples.Protocol.With("      - {kind: inversion, InversionTime: 3300}\n", "")).Changes;
        Assert.Equal([ChangeKind.Set, ChangeKind.Removed], changes.Select(change => change.Kind));
        Assert.Equal("/series/1/preparations/1", changes[1].Pointer);
    }

    [Fact]
    public void Between_SeriesRemoved_IsOneChange()
    {
        var parts = Samples.Protocol.Split("  - id: ");
        var change = Assert.Single(Compare(string.Join("  - id: ", parts[..3])).Changes);
        Assert.Equal((ChangeKind.Removed, "/series/2", "opposed"), (change.Kind, change.Pointer, change.SeriesId));
    }

    [Fact]
    public void Between_ReadoutOfAnotherKind_IsOneChange()
    {
        var changed = Samples.Protocol.With(
            "readout: {kind: spoiledGradientEcho, RepetitionTime: 150, EchoTime: 1.15, ExcitationFlipAngle: 70, furtherEchoTimes: [2.3]}",
            "readout: {kind: spinEcho, RepetitionTime: 700, EchoTime: 10, ExcitationFlipAngle: 90, RefocusingFlipAngles: [180]}");
        var change = Assert.Single(Compare(changed).Changes);
        Assert.Equal("/series/2/readout", change.Pointer);
    }

    [Fact]
    public void Between_CatalogueValue_SaysTissueAndField()
    {
        var old = Samples.Read(Samples.Catalogue).CanonicalBytes;
        var @new = Samples.Read(Samples.Catalogue.With("mean: 850", "mean: 830")).CanonicalBytes;
        var change = Assert.Single(DocumentDifference.Between(old, @new).Changes);
        Assert.Equal(("T1, mean, white matter at 3 T", "ms"), (change.Label, change.Unit));
    }

    [Fact]
    public void Between_TheSame_IsEmpty() => Assert.Empty(Compare(Samples.Protocol).Changes);

    [Fact]
    public void Between_DocumentsOfTwoKinds_IsRefused() =>
        Assert.Throws<ArgumentException>(() => DocumentDifference.Between(Old, Samples.Read(Samples.Scanner).CanonicalBytes));

    [Fact]
    public void Hybrid_NoneAndAll_GiveTheOldAndTheNewDocument()
    {
        var parts = Samples.Protocol.Split("  - id: ");
        var text = string.Concat(parts[0], "  - id: ", parts[3], "  - id: ", parts[1].With("slices: 30", "slices: 28").With("    meanings: {InversionTime: toExcitation, RepetitionTime: cycle}\n", ""), "  - id: new-", parts[2])
            .With("scanners: [linden-3t]", "scanners: [birch-15t, linden-3t]");
        var difference = Compare(text);
        Assert.Equal(Text(Old), Text(Take(difference)));
        Assert.Equal(Text(Samples.Read(text).CanonicalBytes), Text(Take(difference, [.. difference.Changes.Select(change => change.Index)])));
    }

    [Fact]
    public void Hybrid_OneOfTwo_TakesThatOneAlone()
    {
        var difference = Compare(Samples.Protocol.With("RepetitionTime: 9000", "RepetitionTime: 8600").With("slices: 30", "slices: 28"));
        var taken = Take(difference, difference.Changes.Single(change => change.Name == "slices").Index);
        Assert.Equal(Text(Samples.Read(Samples.Protocol.With("slices: 30", "slices: 28")).CanonicalBytes), Text(taken));
    }

    [Fact]
    public void Hybrid_ChangesThatAreNotValidApart_AreRefused()
    {
        // Effective echo and echo spacing: 126 ms is the ninth echo of 14 ms but no echo of 10 ms.
        var difference = Compare(Samples.Protocol.With("EchoTime: 120", "EchoTime: 126").With("echoSpacing: 10", "echoSpacing: 14"));
        var echoTime = difference.Changes.Single(change => change.Name == "EchoTime").Index;
        Assert.IsType<ParseResult.Refused>(difference.Hybrid(new HashSet<int> { echoTime }));
        Assert.IsType<ParseResult.Parsed>(difference.Hybrid(new HashSet<int> { 0, 1 }));
    }

    private static DocumentDifference Compare(string changed) => DocumentDifference.Between(Old, Samples.Read(changed).CanonicalBytes);

    private static byte[] Take(DocumentDifference difference, params int[] taken) =>
        Assert.IsType<ParseResult.Parsed>(difference.Hybrid(taken.ToHashSet())).CanonicalBytes;

    private static string Text(byte[] bytes) => Encoding.UTF8.GetString(bytes);
}
