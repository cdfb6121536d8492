using System.Text.Json;
using System.Text.Json.Serialization;

namespace ProtoLedger.Reports;

/// <summary>The electronic form of a report: the whole model, in the order of its members.</summary>
internal static class ReportJson
{
    private static readonly JsonSerializerOptions Options = new()
    {
        PropertyNamingPolicy = JsonNamingPolicy.CamelCase,
        DefaultIgnoreCondition = JsonIgnoreCondition.Never,
        Converters = { new JsonStringEnumConverter(JsonNamingPolicy.CamelCase) },
        WriteIndented = true,
        IndentSize = 1,
        NewLine = "\n",
    };

    /// <summary>Writes <c>{format, kind, content}</c>.</summary>
    /// <exception cref="ArgumentException">A number is not finite, or a text holds half of a surrogate pair.</exception>
    public static byte[] Write<T>(string kind, T content) =>
        JsonSerializer.SerializeToUtf8Bytes(new Envelope<T>(1, kind, content), Options);

    private sealed record Envelope<T>(int Format, string Kind, T Content);
}
