using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Validation;

/// <summary>Echoes must stand where the readout can make them.</summary>
internal static class ReadoutValidation
{
    private const double Same = 1e-6;

    public static void Check(Readout readout, string pointer, ErrorList errors)
    {
        switch (readout)
        {
            case EchoTrain train:
                CheckTrain(train, pointer, errors);
                break;
            case SpoiledGradientEcho gradient:
                CheckFurtherEchoes(gradient, pointer, errors);
                break;
            case SpoiledGradientEchoTrain train when train.EchoTime >= train.ReadoutSpacing:
                errors.Add(
                    pointer + "/EchoTime", train.EchoTime, $"< {ShownValue.Of(train.ReadoutSpacing)} ms",
                    "The echo would come after the next excitation of the train.");
                break;
            case BalancedGradientEcho balanced when balanced.EchoTime >= balanced.RepetitionTime:
                errors.Add(
                    pointer + "/EchoTime", balanced.EchoTime, $"< {ShownValue.Of(balanced.RepetitionTime)} ms",
                    "The echo would come after the next excitation.");
                break;
        }
    }

    private static void CheckTrain(EchoTrain train, string pointer, ErrorList errors)
    {
        var echo = train.EchoTime / train.EchoSpacing;
        if (Math.Abs(echo - Math.Round(echo)) > Same || Math.Round(echo) < 1 || Math.Round(echo) > train.EchoTrainLength)
            errors.Add(
                pointer + "/EchoTime", train.EchoTime,
                $"a multiple of {ShownValue.Of(train.EchoSpacing)} ms up to {ShownValue.Of(train.EchoSpacing * train.EchoTrainLength)} ms",
                "The effective echo time is no echo of the train: echoes stand at whole multiples of the echo spacing.");
        if (train.RefocusingFlipAngles.Count != 1 && train.RefocusingFlipAngles.Count != train.EchoTrainLength)
            errors.Add(
                pointer + "/RefocusingFlipAngles", $"{train.RefocusingFlipAngles.Count} angles", $"1 or {train.EchoTrainLength} angles",
                "The list of refocusing flip angles (degrees) has neither one value for all echoes nor one for each echo.");
    }

    private static void CheckFurtherEchoes(SpoiledGradientEcho gradient, string pointer, ErrorList errors)
    {
        var earlier = gradient.EchoTime;
        for (var i = 0; i < gradient.FurtherEchoTimes.Count; i++)
        {
            var echo = gradient.FurtherEchoTimes[i];
            if (echo <= earlier)
                errors.Add(
                    $"{pointer}/furtherEchoTimes/{i}", echo, $"> {ShownValue.Of(earlier)} ms",
                    "Echo times of one excitation stand in ascending order.");
            earlier = echo;
        }
    }
}
