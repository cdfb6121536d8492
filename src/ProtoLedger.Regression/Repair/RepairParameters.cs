using System.Globalization;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Repair;

/// <summary>What a repair or a copy may change when the user names nothing.</summary>
public static class RepairParameters
{
    /// <summary>Inversion and repetition time, echo time in whole echoes, refocusing and excitation angle, concatenations, bandwidth: each within what is usual around its present value.</summary>
    /// <param name="series">The series.</param>
    /// <remarks>Ranges are common practice, no source; what the document's own validation refuses is never offered.</remarks>
    public static IReadOnlyList<RepairParameter> Usual(Series series)
    {
        ArgumentNullException.ThrowIfNull(series);
        var parameters = new List<RepairParameter>();
        void Add(string pointer, double low, double high, double step)
        {
            if (SeriesParameters.Get(series, pointer) is not null)
                parameters.Add(new(pointer, low, high, step));
        }

        for (var i = 0; i < series.Preparations.Count; i++)
        {
            var pointer = string.Create(CultureInfo.InvariantCulture, $"/preparations/{i}/InversionTime");
            if (SeriesParameters.Get(series, pointer) is { } time)
                Add(pointer, 0.5 * time, 1.6 * time, time > 500 ? 5 : 1);
        }

        var readout = series.Readout;
        var repetition = readout.RepetitionTime;
        Add("/readout/RepetitionTime", 0.6 * repetition, 2 * repetition, repetition > 1000 ? 50 : repetition > 100 ? 5 : 0.1);
        if (readout is EchoTrain train)
            Add("/readout/EchoTime", train.EchoSpacing, train.EchoSpacing * train.EchoTrainLength, train.EchoSpacing);
        else
            Add("/readout/EchoTime", 0.5 * readout.EchoTime, 2 * readout.EchoTime, readout.EchoTime > 20 ? 1 : 0.05);
        Add("/readout/RefocusingFlipAngles/0", 90, 180, 5);
        if (readout is SpoiledGradientEcho or BalancedGradientEcho or SpoiledGradientEchoTrain)
            Add("/readout/ExcitationFlipAngle", Math.Max(1, 0.4 * readout.ExcitationFlipAngle), Math.Min(90, 2.5 * readout.ExcitationFlipAngle), 1);
        Add("/timing/concatenations", 1, 6, 1);
        Add("/geometry/PixelBandwidth", 0.5 * series.Geometry.PixelBandwidth, 4 * series.Geometry.PixelBandwidth, 10);
        return parameters;
    }

    /// <summary>A value on the grid of the parameter's step, within its limits.</summary>
    internal static double Snap(RepairParameter parameter, double value)
    {
        var snapped = Math.Round(value / parameter.Step) * parameter.Step;
        // Multiples of a decimal step carry rounding noise that a document should not.
        return Math.Clamp(Math.Round(snapped, 9), parameter.Low, parameter.High);
    }
}
