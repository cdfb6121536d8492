using System.Text.Json;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Reads reference files.</summary>
internal static class QualificationReader
{
    internal static QualificationFile Read(string json)
    {
        JsonElement root;
        try
        {
            using var document = JsonDocument.Parse(json);
            root = document.RootElement.Clone();
        }
        catch (JsonException e)
        {
            throw new FormatException($"The file is not JSON: {e.Message}", e);
        }

        var family = Member(root, "", "family", JsonValueKind.String).GetString()!;
        var cases = Member(root, "", "cases", JsonValueKind.Array).EnumerateArray().Select((c, i) => ReadCase(c, $"/cases/{i}"));
        return new QualificationFile(family, [.. cases]);
    }

    private static QualificationCase ReadCase(JsonElement element, string path)
    {
        var id = Member(element, path, "id", JsonValueKind.String).GetString()!;
        var inputs = Member(element, path, "inputs", JsonValueKind.Object);
        var tolerances = new Dictionary<string, double>();
        var absolute = double.NaN;
        if (element.TryGetProperty("tolerance", out var tolerance) && tolerance.ValueKind == JsonValueKind.Object)
        {
            if (tolerance.TryGetProperty("absolute", out var value))
                absolute = Number(value, $"{path}/tolerance/absolute");
            if (tolerance.TryGetProperty("by_quantity", out var byQuantity) && byQuantity.ValueKind == JsonValueKind.Object)
                foreach (var member in byQuantity.EnumerateObject())
                    tolerances[member.Name] = Number(member.Value, $"{path}/tolerance/by_quantity/{member.Name}");
        }

        if (element.TryGetProperty("expected", out var expected) && expected.ValueKind == JsonValueKind.Object)
        {
            var numbers = expected.EnumerateObject().ToDictionary(m => m.Name, m => Numbers(m.Value, $"{path}/expected/{m.Name}"));
            return new QualificationCase(id, inputs, [.. expected.EnumerateObject().Select(m => m.Name)], numbers, absolute, tolerances);
        }

        var question = Member(element, path, "question", JsonValueKind.Array).EnumerateArray()
            .Select((q, i) => q.ValueKind == JsonValueKind.String ? q.GetString()! : throw new FormatException($"{path}/question/{i}: a text is needed."));
        return new QualificationCase(id, inputs, [.. question], null, absolute, tolerances);
    }

    private static JsonElement Member(JsonElement element, string path, string name, JsonValueKind kind) =>
        element.ValueKind == JsonValueKind.Object && element.TryGetProperty(name, out var value) && value.ValueKind == kind
            ? value
            : throw new FormatException($"{path}/{name}: missing or not of kind {kind}.");

    private static double Number(JsonElement value, string path) =>
        value.ValueKind == JsonValueKind.Number ? value.GetDouble() : throw new FormatException($"{path}: a number is needed.");

    private static IReadOnlyList<double> Numbers(JsonElement value, string path) =>
        value.ValueKind == JsonValueKind.Array
            ? [.. value.EnumerateArray().Select((v, i) => Number(v, $"{path}/{i}"))]
            : [Number(value, path)];
}
