using System.Globalization;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Comparison;

namespace ProtoLedger.Server.Features.ChangeRequests;

/// <summary>What would repair a proposal, one click away from a new proposal that holds its changes and the repair.</summary>
/// <param name="Expectation">What would hold again.</param>
/// <param name="Change">The change in words.</param>
/// <param name="Scanners">Scanners for which it was computed, with the probability that the expectation holds there.</param>
/// <param name="Address">The form of the new proposal, filled in.</param>
internal sealed record RepairOffer(string Expectation, string Change, string Scanners, string Address);

/// <summary>Reads the repairs of a stored report.</summary>
internal static class RepairOffers
{
    private const int Most = 6;

    /// <summary>Offers in the order of the report; none where the proposal adds, removes or moves blocks, since a form cannot carry that.</summary>
    /// <param name="report">The JSON form of the report.</param>
    /// <param name="protocol">Identifier.</param>
    /// <param name="document">The proposed document.</param>
    /// <param name="changes">What the proposal changes.</param>
    public static IReadOnlyList<RepairOffer> Read(ReadOnlySpan<byte> report, string protocol, ReadOnlySpan<byte> document, IReadOnlyList<ParameterChange> changes)
    {
        if (changes.Any(change => change.Kind != ChangeKind.Set) || JsonNode.Parse(report)?["content"]?["repairs"] is not JsonArray repairs)
            return [];
        var proposed = JsonNode.Parse(document)!;
        return
        [
            .. repairs.OfType<JsonObject>()
                .Select(repair => (repair, sets: Sets(repair, proposed)))
                .Where(offer => offer.sets.Count > 0)
                .GroupBy(offer => (Title: Text(offer.repair, "expectationTitle"), Change: Words(offer.repair)))
                .Take(Most)
                .Select(group => new RepairOffer(
                    group.Key.Title,
                    group.Key.Change,
                    string.Join(", ", group.Select(offer => string.Create(
                        CultureInfo.InvariantCulture, $"{Text(offer.repair, "scannerId")} {Percent(offer.repair["probabilityHolds"]!.GetValue<double>())}"))),
                    Address(protocol, changes, group.First().sets))),
        ];
    }

    /// <summary>A probability is never rounded to certainty.</summary>
    private static string Percent(double probability) => probability switch
    {
        > 0.99 => "more than 99 %",
        < 0.01 => "less than 1 %",
        _ => probability.ToString("0 %", CultureInfo.InvariantCulture),
    };

    private static string Address(string protocol, IReadOnlyList<ParameterChange> changes, IReadOnlyDictionary<string, string> repair)
    {
        var sets = changes.ToDictionary(change => change.Pointer, change => FormText(change.New));
        foreach (var (pointer, value) in repair)
            sets[pointer] = value;
        return $"/protocols/{protocol}/propose?" + string.Join('&', sets.Select(pair => "set=" + Uri.EscapeDataString($"{pair.Key}={pair.Value}")));
    }

    /// <summary>Pointers and new values; empty where a parameter is not found once with the value that the report names.</summary>
    private static Dictionary<string, string> Sets(JsonObject repair, JsonNode proposed)
    {
        var sets = new Dictionary<string, string>();
        var series = proposed["series"]!.AsArray();
        for (var i = 0; i < series.Count; i++)
        {
            if (series[i]!["title"]?.GetValue<string>() != Text(repair, "seriesTitle"))
                continue;
            foreach (var change in repair["changes"]!.AsArray())
            {
                var found = Find(series[i]!, $"/series/{i}", Text(change!, "parameter")).Where(place => JsonNode.DeepEquals(place.Value, change!["from"])).ToList();
                if (found is not [var only])
                    return [];
                sets[only.Pointer] = FormText(change!["to"]);
            }
        }

        return sets;
    }

    private static IEnumerable<(string Pointer, JsonNode? Value)> Find(JsonNode node, string pointer, string name) => node switch
    {
        JsonObject block => block.SelectMany(member => member.Key == name
            ? [(JsonPointer.Append(pointer, name), member.Value)]
            : member.Value is null ? [] : Find(member.Value, JsonPointer.Append(pointer, member.Key), name)),
        JsonArray list => list.SelectMany((item, index) => item is null ? [] : Find(item, JsonPointer.Append(pointer, index), name)),
        _ => [],
    };

    private static string Words(JsonObject repair) => string.Join(", ", repair["changes"]!.AsArray().Select(change =>
        $"{Text(change!, "parameter")} {change!["from"]} to {change["to"]} {change["unit"]}".Trim()));

    private static string Text(JsonNode node, string name) => node[name]?.GetValue<string>() ?? "";

    private static string FormText(JsonNode? value) => value switch
    {
        JsonArray list => string.Join(", ", list.Select(FormText)),
        JsonValue text when text.TryGetValue<string>(out var word) => word,
        _ => value?.ToJsonString() ?? "",
    };
}
