using System.ComponentModel.DataAnnotations;
using System.Globalization;
using System.Text.Json;
using System.Text.Json.Nodes;
using System.Text.Json.Serialization.Metadata;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Server.Http;

/// <summary>Compares a JSON tree with the shape of the type that it is to become, so that every fault is named with its pointer before anything is read.</summary>
internal static class JsonShape
{
    private const int LongestShown = 80;

    /// <summary>All faults, in the order of the text; empty where the tree fits.</summary>
    public static IReadOnlyList<FieldError> Check(JsonNode? tree, JsonTypeInfo shape, JsonSerializerOptions options)
    {
        var errors = new List<FieldError>();
        Check(tree, shape, "", null, new Context(options, errors));
        return errors;
    }

    private static void Check(JsonNode? node, JsonTypeInfo shape, string pointer, JsonPropertyInfo? property, Context context)
    {
        if (node is null)
        {
            if (property is not { IsSetNullable: true } && Nullable.GetUnderlyingType(shape.Type) is null)
                context.Add(pointer, node, "not null", "null stands where a value is needed.");
            return;
        }

        if (shape.Type == typeof(JsonElement))
            return;
        if (shape.Type == typeof(JsonObject))
        {
            if (node is not JsonObject)
                context.Add(pointer, node, "an object", "An object is needed here.");
            return;
        }

        switch (shape.Kind)
        {
            case JsonTypeInfoKind.Object:
                CheckObject(node, shape, pointer, context);
                break;
            case JsonTypeInfoKind.Enumerable:
                CheckArray(node, shape, pointer, context);
                break;
            default:
                CheckValue(node, Nullable.GetUnderlyingType(shape.Type) ?? shape.Type, pointer, property, context);
                break;
        }
    }

    private static void CheckObject(JsonNode node, JsonTypeInfo shape, string pointer, Context context)
    {
        if (node is not JsonObject members)
        {
            context.Add(pointer, node, "an object", "An object is needed here.");
            return;
        }

        var known = shape.Properties.ToDictionary(p => p.Name, StringComparer.Ordinal);
        foreach (var (name, value) in members)
        {
            var place = JsonPointer.Append(pointer, name);
            if (!known.TryGetValue(name, out var property))
                context.Add(place, value, string.Join(", ", known.Keys), $"There is no member \"{Shorten(name)}\" here.");
            else
                Check(value, context.Options.GetTypeInfo(property.PropertyType), place, property, context);
        }

        foreach (var property in shape.Properties.Where(p => p.IsRequired && !members.ContainsKey(p.Name)))
            context.Add(JsonPointer.Append(pointer, property.Name), null, "required", $"The member \"{property.Name}\" is missing.");
    }

    private static void CheckArray(JsonNode node, JsonTypeInfo shape, string pointer, Context context)
    {
        if (node is not JsonArray items)
        {
            context.Add(pointer, node, "a list", "A list is needed here.");
            return;
        }

        var item = context.Options.GetTypeInfo(shape.ElementType!);
        for (var i = 0; i < items.Count; i++)
            Check(items[i], item, JsonPointer.Append(pointer, i), null, context);
    }

    private static void CheckValue(JsonNode node, Type type, string pointer, JsonPropertyInfo? property, Context context)
    {
        var kind = node.GetValueKind();
        var (fits, limit) = Type.GetTypeCode(type) switch
        {
            _ when type.IsEnum => (kind == JsonValueKind.String && Enum.GetNames(type).Any(n => JsonNamingPolicy.CamelCase.ConvertName(n) == node.GetValue<string>()),
                "one of " + string.Join(", ", Enum.GetNames(type).Select(JsonNamingPolicy.CamelCase.ConvertName))),
            TypeCode.Int32 => (kind == JsonValueKind.Number && IsWhole(node) && Math.Abs(node.GetValue<double>()) <= int.MaxValue, "a whole number of at most 2,147,483,647"),
            TypeCode.Int64 => (kind == JsonValueKind.Number && IsWhole(node), "a whole number"),
            TypeCode.Double => (kind == JsonValueKind.Number, "a number"),
            TypeCode.Boolean => (kind is JsonValueKind.True or JsonValueKind.False, "true or false"),
            TypeCode.String => (kind == JsonValueKind.String, "a text"),
            _ when type == typeof(DateTimeOffset) => (kind == JsonValueKind.String && Times.TryParse(node.GetValue<string>(), out DateTime _), "a time such as 2030-01-31T08:00:00Z (RFC 3339, with offset)"),
            _ => throw new NotSupportedException(type.Name),
        };
        if (!fits)
            context.Add(pointer, node, limit, $"Here stands {Word(kind)}; needed is {limit}.");
        else if (property?.AttributeProvider is { } attributes)
            CheckAttributes(node, kind, attributes.GetCustomAttributes(typeof(ValidationAttribute), true).Cast<ValidationAttribute>(), pointer, context);
    }

    private static void CheckAttributes(JsonNode node, JsonValueKind kind, IEnumerable<ValidationAttribute> attributes, string pointer, Context context)
    {
        foreach (var attribute in attributes)
        {
            var (broken, limit) = attribute switch
            {
                StringLengthAttribute length when kind == JsonValueKind.String =>
                    (!length.IsValid(node.GetValue<string>()), $"{length.MinimumLength} to {length.MaximumLength} characters"),
                RangeAttribute range when kind == JsonValueKind.Number =>
                    (!range.IsValid(node.GetValue<double>()), string.Create(CultureInfo.InvariantCulture, $"{range.Minimum} to {range.Maximum}")),
                _ => (false, ""),
            };
            if (broken)
                context.Add(pointer, node, limit, $"The value is outside its limits: {limit}.");
        }
    }

    private static bool IsWhole(JsonNode node) => node.GetValue<double>() is var number && Math.Floor(number) == number && Math.Abs(number) <= 9007199254740991;

    private static string Word(JsonValueKind kind) => kind switch
    {
        JsonValueKind.Object => "an object",
        JsonValueKind.Array => "a list",
        JsonValueKind.String => "a text",
        JsonValueKind.Number => "a number",
        JsonValueKind.True or JsonValueKind.False => "true or false",
        _ => "nothing",
    };

    private static string Shorten(string text) => text.Length <= LongestShown ? text : text[..LongestShown] + "…";

    private sealed record Context(JsonSerializerOptions Options, List<FieldError> Errors)
    {
        public void Add(string pointer, JsonNode? value, string limit, string detail) =>
            Errors.Add(new FieldError(pointer, value is null ? null : Shorten(value.ToJsonString(Options)), limit, detail));
    }
}
