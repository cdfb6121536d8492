using System.Runtime.Intrinsics;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Kernels;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Physics.Prediction;

/// <summary>From the engine's columns to the signals of the lanes: peaks of fat, unprepared inflow, diffusion, proton density; the magnitude last.</summary>
internal static class Combination
{
    internal static SignalTable Of(
        Series series, PredictionSetting setting, CompiledSeries program, LaneTable lanes, PeakLanes peaks, PredictionRun run, PredictionRun? fresh, bool allEchoes,
        SignalTable? reused)
    {
        var echoTimes = allEchoes ? program.EchoTimes : [];
        IReadOnlyList<Assumption> Assume() => Assumptions.Of(series, setting, lanes, program);
        if (IsPlain(program, peaks, fresh is not null))
        {
            var plain = reused ?? new SignalTable(run.Signed, run.Before, run.End, run.Period, echoTimes, Assume);
            plain.Assume(Assume);
            Plain(plain, lanes, run, echoTimes.Length);
            return plain;
        }

        var table = new SignalTable(lanes.Count, echoTimes, Assume);
        Longitudinal(table, program, lanes, peaks, run, fresh);

        Signals(
            setting, program, lanes, peaks, fresh, program.EchoTimes[program.EffectiveEcho], run.Signed,
            program.Closure == Closure.Longitudinal ? null : run.Period, fresh?.Signed, table.Signed, table.Magnitude, 1, 0);
        for (var e = 0; e < echoTimes.Length; e++)
        {
            var echo = run.Samples.AsSpan(e * peaks.Lanes.Count, peaks.Lanes.Count);
            var quadrature = run.QuadratureSamples is null ? null : run.QuadratureSamples.AsSpan(e * peaks.Lanes.Count, peaks.Lanes.Count);
            var freshEcho = fresh is null ? null : fresh.Samples.AsSpan(e * peaks.Lanes.Count, peaks.Lanes.Count);
            Signals(
                setting, program, lanes, peaks, fresh, echoTimes[e], echo, quadrature, freshEcho, table.Echoes, table.EchoMagnitudes, echoTimes.Length, e);
        }

        return table;
    }

    /// <summary>Whether the engine's columns are those of the lanes but for the proton density.</summary>
    internal static bool IsPlain(CompiledSeries program, PeakLanes peaks, bool fresh) =>
        peaks.Owner is null && !fresh && program.Closure == Closure.Longitudinal && !(program.DiffusionBValue > 0);

    private static void Plain(SignalTable table, LaneTable lanes, PredictionRun run, int echoes)
    {
        var lane = 0;
        for (; lane <= lanes.Count - Vector512<double>.Count; lane += Vector512<double>.Count)
        {
            var signed = Vector512.LoadUnsafe(ref lanes.ProtonDensity[lane]) * Vector512.LoadUnsafe(ref run.Signed[lane]);
            signed.StoreUnsafe(ref table.Signed[lane]);
            Vector512.Abs(signed).StoreUnsafe(ref table.Magnitude[lane]);
        }

        for (; lane < lanes.Count; lane++)
        {
            table.Signed[lane] = lanes.ProtonDensity[lane] * run.Signed[lane];
            table.Magnitude[lane] = Math.Abs(table.Signed[lane]);
        }

        for (var e = 0; e < echoes; e++)
        {
            for (var i = 0; i < lanes.Count; i++)
            {
                var signed = lanes.ProtonDensity[i] * run.Samples[e * lanes.Count + i];
                table.Echoes[i * echoes + e] = signed;
                table.EchoMagnitudes[i * echoes + e] = Math.Abs(signed);
            }
        }
    }

    private static void Longitudinal(SignalTable table, CompiledSeries program, LaneTable lanes, PeakLanes peaks, PredictionRun run, PredictionRun? fresh)
    {
        var columns = program.Closure == Closure.Longitudinal
            ? new[] { (run.Before, fresh?.Before, table.LongitudinalBeforeExcitation), (run.End, fresh?.End, table.LongitudinalAtEnd), (run.Period, null, table.LongitudinalAtStart) }
            : [(run.Before, null, table.LongitudinalBeforeExcitation), (run.End, null, table.LongitudinalAtEnd), (run.Before, null, table.LongitudinalAtStart)];
        foreach (var (source, unprepared, target) in columns)
        {
            for (var i = 0; i < source.Length; i++)
            {
                var owner = peaks.Owner?[i] ?? i;
                var fraction = lanes.UnpreparedInflow[owner];
                var value = unprepared is null || fraction == 0 ? source[i] : (1 - fraction) * source[i] + fraction * unprepared[i];
                target[owner] += (peaks.Amplitude?[i] ?? 1) * value;
            }
        }
    }

    private static void Signals(
        PredictionSetting setting,
        CompiledSeries program,
        LaneTable lanes,
        PeakLanes peaks,
        PredictionRun? fresh,
        double echoTime,
        ReadOnlySpan<double> signed,
        ReadOnlySpan<double> quadrature,
        ReadOnlySpan<double> unprepared,
        double[] targetSigned,
        double[] targetMagnitude,
        int stride,
        int offset)
    {
        var across = new double[lanes.Count];
        for (var i = 0; i < signed.Length; i++)
        {
            var owner = peaks.Owner?[i] ?? i;
            var fraction = lanes.UnpreparedInflow[owner];
            var real = fresh is null || fraction == 0 ? signed[i] : (1 - fraction) * signed[i] + fraction * unprepared[i];
            var imaginary = quadrature.IsEmpty ? 0 : quadrature[i];
            var weight = lanes.ProtonDensity[owner] * (peaks.Amplitude?[i] ?? 1) * Diffusion(program, lanes, owner);

            // Balanced states carry the phase of their frequency already.
            if (program.ShiftTurnsPhase && program.Closure != Closure.Balanced && peaks.ShiftPpm is { } shifts && shifts[i] != 0)
            {
                var phase = 2 * Math.PI * 1e-3 * echoTime * Proton.ShiftHz(shifts[i], setting.FieldStrength);
                var (cosine, sine) = (Elementary.Cos(phase), Elementary.Sin(phase));
                (real, imaginary) = (real * cosine - imaginary * sine, real * sine + imaginary * cosine);
            }

            targetSigned[owner * stride + offset] += weight * real;
            across[owner] += weight * imaginary;
        }

        for (var i = 0; i < lanes.Count; i++)
        {
            var along = targetSigned[i * stride + offset];
            targetMagnitude[i * stride + offset] = across[i] == 0 ? Math.Abs(along) : Math.Sqrt(along * along + across[i] * across[i]);
        }
    }

    private static double Diffusion(CompiledSeries program, LaneTable lanes, int lane) =>
        program.DiffusionBValue is > 0 and var b ? Elementary.Exp(-b * 1e-3 * lanes.ApparentDiffusionCoefficient[lane]) : 1;
}
