using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Formats.V1;

/// <summary>The five document records from a checked tree.</summary>
internal static class DocumentReading
{
    public static LedgerDocument Read(DocumentKind kind, JsonNode node) => kind switch
    {
        DocumentKind.Protocol => Protocol(node),
        DocumentKind.Scanner => Scanner(node),
        DocumentKind.Conditions => Conditions(node),
        DocumentKind.Catalogue => Catalogue(node),
        DocumentKind.Expectations => Expectations(node),
        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, "No such kind of document."),
    };

    private static ProtocolDocument Protocol(JsonNode node) => new(
        node.Text("id"),
        node.Text("title"),
        node.OptionalText("note"),
        node.Text("bodyRegion"),
        node.Text("ageGroup"),
        node.OptionalText("variantOf"),
        node.Texts("scanners"),
        node.Text("conditions"),
        [.. node.Items("requiredSignatures").Select(item => new RequiredSignature(item.Text("role"), item.Text("meaning"), item.Texts("deputies")))],
        Sheet(node["sheet"] ?? new JsonObject()),
        [.. node.Items("series").Select(Series)]);

    private static ProtocolSheet Sheet(JsonNode node) => new(
        node.OptionalText("indication"),
        node.OptionalText("coil"),
        node.OptionalText("positioning"),
        node.OptionalText("coverage"),
        node.OptionalText("landmarks"),
        node["contrastAgent"] is { } agent ? new ContrastAgent(agent.Text("agent"), agent.Number("dose"), agent.Number("delay")) : null,
        node.OptionalText("order"),
        node.OptionalText("fallback"));

    private static ProtocolSeries Series(JsonNode node) => new(
        node.Text("id"),
        node.Text("title"),
        node.OptionalText("note"),
        SeriesReading.Acquisition(node),
        node.Map("meanings", (_, meaning) => meaning.GetValue<string>()),
        [.. node.Items("allowedRanges").Select(item => new AllowedRange(item.Text("parameter"), item.Number("low"), item.Number("high")))],
        node.Map("recorded", (_, item) => new RecordedValues(
            item.OptionalNumber("scanTimeSeconds"),
            item.OptionalNumber("headSar"),
            item.OptionalNumber("wholeBodySar"),
            item.OptionalNumber("b1Rms"),
            item.OptionalNumber("minimumEchoTime"))),
        node.OptionalNumber("contrastConcentration"));

    private static ScannerDocument Scanner(JsonNode node) => new(
        node.Text("id"),
        node.Text("title"),
        node.OptionalText("note"),
        node.Number("MagneticFieldStrength"),
        node.Text("location"),
        node.Map("pulses", PulseReading.Inline),
        new ScannerLimits(
            node["limits"]!.Number("minimumEchoSpacing"), node["limits"]!.Number("maximumGradient"), node["limits"]!.Number("maximumB1")),
        node.Map("consoleWording", (_, item) => new ConsoleWord(item.Text("word"), item.OptionalText("meaning"))));

    private static ConditionsDocument Conditions(JsonNode node) => new(
        node.Text("id"),
        node.Text("title"),
        node.OptionalText("note"),
        [.. node.Items("conditions").Select(item => new FieldCondition(
            item.Text("name"),
            item.Text("title"),
            Range(item["offResonance"]!),
            item.OptionalNumber("offResonanceField"),
            Range(item["b1Scale"]!),
            item.Numbers("unpreparedInflow")))]);

    private static ValueRange Range(JsonNode node) => new(node.Number("low"), node.Number("high"));

    private static CatalogueDocument Catalogue(JsonNode node) => new(
        node.Text("id"),
        node.Text("title"),
        node.OptionalText("note"),
        [.. node.Items("tissues").Select(item => new CatalogueTissue(
            item.Text("name"),
            item.Text("title"),
            item.Text("ageGroup"),
            item.Flag("isFat"),
            Measured(item["protonDensity"]!),
            OptionalMeasured(item["apparentDiffusionCoefficient"]),
            [.. item.Items("fields").Select(field => new TissueAtField(
                field.Number("fieldStrength"), Measured(field["T1"]!), Measured(field["T2"]!), OptionalMeasured(field["T2star"])))]))]);

    private static MeasuredValue? OptionalMeasured(JsonNode? node) => node is null ? null : Measured(node);

    private static MeasuredValue Measured(JsonNode node) => new(
        node.Number("mean"), node.Number("sd"), node.Text("source"), node.Word("evidence", Evidence.Estimated));

    private static ExpectationsDocument Expectations(JsonNode node) => new(
        node.Text("id"),
        node.Text("title"),
        node.OptionalText("note"),
        node.Text("protocol"),
        [.. node.Items("expectations").Select(item => new Expectation(
            item.Text("id"),
            item.Text("title"),
            item.Text("why"),
            item.Text("series"),
            new ObservableSpecification(
                item["observable"]!.Text("name"), item["observable"]!.OptionalText("tissue"), item["observable"]!.OptionalText("reference")),
            item.Texts("conditions"),
            item.Word("basis", ExpectationBasis.Absolute),
            item.Word("relation", LimitRelation.AtMost),
            item.Number("limit"),
            item.Texts("scanners")))]);
}
