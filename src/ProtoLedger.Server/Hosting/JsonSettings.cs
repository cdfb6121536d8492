using System.Text.Json;
using System.Text.Json.Serialization;
using ProtoLedger.Application.ChangeRequests;

namespace ProtoLedger.Server.Hosting;

/// <summary>How JSON is read and written: strictly, names in camelCase, times in UTC.</summary>
internal static class JsonSettings
{
    public static void Apply(JsonSerializerOptions options)
    {
        options.PropertyNamingPolicy = JsonNamingPolicy.CamelCase;
        options.PropertyNameCaseInsensitive = false;
        options.NumberHandling = JsonNumberHandling.Strict;
        options.UnmappedMemberHandling = JsonUnmappedMemberHandling.Disallow;
        options.AllowDuplicateProperties = false;
        options.RespectNullableAnnotations = true;
        options.RespectRequiredConstructorParameters = true;
        options.DefaultIgnoreCondition = JsonIgnoreCondition.WhenWritingNull;
        options.MaxDepth = 64;
        options.Converters.Add(new StateWord());
        options.Converters.Add(new JsonStringEnumConverter(JsonNamingPolicy.CamelCase, allowIntegerValues: false));
        options.Converters.Add(new UtcTime());
    }

    /// <summary>Times of the program are UTC; they are written with a Z and at most microseconds, as the database keeps them.</summary>
    private sealed class UtcTime : JsonConverter<DateTime>
    {
        public override DateTime Read(ref Utf8JsonReader reader, Type typeToConvert, JsonSerializerOptions options) =>
            reader.GetDateTimeOffset().UtcDateTime;

        public override void Write(Utf8JsonWriter writer, DateTime value, JsonSerializerOptions options) =>
            writer.WriteStringValue(DateTime.SpecifyKind(value, DateTimeKind.Utc).ToString("yyyy-MM-ddTHH:mm:ss.FFFFFFK", System.Globalization.CultureInfo.InvariantCulture));
    }

    /// <summary>States of a change request stand as people say them.</summary>
    private sealed class StateWord : JsonConverter<ChangeRequestState>
    {
        public override ChangeRequestState Read(ref Utf8JsonReader reader, Type typeToConvert, JsonSerializerOptions options) =>
            ChangeRequestStates.FromWord(reader.GetString() ?? "");

        public override void Write(Utf8JsonWriter writer, ChangeRequestState value, JsonSerializerOptions options) => writer.WriteStringValue(value.ToWord());
    }
}
