using System.Globalization;
using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace ProtoLedger.Ledger.Canonical;

/// <summary>
/// RFC 8785 for the few documents of the ledger: objects, arrays, strings and whole numbers up to 2^53 - 1. There are no
/// fractions, true, false or null in them, so that the hard part of RFC 8785 (printing doubles) does not arise.
/// </summary>
internal static class CanonicalJson
{
    private const long LargestInteger = (1L << 53) - 1;
    private static readonly UTF8Encoding Strict = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);
    private static readonly JsonDocumentOptions Options = new() { AllowDuplicateProperties = false, MaxDepth = 16 };

    /// <summary>Canonical bytes.</summary>
    /// <exception cref="ArgumentException">A string has an unpaired surrogate, or a value is of another kind.</exception>
    public static byte[] Write(JsonNode node)
    {
        var text = new StringBuilder();
        Write(node, text);
        try
        {
            return Strict.GetBytes(text.ToString());
        }
        catch (EncoderFallbackException fault)
        {
            throw new ArgumentException("A text has an unpaired surrogate.", fault);
        }
    }

    /// <summary>Reads an object whose bytes are canonical.</summary>
    /// <exception cref="FormatException">Not JSON, not an object, or not in canonical form.</exception>
    public static CanonicalObject Read(ReadOnlySpan<byte> bytes)
    {
        var owned = bytes.ToArray();
        try
        {
            var node = JsonNode.Parse(owned, documentOptions: Options);
            if (node is not JsonObject root)
            {
                throw new FormatException("the bytes are not a JSON object");
            }

            return Write(root).AsSpan().SequenceEqual(owned)
                ? new CanonicalObject(root, "")
                : throw new FormatException("the JSON is not in canonical form (RFC 8785)");
        }
        catch (Exception fault) when (fault is JsonException or ArgumentException or InvalidOperationException)
        {
            throw new FormatException("the bytes are not strict JSON", fault);
        }
    }

    private static void Write(JsonNode? node, StringBuilder text)
    {
        switch (node)
        {
            case JsonObject map:
                Write(map, text);
                break;
            case JsonArray list:
                Write(list, text);
                break;
            case JsonValue value when value.GetValueKind() == JsonValueKind.String:
                Write(value.GetValue<string>(), text);
                break;
            case JsonValue value when value.TryGetValue<long>(out var number):
                text.Append(Checked(number).ToString(CultureInfo.InvariantCulture));
                break;
            case JsonValue value when value.TryGetValue<int>(out var number):
                text.Append(number.ToString(CultureInfo.InvariantCulture));
                break;
            default:
                throw new ArgumentException("Only objects, arrays, strings and whole numbers occur here.");
        }
    }

    private static long Checked(long number) =>
        number is >= -LargestInteger and <= LargestInteger
            ? number
            : throw new ArgumentException($"{number} is not exact in a double.");

    private static void Write(JsonObject map, StringBuilder text)
    {
        text.Append('{');
        var separator = "";
        foreach (var (name, value) in map.OrderBy(p => p.Key, StringComparer.Ordinal))
        {
            text.Append(separator);
            Write(name, text);
            text.Append(':');
            Write(value, text);
            separator = ",";
        }

        text.Append('}');
    }

    private static void Write(JsonArray list, StringBuilder text)
    {
        text.Append('[');
        var separator = "";
        foreach (var item in list)
        {
            text.Append(separator);
            Write(item, text);
            separator = ",";
        }

        text.Append(']');
    }

    /// <summary>RFC 8785 section 3.2.2.2.</summary>
    private static void Write(string value, StringBuilder text)
    {
        text.Append('"');
        foreach (var c in value)
        {
            _ = c switch
            {
                '"' => text.Append("\\\""),
                '\\' => text.Append("\\\\"),
                '\b' => text.Append("\\b"),
                '\t' => text.Append("\\t"),
                '\n' => text.Append("\\n"),
                '\f' => text.Append("\\f"),
                '\r' => text.Append("\\r"),
                < ' ' => text.Append("\\u").Append(((int)c).ToString("x4", CultureInfo.InvariantCulture)),
                _ => text.Append(c),
            };
        }

        text.Append('"');
    }
}
