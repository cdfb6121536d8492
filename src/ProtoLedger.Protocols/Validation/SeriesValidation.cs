using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Validation;

/// <summary>Whether a series can be played at all. Times in ms from pulse centre to pulse centre unless said otherwise.</summary>
public static class SeriesValidation
{
    /// <summary>All errors of a series; empty when it can be played.</summary>
    /// <param name="series">The series; pulses that are still references count with <see cref="SliceFit.AssumedInversionDuration"/>.</param>
    /// <param name="pointer">Where the series stands; begins the pointer of every error.</param>
    public static IReadOnlyList<DocumentError> Validate(Series series, string pointer)
    {
        var errors = new ErrorList();
        ReadoutValidation.Check(series.Readout, pointer + "/readout", errors);
        PreparationValidation.Check(series, pointer + "/preparations", errors);
        CheckTrigger(series, pointer + "/timing", errors);
        if (errors.All.Count == 0)
            CheckFit(series, pointer, errors);
        return errors.All;
    }

    private static void CheckTrigger(Series series, string pointer, ErrorList errors)
    {
        var (trigger, rate) = (series.Timing.Trigger, series.Timing.HeartRate);
        if (trigger != SeriesTrigger.None && rate == default)
            errors.Add(
                pointer + "/heartRate", (string?)null, "low and high, 1/min",
                "A triggered series needs the range of rates (1/min) for which it is meant: its repetition time follows them.");
        if (trigger == SeriesTrigger.None && rate != default)
            errors.Add(pointer + "/heartRate", $"{ShownValue.Of(rate.Low)} to {ShownValue.Of(rate.High)}", "no rate", "A series without a trigger has no rate.");
        errors.RequireOrder(pointer + "/heartRate", rate.Low, rate.High, "1/min");
        if (series.Timing.State == StartState.AfterDummies && series.Timing.DummyRepetitions == 0)
            errors.Add(pointer + "/state", "\"afterDummies\"", "dummyRepetitions ≥ 1", "The series plays no dummy repetition after which it could start.");
    }

    /// <summary>Preparations and readout of one slice, then of all slices of a pass, in the repetition time.</summary>
    private static void CheckFit(Series series, string pointer, ErrorList errors)
    {
        var repetition = series.Readout.RepetitionTime;
        var readout = SliceFit.ReadoutDuration(series);
        var first = InversionTiming.BeforeExcitation(series).DefaultIfEmpty().Max();
        if (first + readout > repetition)
        {
            errors.Add(
                pointer + "/readout/RepetitionTime", repetition, $"≥ {ShownValue.Of(Math.Ceiling(first + readout))} ms",
                $"Preparation ({Shown(first)} ms before the excitation) and readout ({Shown(readout)} ms after it) do not fit in the repetition time.");
            return;
        }

        var fit = SliceFit.Of(series);
        if (fit.Fits)
            return;
        if (fit.ConcatenationsNeeded > 0)
            errors.Add(
                pointer + "/timing/concatenations", series.Timing.Concatenations, $"≥ {fit.ConcatenationsNeeded}",
                $"{fit.SlicesPerConcatenation} of {series.Timing.Slices} slices in a pass, each busy for {Shown(fit.BusyTime)} ms, do not fit in the repetition time of {ShownValue.Of(repetition)} ms; {fit.ConcatenationsNeeded} concatenations are needed.");
        else
            errors.Add(
                pointer + "/readout/RepetitionTime", repetition, $"≥ {ShownValue.Of(Math.Ceiling(fit.BusyTime))} ms",
                $"Even one slice, busy for {Shown(fit.BusyTime)} ms, does not fit in the repetition time.");
    }

    private static string Shown(double milliseconds) => ShownValue.Of(Math.Round(milliseconds, 1));
}
