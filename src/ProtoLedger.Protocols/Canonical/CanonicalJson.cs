using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace ProtoLedger.Protocols.Canonical;

/// <summary>Canonical JSON of RFC 8785: one byte sequence for one value, so that a hash names a document.</summary>
/// <remarks>
/// Stricter than the RFC: at most 64 levels and 1 MiB, and no NUL in any text (the database cannot hold it).
/// Numbers are IEEE 754 doubles, as the RFC has it; digits beyond a double's are rounded to it.
/// </remarks>
public static class CanonicalJson
{
    /// <summary>Deepest nesting of arrays and objects.</summary>
    public const int MaximumDepth = 64;

    /// <summary>Largest text read or written, bytes.</summary>
    public const int MaximumBytes = 1 << 20;

    /// <summary>Canonical bytes of a JSON text.</summary>
    /// <param name="json">UTF-8, no byte order mark.</param>
    /// <exception cref="CanonicalJsonException">Malformed, duplicate key, non-finite number, NUL, unpaired surrogate, too deep or too large.</exception>
    public static byte[] Canonicalize(ReadOnlySpan<byte> json) => Serialize(StrictJson.Parse(json));

    /// <summary>Canonical bytes of a tree.</summary>
    /// <param name="node">The tree; null stands for JSON null.</param>
    /// <exception cref="CanonicalJsonException">Non-finite number, NUL, unpaired surrogate, too deep or too large.</exception>
    public static byte[] Serialize(JsonNode? node)
    {
        var text = new StringBuilder();
        Write(node, text, "", 0);
        var bytes = Encoding.UTF8.GetBytes(text.ToString());
        return bytes.Length <= MaximumBytes
            ? bytes
            : throw new CanonicalJsonException("", $"The canonical form has {bytes.Length} bytes; the limit is {MaximumBytes} (1 MiB).");
    }

    /// <summary>SHA-256 of bytes, lower-case hexadecimal.</summary>
    public static string Sha256(ReadOnlySpan<byte> bytes) => Convert.ToHexStringLower(SHA256.HashData(bytes));

    /// <summary>A tree read strictly: what <see cref="Canonicalize"/> refuses is refused here.</summary>
    /// <param name="json">UTF-8, no byte order mark.</param>
    /// <exception cref="CanonicalJsonException">As for <see cref="Canonicalize"/>.</exception>
    public static JsonNode? Parse(ReadOnlySpan<byte> json) => StrictJson.Parse(json);

    private static void Write(JsonNode? node, StringBuilder text, string pointer, int depth)
    {
        if (depth >= MaximumDepth && node is (JsonObject or JsonArray))
            throw new CanonicalJsonException(pointer, $"Nested deeper than {MaximumDepth} levels.");
        switch (node)
        {
            case null:
                text.Append("null");
                break;
            case JsonObject members:
                WriteObject(members, text, pointer, depth);
                break;
            case JsonArray items:
                WriteArray(items, text, pointer, depth);
                break;
            default:
                WriteValue(node.AsValue(), text, pointer);
                break;
        }
    }

    private static void WriteObject(JsonObject members, StringBuilder text, string pointer, int depth)
    {
        text.Append('{');
        var first = true;
        foreach (var (name, value) in members.OrderBy(member => member.Key, StringComparer.Ordinal))
        {
            if (!first)
                text.Append(',');
            first = false;
            var place = JsonPointer.Append(pointer, name);
            WriteText(name, text, place);
            text.Append(':');
            Write(value, text, place, depth + 1);
        }

        text.Append('}');
    }

    private static void WriteArray(JsonArray items, StringBuilder text, string pointer, int depth)
    {
        text.Append('[');
        for (var i = 0; i < items.Count; i++)
        {
            if (i > 0)
                text.Append(',');
            Write(items[i], text, JsonPointer.Append(pointer, i), depth + 1);
        }

        text.Append(']');
    }

    private static void WriteValue(JsonValue value, StringBuilder text, string pointer)
    {
        switch (value.GetValueKind())
        {
            case JsonValueKind.Number:
                var number = StrictJson.ToDouble(value);
                if (!double.IsFinite(number))
                    throw new CanonicalJsonException(pointer, "The number is not finite; canonical JSON has no form for it.");
                text.Append(EcmaScriptNumber.Format(number));
                break;
            case JsonValueKind.String:
                WriteText(value.GetValue<string>(), text, pointer);
                break;
            case JsonValueKind.True:
                text.Append("true");
                break;
            case JsonValueKind.False:
                text.Append("false");
                break;
            default:
                text.Append("null");
                break;
        }
    }

    private static void WriteText(string value, StringBuilder text, string pointer)
    {
        StrictJson.RequireText(value, pointer);
        text.Append('"');
        foreach (var character in value)
            _ = character switch
            {
                '"' => text.Append("\\\""),
                '\\' => text.Append("\\\\"),
                '\b' => text.Append("\\b"),
                '\f' => text.Append("\\f"),
                '\n' => text.Append("\\n"),
                '\r' => text.Append("\\r"),
                '\t' => text.Append("\\t"),
                < ' ' => text.Append("\\u00").Append(((int)character).ToString("x2", null)),
                _ => text.Append(character),
            };
        text.Append('"');
    }
}
