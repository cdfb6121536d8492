using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Validation;

/// <summary>
/// A range allowed at the console must name a number of the series, stay within what the format allows, hold the set value, and leave the series playable at
/// either end.
/// </summary>
internal static class AllowedRangeValidation
{
    private static readonly Shape SeriesShape = ((ListShape)DocumentShapes.Protocol.Find("series")!.Shape).Item;

    public static void Check(ProtocolSeries series, JsonNode tree, string pointer, ErrorList errors)
    {
        for (var i = 0; i < series.AllowedRanges.Count; i++)
        {
            var (range, place) = (series.AllowedRanges[i], JsonPointer.Append(pointer + "/allowedRanges", i));
            errors.RequireOrder(place, range.Low, range.High, "");
            if (Find(tree, range.Parameter) is var (value, shape))
            {
                CheckRange(range, value, shape, place, errors);
                if (errors.All.Count == 0)
                    CheckEnds(range, tree, place, errors);
            }
            else
                errors.Add(
                    place + "/parameter", $"\"{range.Parameter}\"", "a pointer below the series to a number, such as /readout/RepetitionTime",
                    "The range names no number of this series.");
        }
    }

    private static void CheckRange(AllowedRange range, double value, NumberShape shape, string place, ErrorList errors)
    {
        if (range.Low <= range.High && (value < range.Low || value > range.High))
            errors.Add(
                place, value, $"{ShownValue.Of(range.Low)} to {ShownValue.Of(range.High)} {shape.Unit}".TrimEnd(),
                $"The set value of {range.Parameter} lies outside the range allowed at the console.");
        foreach (var (end, member) in new[] { (range.Low, "/low"), (range.High, "/high") })
            if (!shape.Contains(end))
                errors.Add(place + member, end, shape.Limit, $"The range of {range.Parameter} reaches beyond what the parameter can be.");
    }

    private static void CheckEnds(AllowedRange range, JsonNode tree, string place, ErrorList errors)
    {
        foreach (var (end, member) in new[] { (range.Low, "/low"), (range.High, "/high") })
        {
            if (SeriesValidation.Validate(SeriesReading.Acquisition(With(tree, range.Parameter, end)), "") is [var first, ..])
                errors.Add(place + member, end, first.Limit, $"With {range.Parameter} at this end the series cannot be played: {first.Detail} ({first.Pointer})");
        }
    }

    private static JsonNode With(JsonNode tree, string parameter, double value)
    {
        var changed = tree.DeepClone();
        JsonPointer.TryFind(changed, parameter, out var node);
        node!.ReplaceWith(value);
        return changed;
    }

    private static (double Value, NumberShape Shape)? Find(JsonNode series, string parameter) =>
        parameter.StartsWith('/')
        && ShapePath.Find(SeriesShape, series, parameter)?.Shape is NumberShape shape
        && JsonPointer.TryFind(series, parameter, out var node) && node is JsonValue value
            ? (StrictJson.ToDouble(value), shape)
            : null;
}
