using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace ProtoLedger.Protocols.Formats.V1.Shapes;

/// <summary>A value as an error shows it.</summary>
internal static class ShownValue
{
    private const int Longest = 80;
    private static readonly JsonSerializerOptions Readable = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    public static string? Of(JsonNode? value)
    {
        if (value is null)
            return null;
        var text = value.ToJsonString(Readable);
        if (text.Length <= Longest)
            return text;
        var end = char.IsHighSurrogate(text[Longest - 1]) ? Longest - 1 : Longest;
        return text[..end] + "…";
    }

    public static string Of(double value) => Canonical.EcmaScriptNumber.Format(value);
}
