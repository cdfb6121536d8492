using System.Globalization;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1;
using ProtoLedger.Protocols.Formats.V1.Shapes;
using ProtoLedger.Protocols.Formats.V1.Yaml;

namespace ProtoLedger.Protocols.Store;

/// <summary>Reads the two lists of a protocol store: <c>history.yaml</c> and <c>people.yaml</c>. The documents themselves are read one by one.</summary>
public static class StoreReader
{
    /// <summary>The history, oldest first.</summary>
    /// <param name="yaml">Text of <c>history.yaml</c>.</param>
    public static MappingResult<IReadOnlyList<HistoryEntry>> ReadHistory(string yaml) => Read(
        yaml, StoreShapes.History, tree => HistoryCheck.Run([.. tree.Items("entries").Select(Entry)]), tree => tree.Items("entries").Select(Entry));

    /// <summary>The people of the demonstration.</summary>
    /// <param name="yaml">Text of <c>people.yaml</c>.</param>
    public static MappingResult<IReadOnlyList<StorePerson>> ReadPeople(string yaml) => Read(
        yaml,
        StoreShapes.People,
        _ => [],
        tree => tree.Items("people").Select(person => new StorePerson(person.Text("name"), person.Text("displayName"), person.Text("role"))));

    private static MappingResult<IReadOnlyList<T>> Read<T>(
        string yaml, ObjectShape shape, Func<JsonNode, IReadOnlyList<DocumentError>> check, Func<JsonNode, IEnumerable<T>> read)
    {
        switch (YamlTree.Parse(yaml, _ => shape))
        {
            case YamlTreeResult.Refused(var errors):
                return new MappingResult<IReadOnlyList<T>>.Refused(errors);
            case YamlTreeResult.Parsed(var tree, var places):
                var found = ShapeCheck.Run(tree, shape);
                if (found.Count == 0)
                    found = check(tree!);
                return found.Count > 0
                    ? new MappingResult<IReadOnlyList<T>>.Refused([.. found.Select(places.Locate)])
                    : new MappingResult<IReadOnlyList<T>>.Mapped([.. read(tree!)]);
            case var other:
                throw new InvalidOperationException(other.GetType().Name);
        }
    }

    private static HistoryEntry Entry(JsonNode node) => new(
        node.Word("kind", DocumentKind.Protocol),
        node.Text("id"),
        (int?)node.OptionalNumber("version"),
        node.OptionalText("proposal"),
        (int?)node.OptionalNumber("baseVersion"),
        Time(node.Text("statedTime")),
        node.Text("statedBy"),
        node.Text("reason"),
        node.Text("source"),
        node.Word("outcome", HistoryOutcome.Imported),
        node.OptionalText("decidedBy"),
        node.OptionalText("decisionReason"));

    /// <summary>The time, or the least one for a day that no calendar has; <see cref="HistoryCheck"/> refuses it.</summary>
    private static DateTimeOffset Time(string text) =>
        DateTimeOffset.TryParseExact(text, StoreShapes.TimeFormat, CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out var time)
            ? time
            : DateTimeOffset.MinValue;
}
