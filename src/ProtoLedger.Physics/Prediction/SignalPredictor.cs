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
    /// Lanes are independent: a lane's bits do not depend on the others, on the instruction set, or on the number of threads.
    /// Spins that missed the preparations are predicted from equilibrium and mixed in signed; the magnitude is taken last.
    /// </remarks>
    public static SignalTable Predict(
        Series series, PredictionSetting setting, LaneTable lanes, PredictionOutputs outputs = PredictionOutputs.EffectiveEcho) =>
        Compute(series, setting, lanes, outputs, pruned: true, LaneWidth.Machine);

    /// <summary>The same with pruning and lane width chosen: for tests and for measuring.</summary>
    internal static SignalTable Compute(
        Series series, PredictionSetting setting, LaneTable lanes, PredictionOutputs outputs, bool pruned, LaneWidth width)
    {
        ArgumentNullException.ThrowIfNull(series);
        ArgumentNullException.ThrowIfNull(setting);
        ArgumentNullException.ThrowIfNull(lanes);
        if (!(setting.FieldStrength is > 0 and <= 30))
            throw new ArgumentException($"fieldStrength: {setting.FieldStrength} T must lie in (0, 30].", nameof(setting));

        var program = SeriesCompiler.Compile(series, pruned);
        LaneChecks.Require(lanes, program);
        var allEchoes = outputs.HasFlag(PredictionOutputs.AllEchoes);
        var spectral = series.Preparations.Any(p => p is SpectralSaturation or SpectralInversion);
        var peaks = PeakLanes.Of(lanes, apart: spectral || program.ShiftTurnsPhase || HasShapedInversion(series, setting));

        var run = new PredictionRun(series, program, setting, peaks, allEchoes, series.Timing.State, width);
        run.Run();
        PredictionRun? fresh = null;
        if (series.Preparations.Count > 0 && Array.Exists(lanes.UnpreparedInflow, fraction => fraction > 0))
        {
            var bare = series with { Preparations = [] };
            var bareProgram = SeriesCompiler.Compile(bare, pruned) with { Closure = Closure.Longitudinal };
            fresh = new PredictionRun(bare, bareProgram, setting, peaks, allEchoes, StartState.FirstShot, width);
            fresh.Run();
        }

        return Combination.Of(series, setting, program, lanes, peaks, run, fresh, allEchoes);
    }

    private static bool HasShapedInversion(Series series, PredictionSetting setting) =>
        setting.Pulses == PulseModelling.Modelled
        && series.Preparations.Any(p => p is Inversion { Pulse: not (EfficiencyInversion or HardPulse { Duration: 0 }) });
}
