using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Protocols.Store;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Tests.Store;

/// <summary>The newest versions of the documents in the repository's protocol store.</summary>
internal static class StoredDocuments
{
    private static readonly string Folder = SourceTree.Of("protocol-store");

    private static readonly Dictionary<(DocumentKind, string), ParseResult.Parsed> Newest = StoreReader
        .ReadHistory(File.ReadAllText(Path.Combine(Folder, "history.yaml"))).Require()
        .Where(entry => entry.Version is not null)
        .GroupBy(entry => (entry.Kind, entry.Id))
        .ToDictionary(versions => versions.Key, versions => Read(versions.Last().Path));

    public static IEnumerable<ProtocolDocument> Protocols => Newest.Values.Select(read => read.Document).OfType<ProtocolDocument>();

    public static ParseResult.Parsed Protocol(string id, params (string Pointer, double Value)[] edits) =>
        edits.Length == 0
            ? Newest[(DocumentKind.Protocol, id)]
            : Assert.IsType<ParseResult.Parsed>(ParameterEdit.Apply(
                Newest[(DocumentKind.Protocol, id)].CanonicalBytes,
                edits.Select(edit => new ParameterSetting(edit.Pointer, JsonValue.Create(edit.Value)))));

    public static EvaluationInput Input(ParseResult.Parsed protocol, string scanner)
    {
        var document = (ProtocolDocument)protocol.Document;
        return new(
            HashedDocument.From<ProtocolDocument>(protocol),
            HashedDocument.From<ScannerDocument>(Newest[(DocumentKind.Scanner, scanner)]),
            HashedDocument.From<ConditionsDocument>(Newest[(DocumentKind.Conditions, document.Conditions)]),
            HashedDocument.From<CatalogueDocument>(Newest[(DocumentKind.Catalogue, "tissues")]),
            HashedDocument.From<ExpectationsDocument>(Newest[(DocumentKind.Expectations, document.Id)]),
            SamplePlan.Default);
    }

    private static ParseResult.Parsed Read(string path) =>
        Assert.IsType<ParseResult.Parsed>(DocumentReader.ReadYaml(File.ReadAllText(Path.Combine(Folder, path))));
}
