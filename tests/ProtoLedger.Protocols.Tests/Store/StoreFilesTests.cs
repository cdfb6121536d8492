using System.Text.Json;
using Json.Schema;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Protocols.Store;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Protocols.Tests.Store;

public sealed class StoreFilesTests
{
    public static TheoryData<string> Paths => [.. StoreFiles.Documents];

    public static TheoryData<DocumentKind> Kinds => [.. DocumentKinds.All];

    [Theory]
    [MemberData(nameof(Paths))]
    public void Document_OfTheStore_IsItsOwnExport(string path) =>
        Assert.Equal(StoreFiles.Text(path), YamlExport.Write(StoreFiles.Read(path).CanonicalBytes));

    [Theory]
    [MemberData(nameof(Kinds))]
    public void Schema_OfAKind_IsInStepWithTheReader(DocumentKind kind) =>
        Assert.Equal(JsonSchemas.Write(kind), StoreFiles.Text($"schemas/{DocumentKinds.Word(kind)}.schema.json"));

    [Theory]
    [MemberData(nameof(Kinds))]
    public void Schema_OfAKind_AcceptsEveryStoredDocument(DocumentKind kind)
    {
        var schema = JsonSchema.FromText(JsonSchemas.Write(kind));
        var stored = StoreFiles.Documents.Select(StoreFiles.Read).Where(read => read.Document.Kind == kind).ToArray();
        var refused = stored.Where(read => !Accepts(schema, read.CanonicalBytes)).Select(read => read.Document.Id);
        Assert.NotEmpty(stored);
        Assert.Empty(refused);
    }

    [Theory]
    [InlineData("bodyRegion: brain", "bodyregion: brain")]
    [InlineData("slices: 30", "slices: 0")]
    [InlineData("kind: echoTrain, ", "kind: spinEcho, ")]
    [InlineData("role: physicist", "role: surgeon")]
    public void Schema_OfProtocols_RefusesWhatTheReaderRefuses(string old, string replacement)
    {
        var json = JsonSerializer.SerializeToUtf8Bytes(TreeOf(Samples.Protocol));
        var bent = JsonSerializer.SerializeToUtf8Bytes(TreeOf(Samples.Protocol.With(old, replacement)));
        var schema = JsonSchema.FromText(JsonSchemas.Write(DocumentKind.Protocol));
        Assert.True(Accepts(schema, json));
        Assert.False(Accepts(schema, bent));
    }

    [Fact]
    public void History_OfTheStore_NamesEveryFileOnce()
    {
        var named = StoreFiles.History.Select(entry => entry.Path).Order(StringComparer.Ordinal);
        Assert.Equal(StoreFiles.Documents, named);
        Assert.All(StoreFiles.History, entry => Assert.Equal((entry.Kind, entry.Id), (StoreFiles.Read(entry).Document.Kind, StoreFiles.Read(entry).Document.Id)));
    }

    [Fact]
    public void History_OfTheStore_IsAsLargeAsAHospitals()
    {
        Assert.True(StoreFiles.History.Count(entry => entry.Version is not null) >= 80);
        Assert.True(Count(DocumentKind.Protocol) >= 14);
        Assert.True(Count(DocumentKind.Scanner) >= 6);
        Assert.Contains(StoreFiles.History, entry => entry.Outcome == HistoryOutcome.Declined);
        Assert.Contains(StoreFiles.History, entry => entry.Outcome == HistoryOutcome.Withdrawn);
    }

    [Fact]
    public void History_OfTheStore_NamesPeopleWhoAreThere()
    {
        var names = StoreFiles.People.Select(person => person.Name).ToHashSet();
        Assert.All(StoreFiles.History, entry => Assert.Contains(entry.StatedBy, names));
        Assert.All(StoreFiles.History.Select(entry => entry.DecidedBy).OfType<string>(), name => Assert.Contains(name, names));
        Assert.Equal(["administrator", "lead-technologist", "physicist", "physicist", "radiologist", "reviewer", "technologist"], StoreFiles.People.Select(person => person.Role).Order());
    }

    [Fact]
    public void History_OfTheStore_ChangesSomethingInEveryVersion()
    {
        foreach (var versions in StoreFiles.History.Where(entry => entry.Version is not null).GroupBy(entry => (entry.Kind, entry.Id)))
            foreach (var (earlier, later) in versions.Zip(versions.Skip(1)))
                Assert.NotEmpty(DocumentDifference.Between(StoreFiles.Read(earlier).CanonicalBytes, StoreFiles.Read(later).CanonicalBytes).Changes);
    }

    [Fact]
    public void NewestVersions_OfTheStore_FitTogether()
    {
        var newest = StoreFiles.Newest();
        var proposals = StoreFiles.History.Where(entry => entry.Proposal is not null).Select(entry => StoreFiles.Read(entry).Document);
        foreach (var document in newest.All<LedgerDocument>().Concat(proposals))
            Assert.Empty(CrossDocumentValidation.Validate(document, newest));
    }

    [Fact]
    public void Protocols_OfTheStore_HaveThreeToEightSeries() =>
        Assert.All(StoreFiles.Newest().All<ProtocolDocument>(), protocol => Assert.InRange(protocol.Series.Count, 3, 8));

    private static int Count(DocumentKind kind) => StoreFiles.History.Where(entry => entry.Kind == kind).Select(entry => entry.Id).Distinct().Count();

    private static bool Accepts(JsonSchema schema, byte[] json)
    {
        using var document = JsonDocument.Parse(json);
        return schema.Evaluate(document.RootElement).IsValid;
    }

    private static System.Text.Json.Nodes.JsonNode TreeOf(string yaml) => Formats.YamlTrees.Of(yaml);
}
