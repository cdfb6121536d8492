using System.Text.Json;
using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Protocols.Formats.V1;

/// <summary>Access to a tree that has passed its shape: what is read here is known to be there and of the right kind.</summary>
internal static class Fields
{
    public static double Number(this JsonNode node, string name) => StrictJson.ToDouble(node[name]!.AsValue());

    public static double? OptionalNumber(this JsonNode node, string name) => node[name] is { } value ? StrictJson.ToDouble(value.AsValue()) : null;

    public static double Number(this JsonNode node, string name, double otherwise) => node.OptionalNumber(name) ?? otherwise;

    public static int Whole(this JsonNode node, string name, int otherwise) => (int)node.Number(name, otherwise);

    public static string Text(this JsonNode node, string name) => node[name]!.GetValue<string>();

    public static string? OptionalText(this JsonNode node, string name) => node[name]?.GetValue<string>();

    public static bool Flag(this JsonNode node, string name) => node[name]!.GetValueKind() == JsonValueKind.True;

    public static IReadOnlyList<JsonNode> Items(this JsonNode node, string name) => [.. (node[name]?.AsArray() ?? []).Select(item => item!)];

    public static IReadOnlyList<double> Numbers(this JsonNode node, string name) =>
        [.. node.Items(name).Select(item => StrictJson.ToDouble(item.AsValue()))];

    public static IReadOnlyList<string> Texts(this JsonNode node, string name) => [.. node.Items(name).Select(item => item.GetValue<string>())];

    public static IReadOnlyDictionary<string, T> Map<T>(this JsonNode node, string name, Func<string, JsonNode, T> read) =>
        (node[name]?.AsObject() ?? []).ToDictionary(member => member.Key, member => read(member.Key, member.Value!), StringComparer.Ordinal);

    /// <summary>An enumeration from its camelCase word; the words of a shape are the members' names.</summary>
    public static T Word<T>(this JsonNode node, string name, T otherwise)
        where T : struct, Enum => node.OptionalText(name) is { } word ? Enum.Parse<T>(word, ignoreCase: true) : otherwise;
}
