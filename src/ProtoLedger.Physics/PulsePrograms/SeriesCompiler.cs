using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Compiles a series to a pulse program.</summary>
internal static class SeriesCompiler
{
    private const double Slack = 1e-9;

    internal static CompiledSeries Compile(Series series, bool pruned = true)
    {
        SeriesChecks.Require(series);
        var readout = series.Readout;
        var readoutEnd = ReadoutEnd(readout);
        var events = series.Preparations.Count == 0 && readout.RepetitionTime >= readoutEnd ? [] : Timeline.Place(series, readoutEnd);
        var effective = EffectiveEcho(readout);
        var key = new PlanKey(
            Letters(events), readout.GetType(), Echoes(readout), effective,
            readout is EchoTrain { RefocusingFlipAngles.Count: > 1 }, readout is EchoTrain { FlipBackAngle: not null }, pruned);
        var known = PlanCache.TryGet(key, out var plan);
        var writer = new ProgramWriter(writesSteps: !known);

        var start = events.Length == 0 ? 0 : events[0].Start;
        var now = start;
        var next = 0;
        for (; next < events.Length && events[next].Start < 0; next++)
            Write(writer, events[next], ref now);
        if (events.Length > 0)
            writer.Wait(Gap(-now));
        WriteReadout(writer, readout);
        now = readoutEnd;
        for (; next < events.Length; next++)
            Write(writer, events[next], ref now);
        writer.Wait(Gap(start + readout.RepetitionTime - now));

        var prepared = series.Preparations.Count > 0;
        return new CompiledSeries
        {
            Plan = plan ?? PlanCache.Add(key, writer.Steps),
            Durations = writer.Durations,
            Angles = writer.Angles,
            Maps = writer.Maps,
            Closure = readout switch
            {
                BalancedGradientEcho when !prepared => Closure.Balanced,
                SpoiledGradientEcho { SpoilingIncrement: not null } when !prepared => Closure.RfSpoiled,
                _ => Closure.Longitudinal,
            },
            DecaysWithT2Star = readout is SpoiledGradientEcho or SpoiledGradientEchoTrain,
            ShiftTurnsPhase = readout is SpoiledGradientEcho or SpoiledGradientEchoTrain or BalancedGradientEcho,
            Readout = readout,
            EffectiveEcho = effective,
            DiffusionBValue = (readout as DiffusionSpinEcho)?.DiffusionBValue,
        };
    }

    private static double Gap(double time) => time > 0 ? time : time > -Slack ? 0 : throw new ArgumentException($"RepetitionTime: too short by {-time} ms.");

    private static void Write(ProgramWriter writer, in PreparationEvent e, ref double now)
    {
        writer.Wait(Gap(e.Start - now));
        switch (e.Preparation)
        {
            case Inversion { Pulse: HardPulse { Duration: 0 } pulse, SlabThickness: null }:
                writer.Step(StepKind.Excite, writer.Angle(pulse.FlipAngle));
                writer.Step(StepKind.Spoil);
                break;
            case T2Preparation t2:
                writer.Step(StepKind.Excite, writer.Angle(90));
                var half = writer.Duration(t2.PreparationTime / (2 * t2.RefocusingPulses));
                writer.Refocus(t2.RefocusingPulses, half, writer.Angle(180), scheduled: false, samples: false);
                writer.Step(StepKind.Excite, writer.Angle(-90));
                writer.Step(StepKind.Spoil);
                break;
            default:
                writer.Map(new PulseMap(e.Preparation));
                break;
        }

        now = e.End;
    }

    /// <summary>One letter an event, in order of time.</summary>
    private static string Letters(PreparationEvent[] events) => events.Length switch
    {
        0 => "",
        1 => Letter(events[0]),
        _ => string.Concat(events.Select(Letter)),
    };

    private static string Letter(PreparationEvent e) => e switch
    {
        { Preparation: Inversion { Pulse: HardPulse { Duration: 0 }, SlabThickness: null } } => "f",
        { Preparation: T2Preparation t2 } => $"t{t2.RefocusingPulses}",
        { Start: >= 0 } => "|m",
        _ => "m",
    };

    private static void WriteReadout(ProgramWriter writer, Readout readout)
    {
        switch (readout)
        {
            case SpinEcho spinEcho:
                WriteSpinEcho(writer, spinEcho, spinEcho.RefocusingFlipAngle);
                break;
            case DiffusionSpinEcho diffusion:
                WriteSpinEcho(writer, diffusion, diffusion.RefocusingFlipAngle);
                break;
            case EchoTrain train:
                writer.Step(StepKind.Excite, writer.Angle(train.ExcitationFlipAngle));
                var half = writer.Duration(train.EchoSpacing / 2);
                var first = writer.Angle(train.RefocusingFlipAngles[0]);
                for (var i = 1; i < train.RefocusingFlipAngles.Count; i++)
                    writer.Angle(train.RefocusingFlipAngles[i]);
                writer.Refocus(train.EchoTrainLength, half, first, train.RefocusingFlipAngles.Count > 1, samples: true);
                if (train.FlipBackAngle is { } flipBack)
                    writer.Step(StepKind.Excite, writer.Angle(flipBack));
                writer.Step(StepKind.Spoil);
                break;
            case SpoiledGradientEchoTrain train:
                WriteGradientEchoTrain(writer, train);
                break;
            default:
                writer.Step(StepKind.Excite, writer.Angle(readout.ExcitationFlipAngle));
                var before = 0.0;
                foreach (var time in EchoTimes(readout))
                {
                    writer.Wait(time - before);
                    writer.Step(StepKind.Sample);
                    before = time;
                }

                writer.Step(StepKind.Spoil);
                break;
        }
    }

    private static void WriteSpinEcho(ProgramWriter writer, Readout readout, double refocusing)
    {
        writer.Step(StepKind.Excite, writer.Angle(readout.ExcitationFlipAngle));
        writer.Refocus(1, writer.Duration(readout.EchoTime / 2), writer.Angle(refocusing), scheduled: false, samples: true);
        writer.Step(StepKind.Spoil);
    }

    private static void WriteGradientEchoTrain(ProgramWriter writer, SpoiledGradientEchoTrain train)
    {
        var angle = writer.Angle(train.ExcitationFlipAngle);
        var echo = writer.Duration(train.EchoTime);
        var rest = writer.Duration(train.ReadoutSpacing - train.EchoTime);
        for (var i = 0; writer.WritesSteps && i < train.ReadoutTrainLength; i++)
        {
            writer.Step(StepKind.Excite, angle);
            writer.Step(StepKind.Wait, echo);
            writer.Step(StepKind.Sample);
            writer.Step(StepKind.Spoil);
            if (i < train.ReadoutTrainLength - 1)
                writer.Step(StepKind.Wait, rest);
        }
    }

    private static int Echoes(Readout readout) => readout switch
    {
        EchoTrain train => train.EchoTrainLength,
        SpoiledGradientEchoTrain train => train.ReadoutTrainLength,
        SpoiledGradientEcho gradient => 1 + gradient.FurtherEchoTimes.Count,
        _ => 1,
    };

    private static int EffectiveEcho(Readout readout) => readout switch
    {
        EchoTrain train => (int)Math.Round(train.EchoTime / train.EchoSpacing) - 1,
        SpoiledGradientEchoTrain train => train.CentreIndex,
        _ => 0,
    };

    /// <summary>Times of the echoes of a readout after their excitation, ms.</summary>
    internal static double[] EchoTimes(Readout readout)
    {
        var times = new double[Echoes(readout)];
        for (var i = 0; i < times.Length; i++)
            times[i] = readout switch
            {
                EchoTrain train => (i + 1) * train.EchoSpacing,
                SpoiledGradientEcho gradient when i > 0 => gradient.FurtherEchoTimes[i - 1],
                _ => readout.EchoTime,
            };
        return times;
    }

    private static double ReadoutEnd(Readout readout) => readout switch
    {
        EchoTrain train => train.EchoTrainLength * train.EchoSpacing,
        SpoiledGradientEchoTrain train => (train.ReadoutTrainLength - 1) * train.ReadoutSpacing + train.EchoTime,
        SpoiledGradientEcho { FurtherEchoTimes.Count: > 0 } gradient => gradient.FurtherEchoTimes[^1],
        _ => readout.EchoTime,
    };
}
