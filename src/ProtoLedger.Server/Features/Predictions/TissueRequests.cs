using System.Text.Json;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Predictions;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Server.Features.Predictions;

/// <summary>Tissues of a request: each a name of the catalogue or an object with its values.</summary>
internal static class TissueRequests
{
    private static readonly string[] Known = ["name", "T1", "T2", "T2star", "protonDensity", "apparentDiffusionCoefficient", "isFat"];

    public static IReadOnlyList<TissueChoice> Read(IReadOnlyList<JsonElement> tissues, List<FieldError> errors)
    {
        if (tissues.Count == 0)
            errors.Add(new FieldError("/tissues", "[]", "at least one", "There is no tissue to predict for."));
        return [.. tissues.Select((tissue, i) => Read(tissue, JsonPointer.Append("/tissues", i), errors)).OfType<TissueChoice>()];
    }

    private static TissueChoice? Read(JsonElement tissue, string pointer, List<FieldError> errors) => tissue.ValueKind switch
    {
        JsonValueKind.String => new TissueChoice.Named(tissue.GetString()!, pointer),
        JsonValueKind.Object => Given(tissue, pointer, errors),
        _ => Refuse(pointer, tissue, "a name or an object", "A tissue is a name of the catalogue or an object with its values.", errors),
    };

    private static TissueChoice.Given? Given(JsonElement tissue, string pointer, List<FieldError> errors)
    {
        var before = errors.Count;
        foreach (var member in tissue.EnumerateObject().Where(m => !Known.Contains(m.Name)))
            Refuse(JsonPointer.Append(pointer, member.Name), member.Value, string.Join(", ", Known), $"A tissue has no member \"{member.Name}\".", errors);
        var name = tissue.TryGetProperty("name", out var given) && given.ValueKind == JsonValueKind.String ? given.GetString()! : "";
        if (name.Length is 0 or > 100)
            errors.Add(new FieldError(pointer + "/name", null, "1 to 100 characters", "A tissue needs a name, under which its result stands."));
        var t1 = Number("T1", 1e-3, 100_000, "ms", needed: true);
        var t2 = Number("T2", 1e-3, 100_000, "ms", needed: true);
        var t2Star = Number("T2star", 1e-3, 100_000, "ms");
        var density = Number("protonDensity", 0, 10, "");
        var diffusion = Number("apparentDiffusionCoefficient", 0, 100, "10⁻³ mm²/s");
        var isFat = tissue.TryGetProperty("isFat", out var fat) && fat.ValueKind == JsonValueKind.True;
        return errors.Count > before ? null : new TissueChoice.Given(new Tissue(name, t1!.Value, t2!.Value, t2Star, density ?? 1, diffusion, isFat), pointer);

        double? Number(string member, double low, double high, string unit, bool needed = false)
        {
            var limit = FormattableString.Invariant($"{low} ≤ value ≤ {high} {unit}").TrimEnd();
            if (!tissue.TryGetProperty(member, out var value) || value.ValueKind == JsonValueKind.Null)
            {
                if (needed)
                    errors.Add(new FieldError(JsonPointer.Append(pointer, member), null, limit, $"{member} is missing."));
                return null;
            }

            if (value.ValueKind == JsonValueKind.Number && value.GetDouble() is var number && number >= low && number <= high)
                return number;
            Refuse(JsonPointer.Append(pointer, member), value, limit, $"{member} is outside its limits or no number.", errors);
            return null;
        }
    }

    private static TissueChoice? Refuse(string pointer, JsonElement value, string limit, string detail, List<FieldError> errors)
    {
        var text = value.GetRawText();
        errors.Add(new FieldError(pointer, text.Length <= 80 ? text : text[..80] + "…", limit, detail));
        return null;
    }
}
