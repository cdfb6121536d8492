using System.Text.Json;

namespace ProtoLedger.Physics.Qualification;

/// <summary>Inputs of a case, read by name with clear errors.</summary>
/// <param name="element">A JSON object.</param>
/// <param name="path">Where it stands, for messages; empty at the top.</param>
internal readonly struct CaseInputs(JsonElement element, string path = "")
{
    /// <summary>Whether a member is there and not null.</summary>
    public bool Has(string name) => element.TryGetProperty(name, out var value) && value.ValueKind != JsonValueKind.Null;

    /// <summary>A number.</summary>
    public double Number(string name) =>
        element.TryGetProperty(name, out var value) && value.ValueKind == JsonValueKind.Number
            ? value.GetDouble()
            : throw new ArgumentException($"{path}/{name}: a number is needed.");

    /// <summary>A number, or what stands for it where the member is missing or null.</summary>
    public double Number(string name, double missing) => Has(name) ? Number(name) : missing;

    /// <summary>A number, or null where the member is missing or null.</summary>
    public double? OptionalNumber(string name) => Has(name) ? Number(name) : null;

    /// <summary>A list of numbers; a plain number is a list of one.</summary>
    public double[] Numbers(string name)
    {
        if (!element.TryGetProperty(name, out var value) || value.ValueKind is not (JsonValueKind.Number or JsonValueKind.Array))
            throw new ArgumentException($"{path}/{name}: a number or a list of numbers is needed.");
        return value.ValueKind == JsonValueKind.Number ? [value.GetDouble()] : [.. value.EnumerateArray().Select(v => v.GetDouble())];
    }

    /// <summary>Whether a member is a list.</summary>
    public bool IsList(string name) => element.TryGetProperty(name, out var value) && value.ValueKind == JsonValueKind.Array;

    /// <summary>A text.</summary>
    public string Text(string name) =>
        element.TryGetProperty(name, out var value) && value.ValueKind == JsonValueKind.String
            ? value.GetString()!
            : throw new ArgumentException($"{path}/{name}: a text is needed.");

    /// <summary>An object.</summary>
    public CaseInputs Object(string name) =>
        element.TryGetProperty(name, out var value) && value.ValueKind == JsonValueKind.Object
            ? new CaseInputs(value, $"{path}/{name}")
            : throw new ArgumentException($"{path}/{name}: an object is needed.");
}
