using System.Text.Json;
using System.Text.Json.Nodes;

namespace ProtoLedger.Ledger.Canonical;

/// <summary>Typed reading of a canonical object. Every fault names the field by JSON pointer.</summary>
internal sealed class CanonicalObject(JsonObject content, string pointer)
{
    /// <summary>Member names in order.</summary>
    public IEnumerable<string> Names => content.Select(p => p.Key);

    /// <summary>Demands exactly these members.</summary>
    public CanonicalObject Only(params ReadOnlySpan<string> names)
    {
        foreach (var name in names)
        {
            if (!content.ContainsKey(name))
            {
                throw new FormatException($"{pointer}/{name} is missing");
            }
        }

        if (content.Count > names.Length)
        {
            var known = names.ToArray();
            throw new FormatException($"{pointer}/{Names.First(n => !known.Contains(n))} is not known here");
        }

        return this;
    }

    public string Text(string name) =>
        content[name] is JsonValue value && value.GetValueKind() == JsonValueKind.String
            ? value.GetValue<string>()
            : throw new FormatException($"{pointer}/{name} must be a text");

    public long Integer(string name) =>
        content[name] is JsonValue value && value.GetValueKind() == JsonValueKind.Number && value.TryGetValue<long>(out var number)
            ? number
            : throw new FormatException($"{pointer}/{name} must be a whole number");

    public Digest Digest(string name) =>
        Ledger.Digest.TryParse(Text(name), out var digest)
            ? digest
            : throw new FormatException($"{pointer}/{name} must be 64 lower-case hexadecimal digits");

    public DateTimeOffset Time(string name) =>
        LedgerTime.TryParse(Text(name), out var time)
            ? time
            : throw new FormatException($"{pointer}/{name} must be a UTC time with six digits after the second");

    public byte[] Base64(string name)
    {
        var text = Text(name);
        try
        {
            var bytes = Convert.FromBase64String(text);
            if (Convert.ToBase64String(bytes) == text)
            {
                return bytes;
            }
        }
        catch (FormatException)
        {
            // Reported below, with the field's name.
        }

        throw new FormatException($"{pointer}/{name} must be base64");
    }

    public CanonicalObject Object(string name) =>
        content[name] is JsonObject map
            ? new CanonicalObject(map, $"{pointer}/{name}")
            : throw new FormatException($"{pointer}/{name} must be an object");

    /// <summary>Every member as a SHA-256 value.</summary>
    public IReadOnlyDictionary<string, Digest> Digests() => Names.ToDictionary(n => n, Digest, StringComparer.Ordinal);

    public IReadOnlyList<CanonicalObject> Objects(string name) =>
        content[name] is JsonArray list
            ? [.. list.Select((item, i) => item is JsonObject map
                ? new CanonicalObject(map, $"{pointer}/{name}/{i}")
                : throw new FormatException($"{pointer}/{name}/{i} must be an object"))]
            : throw new FormatException($"{pointer}/{name} must be a list");
}
