using System.Globalization;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace ProtoLedger.Protocols.Canonical;

/// <summary>A JSON text as a tree, refusing what a document may not hold.</summary>
internal static class StrictJson
{
    public static JsonNode? Parse(ReadOnlySpan<byte> json)
    {
        if (json.Length > CanonicalJson.MaximumBytes)
            throw new CanonicalJsonException("", $"The text has {json.Length} bytes; the limit is {CanonicalJson.MaximumBytes} (1 MiB).");
        var reader = new Utf8JsonReader(json, new JsonReaderOptions { MaxDepth = CanonicalJson.MaximumDepth });
        try
        {
            reader.Read();
            var tree = ReadNode(ref reader, "");
            return reader.Read() ? throw new CanonicalJsonException("", "More than one value.") : tree;
        }
        catch (JsonException fault)
        {
            throw new CanonicalJsonException("", Describe(fault));
        }
    }

    /// <summary>Refuses NUL and unpaired surrogates.</summary>
    public static void RequireText(string value, string pointer)
    {
        for (var i = 0; i < value.Length; i++)
        {
            if (value[i] == '\0')
                throw new CanonicalJsonException(pointer, "The text holds a NUL character, which cannot be stored.");
            if (!char.IsSurrogate(value[i]))
                continue;
            if (i + 1 >= value.Length || !char.IsSurrogatePair(value[i], value[i + 1]))
                throw new CanonicalJsonException(pointer, "The text holds an unpaired surrogate, which is no Unicode character.");
            i++;
        }
    }

    /// <summary>The double behind a JSON number, whatever type it was made from.</summary>
    public static double ToDouble(JsonValue value) =>
        value.TryGetValue<double>(out var number)
            ? number
            : double.Parse(value.ToJsonString(), NumberStyles.Float, CultureInfo.InvariantCulture);

    private static JsonNode? ReadNode(ref Utf8JsonReader reader, string pointer) => reader.TokenType switch
    {
        JsonTokenType.StartObject => ReadObject(ref reader, pointer),
        JsonTokenType.StartArray => ReadArray(ref reader, pointer),
        JsonTokenType.String => JsonValue.Create(ReadText(ref reader, pointer)),
        JsonTokenType.Number => JsonValue.Create(ReadNumber(ref reader, pointer)),
        JsonTokenType.True => JsonValue.Create(true),
        JsonTokenType.False => JsonValue.Create(false),
        _ => null,
    };

    private static JsonObject ReadObject(ref Utf8JsonReader reader, string pointer)
    {
        var members = new JsonObject();
        while (reader.Read() && reader.TokenType != JsonTokenType.EndObject)
        {
            var name = ReadText(ref reader, pointer);
            var place = JsonPointer.Append(pointer, name);
            RequireText(name, place);
            reader.Read();
            var value = ReadNode(ref reader, place);
            if (!members.TryAdd(name, value))
                throw new CanonicalJsonException(place, $"The key \"{name}\" stands here twice; each key may stand once.");
        }

        return members;
    }

    private static JsonArray ReadArray(ref Utf8JsonReader reader, string pointer)
    {
        var items = new JsonArray();
        while (reader.Read() && reader.TokenType != JsonTokenType.EndArray)
            items.Add(ReadNode(ref reader, JsonPointer.Append(pointer, items.Count)));
        return items;
    }

    private static string ReadText(ref Utf8JsonReader reader, string pointer)
    {
        try
        {
            var text = reader.GetString()!;
            RequireText(text, pointer);
            return text;
        }
        catch (InvalidOperationException)
        {
            throw new CanonicalJsonException(pointer, "The text holds an unpaired surrogate or bytes that are no UTF-8.");
        }
    }

    private static double ReadNumber(ref Utf8JsonReader reader, string pointer) =>
        reader.TryGetDouble(out var number) && double.IsFinite(number)
            ? number
            : throw new CanonicalJsonException(pointer, "The number is beyond the range of a double, so it is not finite.");

    private static string Describe(JsonException fault)
    {
        var place = $"line {fault.LineNumber + 1}, byte {fault.BytePositionInLine + 1}";
        return fault.Message.Contains("maximum configured depth", StringComparison.OrdinalIgnoreCase)
            ? $"Nested deeper than {CanonicalJson.MaximumDepth} levels ({place})."
            : $"Not JSON: {place}.";
    }
}
