using System.Text.Json;
using System.Text.Json.Nodes;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Predictions;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;

namespace ProtoLedger.Server.Features.Predictions;

/// <summary>A series and what to predict it for.</summary>
/// <param name="Series">preparations and readout as in a protocol document; timing and geometry are optional.</param>
/// <param name="Tissues">Names of the catalogue, or objects with name, T1, T2, T2star, protonDensity.</param>
/// <param name="Conditions">Field points; one nominal point where none are given.</param>
/// <param name="Pulses">ideal or modelled; modelled where it is not given.</param>
/// <param name="FieldStrength">B0, T; needed where tissues are named, otherwise 3.</param>
/// <param name="AgeGroup">Age group of the named tissues; adult where it is not given.</param>
internal sealed record PredictionRequest(
    JsonObject Series,
    IReadOnlyList<JsonElement> Tissues,
    IReadOnlyList<ConditionRequest>? Conditions = null,
    PulseModelling? Pulses = null,
    double? FieldStrength = null,
    string? AgeGroup = null)
{
    private const int MostLanes = 4096;
    private const double CustomaryField = 3;

    /// <summary>The question, or everything that is wrong with the request.</summary>
    public Outcome<PredictionQuestion> ToQuestion()
    {
        var errors = new List<FieldError>();
        var tissues = TissueRequests.Read(Tissues, errors);
        var points = (Conditions is { Count: > 0 } ? Conditions : [new ConditionRequest()]).Select((c, i) => c.ToPoint(i, errors)).ToList();
        if (FieldStrength is not null and not (> 0 and <= 20))
            errors.Add(new FieldError("/fieldStrength", JsonSerializer.Serialize(FieldStrength), "0 < value ≤ 20 T", "There is no such field strength."));
        if (FieldStrength is null && tissues.OfType<TissueChoice.Named>().Any())
            errors.Add(new FieldError("/fieldStrength", null, "0 < value ≤ 20 T", "Named tissues have other values at each field strength, so it must be given."));
        if (tissues.Count * (long)points.Count > MostLanes)
            errors.Add(new FieldError("/tissues", null, $"tissues × conditions ≤ {MostLanes}", "Ask in smaller parts."));
        var series = SeriesReader.Read(WithListedAngles(Series), scanner: null, "/series");
        if (series is MappingResult<Series>.Refused refused)
            errors.AddRange(refused.Errors.Select(e => new FieldError(e.Pointer, e.Value, e.Limit ?? "", e.Detail)));
        return errors.Count > 0
            ? new Invalid($"{errors.Count} field(s) cannot be predicted from.", errors)
            : new PredictionQuestion(
                series.Require(), tissues, points, new PredictionSetting(FieldStrength ?? CustomaryField, Pulses ?? PulseModelling.Modelled), AgeGroup ?? "adult");
    }

    /// <summary>One angle may stand for the list of one.</summary>
    private static JsonNode WithListedAngles(JsonObject series)
    {
        var copy = series.DeepClone();
        if (copy["readout"] is JsonObject readout && readout["RefocusingFlipAngles"] is JsonValue angle && angle.GetValueKind() == JsonValueKind.Number)
            readout["RefocusingFlipAngles"] = new JsonArray(angle.DeepClone());
        return copy;
    }
}

/// <summary>One point of the fields.</summary>
/// <param name="B1Scale">Actual over nominal flip angle.</param>
/// <param name="OffResonanceHz">Hz.</param>
/// <param name="UnpreparedInflow">Fraction of spins that missed the preparations.</param>
internal sealed record ConditionRequest(double B1Scale = 1, double OffResonanceHz = 0, double UnpreparedInflow = 0)
{
    public FieldPoint ToPoint(int index, List<FieldError> errors)
    {
        Demand(B1Scale is > 0 and <= 4, "b1Scale", B1Scale, "0 < value ≤ 4");
        Demand(Math.Abs(OffResonanceHz) <= 100_000, "offResonanceHz", OffResonanceHz, "−100000 ≤ value ≤ 100000 Hz");
        Demand(UnpreparedInflow is >= 0 and <= 1, "unpreparedInflow", UnpreparedInflow, "0 ≤ value ≤ 1");
        return new FieldPoint(B1Scale, OffResonanceHz, UnpreparedInflow);

        void Demand(bool holds, string name, double value, string limit)
        {
            if (!holds)
                errors.Add(new FieldError($"/conditions/{index}/{name}", JsonSerializer.Serialize(value), limit, $"{name} is outside its limits."));
        }
    }
}
