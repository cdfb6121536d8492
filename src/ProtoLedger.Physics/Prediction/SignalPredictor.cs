using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Physics.Prediction;

/// <summary>Predicts the signals of a series: series → pulse program → engine over lanes.</summary>
public static class SignalPredictor
{
    /// <summary>Predicts the signal of every lane.</summary>
    /// <param name="series">The series; any preparation with any readout.</param>
    /// <param name="setting">Field strength and treatment of pulses.</param>
    /// <param name="lanes">The lanes.</param>
    /// <param name="outputs">What to compute beside the effective echo.</param>
    /// <returns>Finite values for every lane.</returns>
    /// <exception cref="ArgumentException">A value of the series or of a lane is outside its range, or a lane lacks what the readout needs; the message names the field, the value and the limit.</exception>
    /// <remarks>
    /// Lanes are independent: a lane's bits do not depend on the others, on the instruction set, or on the number of threads; only where 64 or more lanes meet
    /// a spectral pulse at one point of the fields do they share its integration, within 10⁻¹⁰ of each one's own.
    /// Spins that missed the preparations are predicted from equilibrium and mixed in signed; the magnitude is taken last.
    /// </remarks>
    public static SignalTable Predict(
        Series series, PredictionSetting setting, LaneTable lanes, PredictionOutputs outputs = PredictionOutputs.EffectiveEcho) =>
        Compute(series, setting, lanes, outputs, pruned: true, LaneWidth.Machine);

    /// <summary>Predicts the signal of every lane into a table that is used again: nothing of the size of the lanes is allocated for a plain series.</summary>
    /// <param name="series">The series.</param>
    /// <param name="setting">Field strength and treatment of pulses.</param>
    /// <param name="lanes">The lanes.</param>
    /// <param name="destination">A table of as many lanes without echoes; undefined after an exception.</param>
    /// <exception cref="ArgumentException">As <see cref="Predict"/>, or the table has another number of lanes.</exception>
    public static void PredictInto(Series series, PredictionSetting setting, LaneTable lanes, SignalTable destination)
    {
        ArgumentNullException.ThrowIfNull(destination);
        ArgumentNullException.ThrowIfNull(lanes);
        if (destination.Count != lanes.Count || destination.EchoTimes.Count > 0)
            throw new ArgumentException($"destination: it has {destination.Count} lanes and {destination.EchoTimes.Count} echoes; {lanes.Count} lanes and no echoes are needed.", nameof(destination));
        var result = Compute(series, setting, lanes, PredictionOutputs.EffectiveEcho, pruned: true, LaneWidth.Machine, destination);
        if (!ReferenceEquals(result, destination))
            destination.CopyFrom(result);
    }

    /// <summary>Predicts many series, on several threads.</summary>
    /// <param name="requests">n predictions.</param>
    /// <param name="threads">Most threads at once, ≥ 1; the results do not depend on it.</param>
    /// <returns>n results in the order of the requests.</returns>
    /// <exception cref="ArgumentException">As <see cref="Predict"/>, for the first request that is refused.</exception>
    public static SignalTable[] PredictAll(IReadOnlyList<PredictionRequest> requests, int threads)
    {
        ArgumentNullException.ThrowIfNull(requests);
        ArgumentOutOfRangeException.ThrowIfLessThan(threads, 1);
        var tables = new SignalTable[requests.Count];
        var errors = new ArgumentException?[requests.Count];
        var next = 0;

        // Small portions drawn from one counter, so that no thread waits for another with longer trains.
        void Work()
        {
            const int Portion = 8;
            for (var start = Interlocked.Add(ref next, Portion) - Portion; start < tables.Length; start = Interlocked.Add(ref next, Portion) - Portion)
                for (var i = start; i < Math.Min(start + Portion, tables.Length); i++)
                    (tables[i], errors[i]) = Try(requests[i]);
        }

        if (threads == 1 || requests.Count == 1)
            Work();
        else
            Parallel.For(0, threads, new ParallelOptions { MaxDegreeOfParallelism = threads }, _ => Work());
        return Array.Find(errors, e => e is not null) is { } error ? throw new ArgumentException(error.Message, error) : tables;
    }

    private static (SignalTable Table, ArgumentException? Error) Try(PredictionRequest request)
    {
        try
        {
            return (Predict(request.Series, request.Setting, request.Lanes, request.Outputs), null);
        }
        catch (ArgumentException e)
        {
            return (null!, e);
        }
    }

    /// <summary><see cref="Predict"/> with pruning and lane width chosen: for tests and for measuring.</summary>
    internal static SignalTable Compute(
        Series series, PredictionSetting setting, LaneTable lanes, PredictionOutputs outputs, bool pruned, LaneWidth width, SignalTable? reused = null)
    {
        ArgumentNullException.ThrowIfNull(series);
        ArgumentNullException.ThrowIfNull(setting);
        ArgumentNullException.ThrowIfNull(lanes);
        if (!(setting.FieldStrength is > 0 and <= 30))
            throw new ArgumentException($"fieldStrength: {setting.FieldStrength} T must lie in (0, 30].", nameof(setting));

        var program = SeriesCompiler.Compile(series, pruned);
        LaneChecks.Require(lanes, program);
        var allEchoes = outputs.HasFlag(PredictionOutputs.AllEchoes);
        var peaks = PeakLanes.Of(lanes, apart: program.ShiftTurnsPhase || HasPulseThatSeesFrequency(program, setting));

        var mixes = series.Preparations.Count > 0 && Array.Exists(lanes.UnpreparedInflow, fraction => fraction > 0);
        reused = Combination.IsPlain(program, peaks, mixes) ? reused : null;
        var run = new PredictionRun(series, program, setting, peaks, allEchoes, series.Timing.State, width, reused);
        run.Run();
        PredictionRun? fresh = null;
        if (mixes)
        {
            var bare = series with { Preparations = [] };
            var bareProgram = SeriesCompiler.Compile(bare, pruned) with { Closure = Closure.Longitudinal };
            fresh = new PredictionRun(bare, bareProgram, setting, peaks, allEchoes, StartState.FirstShot, width);
            fresh.Run();
        }

        return Combination.Of(series, setting, program, lanes, peaks, run, fresh, allEchoes, reused);
    }

    private static bool HasPulseThatSeesFrequency(CompiledSeries program, PredictionSetting setting)
    {
        foreach (var map in program.Maps)
            if (map.Preparation is not Inversion { Pulse: EfficiencyInversion } && setting.Pulses == PulseModelling.Modelled)
                return true;
        return false;
    }
}
