using System.Globalization;
using System.Text;
using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Regression.Evaluation;

/// <summary>A text that two series share exactly when they are played alike; numbers in round-trip form.</summary>
internal static class AcquisitionText
{
    internal static string Of(Series series)
    {
        var text = new StringBuilder();
        foreach (var preparation in series.Preparations)
        {
            text.Append(preparation);
            Append(text, preparation switch
            {
                Inversion { Pulse: SampledPulse pulse } => pulse,
                SpectralSaturation { Pulse: SampledPulse pulse } => pulse,
                SpectralInversion { Pulse: SampledPulse pulse } => pulse,
                _ => null,
            });
        }

        text.Append(series.Readout);
        Append(text, series.Readout switch
        {
            EchoTrain train => train.RefocusingFlipAngles,
            SpoiledGradientEcho echo => echo.FurtherEchoTimes,
            _ => [],
        });
        return text.Append(series.Timing).Append(series.Geometry).ToString();
    }

    private static void Append(StringBuilder text, SampledPulse? pulse)
    {
        if (pulse is null)
            return;
        Append(text, pulse.AmplitudeHz);
        Append(text, pulse.PhaseDegrees);
    }

    private static void Append(StringBuilder text, IReadOnlyList<double> values)
    {
        text.Append('[');
        foreach (var value in values)
            text.Append(value.ToString("R", CultureInfo.InvariantCulture)).Append(' ');
        text.Append(']');
    }
}
