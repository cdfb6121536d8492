using System.Globalization;
using System.Text.Json.Nodes;

namespace ProtoLedger.Protocols.Canonical;

/// <summary>JSON pointers (RFC 6901).</summary>
public static class JsonPointer
{
    /// <summary>Pointer to a member.</summary>
    /// <param name="pointer">Pointer to the object.</param>
    /// <param name="name">Member name, not escaped.</param>
    public static string Append(string pointer, string name) =>
        $"{pointer}/{name.Replace("~", "~0", StringComparison.Ordinal).Replace("/", "~1", StringComparison.Ordinal)}";

    /// <summary>Pointer to an item.</summary>
    /// <param name="pointer">Pointer to the array.</param>
    /// <param name="index">From 0.</param>
    public static string Append(string pointer, int index) => $"{pointer}/{index.ToString(CultureInfo.InvariantCulture)}";

    /// <summary>Unescaped reference tokens.</summary>
    /// <param name="pointer">Empty, or beginning with a slash.</param>
    /// <exception cref="FormatException">Not a pointer.</exception>
    public static IReadOnlyList<string> Tokens(string pointer)
    {
        if (pointer.Length == 0)
            return [];
        if (pointer[0] != '/')
            throw new FormatException($"\"{pointer}\" is no JSON pointer: it must be empty or begin with a slash.");
        return [.. pointer[1..].Split('/').Select(token =>
            token.Replace("~1", "/", StringComparison.Ordinal).Replace("~0", "~", StringComparison.Ordinal))];
    }

    /// <summary>The node at a pointer; false where there is none.</summary>
    /// <param name="root">Tree to search.</param>
    /// <param name="pointer">The pointer.</param>
    /// <param name="node">What stands there; may be null for JSON null.</param>
    public static bool TryFind(JsonNode? root, string pointer, out JsonNode? node)
    {
        node = root;
        foreach (var token in Tokens(pointer))
        {
            switch (node)
            {
                case JsonObject members when members.TryGetPropertyValue(token, out var member):
                    node = member;
                    break;
                case JsonArray items when TryIndex(token, items.Count, out var index):
                    node = items[index];
                    break;
                default:
                    node = null;
                    return false;
            }
        }

        return true;
    }

    /// <summary>An array index as RFC 6901 writes it: no sign, no leading zero.</summary>
    internal static bool TryIndex(string token, int count, out int index) =>
        int.TryParse(token, NumberStyles.None, CultureInfo.InvariantCulture, out index)
        && index < count
        && (token.Length == 1 || token[0] != '0');
}
