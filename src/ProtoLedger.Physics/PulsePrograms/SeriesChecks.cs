using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Refuses a series whose values the engine cannot compute with; each message names field, value and limit.</summary>
internal static class SeriesChecks
{
    private const int LongestTrain = 1024;

    internal static void Require(Series series)
    {
        Readout(series.Readout);
        for (var i = 0; i < series.Preparations.Count; i++)
            Preparation(i, series.Preparations[i]);
        if (series.Timing.Slices < 1)
            throw new ArgumentException($"slices: {series.Timing.Slices} must be at least 1.");
        if (series.Timing.Concatenations < 1)
            throw new ArgumentException($"concatenations: {series.Timing.Concatenations} must be at least 1.");
        if (series.Timing.DummyRepetitions < 0)
            throw new ArgumentException($"dummyRepetitions: {series.Timing.DummyRepetitions} must not be negative.");
    }

    private static void Readout(Readout readout)
    {
        Positive("RepetitionTime", readout.RepetitionTime, "ms");
        Angle("ExcitationFlipAngle", readout.ExcitationFlipAngle);
        NotNegative("EchoTime", readout.EchoTime, "ms");
        switch (readout)
        {
            case SpinEcho spinEcho:
                Positive("EchoTime", spinEcho.EchoTime, "ms");
                Angle("RefocusingFlipAngles", spinEcho.RefocusingFlipAngle);
                break;
            case DiffusionSpinEcho diffusion:
                Positive("EchoTime", diffusion.EchoTime, "ms");
                Angle("RefocusingFlipAngles", diffusion.RefocusingFlipAngle);
                NotNegative("DiffusionBValue", diffusion.DiffusionBValue, "s/mm²");
                break;
            case EchoTrain train:
                Train(train);
                break;
            case SpoiledGradientEchoTrain train:
                Length("readoutTrainLength", train.ReadoutTrainLength);
                Positive("readoutSpacing", train.ReadoutSpacing, "ms");
                if (train.EchoTime > train.ReadoutSpacing)
                    throw new ArgumentException($"EchoTime: {train.EchoTime} ms must not exceed the readoutSpacing of {train.ReadoutSpacing} ms.");
                break;
            case SpoiledGradientEcho gradient:
                var before = gradient.EchoTime;
                foreach (var time in gradient.FurtherEchoTimes)
                {
                    if (!(time > before && double.IsFinite(time)))
                        throw new ArgumentException($"furtherEchoTimes: {time} ms must be later than the echo before it, {before} ms.");
                    before = time;
                }

                if (gradient.SpoilingIncrement is { } increment && !(increment is >= 0 and < 360))
                    throw new ArgumentException($"spoilingIncrement: {increment}° must lie in [0, 360).");
                break;
        }
    }

    private static void Train(EchoTrain train)
    {
        Length("EchoTrainLength", train.EchoTrainLength);
        Positive("echoSpacing", train.EchoSpacing, "ms");
        var number = train.EchoTime / train.EchoSpacing;
        if (!(number >= 0.5 && number < train.EchoTrainLength + 0.5) || Math.Abs(number - Math.Round(number)) > 1e-6)
            throw new ArgumentException(
                $"EchoTime: {train.EchoTime} ms must be an echo of the train, a multiple of {train.EchoSpacing} ms up to {train.EchoTrainLength * train.EchoSpacing} ms.");
        if (train.RefocusingFlipAngles.Count != 1 && train.RefocusingFlipAngles.Count != train.EchoTrainLength)
            throw new ArgumentException(
                $"RefocusingFlipAngles: {train.RefocusingFlipAngles.Count} angles; there must be one, or one for each of the {train.EchoTrainLength} echoes.");
        for (var i = 0; i < train.RefocusingFlipAngles.Count; i++)
            Angle("RefocusingFlipAngles", train.RefocusingFlipAngles[i]);
        if (train.FlipBackAngle is { } flipBack && !(Math.Abs(flipBack) <= 180))
            throw new ArgumentException($"flipBackAngle: {flipBack}° must lie in [−180, 180].");
    }

    private static void Preparation(int index, Preparation preparation)
    {
        switch (preparation)
        {
            case Inversion inversion:
                Positive($"preparations/{index}/InversionTime", inversion.InversionTime, "ms");
                if (inversion.SlabThickness is { } slab)
                    Positive($"preparations/{index}/slabThickness", slab, "slice thicknesses");
                Pulse(index, inversion.Pulse);
                break;
            case SpectralInversion inversion:
                Positive($"preparations/{index}/InversionTime", inversion.InversionTime, "ms");
                Pulse(index, inversion.Pulse);
                break;
            case SpectralSaturation saturation:
                NotNegative($"preparations/{index}/delay", saturation.Delay, "ms");
                Pulse(index, saturation.Pulse);
                break;
            case T2Preparation t2:
                Positive($"preparations/{index}/preparationTime", t2.PreparationTime, "ms");
                NotNegative($"preparations/{index}/delay", t2.Delay, "ms");
                if (t2.RefocusingPulses is < 1 or > LongestTrain)
                    throw new ArgumentException($"preparations/{index}/refocusingPulses: {t2.RefocusingPulses} must lie in [1, {LongestTrain}].");
                break;
        }
    }

    private static void Pulse(int index, RfPulse pulse)
    {
        if (pulse is EfficiencyInversion { Efficiency: not (>= 0 and <= 1) } efficiency)
            throw new ArgumentException($"preparations/{index}/pulse/efficiency: {efficiency.Efficiency} must lie in [0, 1].");
        if (pulse is HardPulse hard && !(Math.Abs(hard.FlipAngle) <= 720 && hard.Duration >= 0 && double.IsFinite(hard.Duration)))
            throw new ArgumentException($"preparations/{index}/pulse: a flip angle of {hard.FlipAngle}° over {hard.Duration} ms; the angle must lie in [−720, 720], the duration must not be negative.");
    }

    private static void Length(string name, int value)
    {
        if (value is < 1 or > LongestTrain)
            throw new ArgumentException($"{name}: {value} must lie in [1, {LongestTrain}].");
    }

    private static void Angle(string name, double value)
    {
        if (!(value is > 0 and <= 180))
            throw new ArgumentException($"{name}: {value}° must lie in (0, 180].");
    }

    private static void Positive(string name, double value, string unit)
    {
        if (!(value > 0 && double.IsFinite(value)))
            throw new ArgumentException($"{name}: {value} {unit} must be positive and finite.");
    }

    private static void NotNegative(string name, double value, string unit)
    {
        if (!(value >= 0 && double.IsFinite(value)))
            throw new ArgumentException($"{name}: {value} {unit} must be finite and not negative.");
    }
}
