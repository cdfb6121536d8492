using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Validation;

/// <summary>Preparations must leave room for their pulses and stand in the order in which they are listed.</summary>
internal static class PreparationValidation
{
    public static void Check(Series series, string pointer, ErrorList errors)
    {
        var times = InversionTiming.BeforeExcitation(series);
        for (var i = 0; i < times.Count; i++)
        {
            var place = JsonPointer.Append(pointer, i);
            CheckEnd(series, i, place, errors);
            switch (series.Preparations[i])
            {
                case Inversion block:
                    PulseValidation.Check(block.Pulse, place + "/pulse", null, errors);
                    CheckRoom(series, times, i, block.InversionTime, Half(block.Pulse), place, errors);
                    break;
                case SpectralInversion block:
                    PulseValidation.Check(block.Pulse, place + "/pulse", null, errors);
                    CheckRoom(series, times, i, block.InversionTime, Half(block.Pulse), place, errors);
                    break;
                case SpectralSaturation block:
                    PulseValidation.Check(block.Pulse, place + "/pulse", null, errors);
                    break;
            }
        }
    }

    private static void CheckEnd(Series series, int index, string pointer, ErrorList errors)
    {
        if (series.Preparations[index] is Inversion { End: InversionTimeEnd.NextInversion }
            && !series.Preparations.Skip(index + 1).Any(later => later is Inversion))
            errors.Add(
                pointer + "/inversionTimeEnd", "\"nextInversion\"", "excitation or kSpaceCentre", "No inversion follows at which this inversion time could end.");
    }

    /// <summary>The pulse must end before what follows begins: the next preparation, or the excitation.</summary>
    private static void CheckRoom(
        Series series, IReadOnlyList<double> times, int index, double inversionTime, double half, string pointer, ErrorList errors)
    {
        var (following, what) = index + 1 < times.Count
            ? (times[index + 1] + Lead(series.Preparations[index + 1]), "the next preparation")
            : (InversionTiming.HalfExcitation, "the excitation");
        var shortest = inversionTime - times[index] + following + half;
        if (times[index] < following + half)
            errors.Add(
                pointer + "/InversionTime", inversionTime, $"≥ {ShownValue.Of(Math.Round(shortest, 3))} ms",
                $"The inversion time leaves no room for the pulses: {what} would begin before the inversion pulse has ended.");
    }

    private static double Half(RfPulse pulse) => SliceFit.PulseDuration(pulse) / 2;

    private static double Lead(Preparation preparation) => preparation switch
    {
        Inversion block => Half(block.Pulse),
        SpectralInversion block => Half(block.Pulse),
        SpectralSaturation block => Half(block.Pulse),
        _ => InversionTiming.HalfExcitation,
    };
}
