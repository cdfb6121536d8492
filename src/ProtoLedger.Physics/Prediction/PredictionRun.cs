using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Physics.Prediction;

/// <summary>One prediction on its way: program, lanes, and the columns that the engine fills.</summary>
internal sealed unsafe class PredictionRun
{
    private readonly Series _series;
    private readonly CompiledSeries _program;
    private readonly PredictionSetting _setting;
    private readonly PeakLanes _peaks;
    private readonly LaneWidth _width;
    private readonly bool _allEchoes;
    private readonly StartState _start;

    internal PredictionRun(
        Series series, CompiledSeries program, PredictionSetting setting, PeakLanes peaks, bool allEchoes, StartState start, LaneWidth width,
        SignalTable? reused = null)
    {
        (_series, _program, _setting, _peaks, _allEchoes, _start, _width) = (series, program, setting, peaks, allEchoes, start, width);
        var count = peaks.Lanes.Count;
        Signed = reused?.Signed ?? new double[count];
        Before = reused?.LongitudinalBeforeExcitation ?? new double[count];
        End = reused?.LongitudinalAtEnd ?? new double[count];
        Period = reused?.LongitudinalAtStart ?? new double[count];
        Samples = allEchoes ? new double[count * program.EchoTimes.Length] : [];
    }

    /// <summary>Signed signal at the effective echo, M0 = 1.</summary>
    internal double[] Signed { get; }

    /// <summary>Longitudinal magnetisation before the excitation.</summary>
    internal double[] Before { get; }

    /// <summary>Longitudinal magnetisation at the end of the readout.</summary>
    internal double[] End { get; }

    /// <summary>Longitudinal magnetisation at the start of the period; the quadrature component where transverse magnetisation crosses a repetition time.</summary>
    internal double[] Period { get; }

    /// <summary>Echo by echo, all lanes of one echo together.</summary>
    internal double[] Samples { get; }

    /// <summary>Quadrature component of each sample, as <see cref="Samples"/>; null where there is none.</summary>
    internal double[]? QuadratureSamples { get; private set; }

    internal void Run()
    {
        var lanes = _peaks.Lanes;
        var starAfterT2 = _program.DecaysWithT2Star && _program.Closure == Closure.Longitudinal && _series.Preparations.Any(p => p is T2Preparation);
        var t2 = _program.DecaysWithT2Star && _program.Closure != Closure.RfSpoiled && !starAfterT2 ? lanes.T2Star : lanes.T2;
        double[] columns = _program.Maps.Count == 0 ? [] : new double[2 * _program.Maps.Count * lanes.Count];
        MapColumns.Fill(_program, _series.Readout, _setting, _peaks, columns);
        fixed (double* t1 = lanes.T1, transverse = t2, b1 = lanes.B1Scale, maps = columns)
        fixed (double* signed = Signed, before = Before, end = End, period = Period, samples = Samples)
        {
            var arguments = new EngineArguments
            {
                Count = lanes.Count,
                T1 = t1,
                T2 = transverse,
                B1 = b1,
                Maps = maps,
                MapStride = lanes.Count,
                Start = _start,
                Dummies = _series.Timing.DummyRepetitions,
                Signed = signed,
                Before = before,
                End = end,
                Period = period,
                Samples = _allEchoes ? samples : null,
                SampleStride = lanes.Count,
            };
            if (_program.Closure == Closure.Longitudinal)
                Engine.Run(_program.Plan, _program.Durations, _program.Angles, arguments, _width);
            else
                RunCrossing(arguments);
        }

        if (starAfterT2)
            FromT2ToT2Star();
    }

    /// <summary>A T2 preparation refocuses, so it decays with T2; the gradient echoes after it decay with T2* from their pulse on.</summary>
    private void FromT2ToT2Star()
    {
        var count = _peaks.Lanes.Count;
        FromT2ToT2Star(_program.EchoTimes[_program.EffectiveEcho], Signed);
        for (var e = 0; e * count < Samples.Length; e++)
            FromT2ToT2Star(_program.EchoTimes[e], Samples.AsSpan(e * count, count));
    }

    private void RunCrossing(in EngineArguments arguments)
    {
        var lanes = _peaks.Lanes;
        var frequencies = new double[lanes.Count];
        for (var i = 0; i < frequencies.Length; i++)
            frequencies[i] = lanes.OffResonanceHz[i] + Proton.ShiftHz(_peaks.ShiftPpm?[i] ?? 0, _setting.FieldStrength);
        QuadratureSamples = _allEchoes ? new double[Samples.Length] : null;
        fixed (double* frequency = frequencies)
        {
            for (var e = _allEchoes ? _program.EchoTimes.Length - 1 : 0; e >= 0; e--)
            {
                CrossingRun.Run(_series.Readout, _program.EchoTimes[e], arguments, frequency, _width);
                if (_program.DecaysWithT2Star)
                {
                    FromT2ToT2Star(_program.EchoTimes[e], Signed);
                    FromT2ToT2Star(_program.EchoTimes[e], Period);
                }

                if (QuadratureSamples is null)
                    continue;
                Signed.CopyTo(Samples, e * lanes.Count);
                Period.CopyTo(QuadratureSamples, e * lanes.Count);
            }
        }
    }

    /// <summary>States that cross a repetition time dephase and rephase with T2; from the pulse to the echo of a spoiled gradient echo T2* counts, where it is known.</summary>
    private void FromT2ToT2Star(double echo, Span<double> column)
    {
        var lanes = _peaks.Lanes;
        for (var i = 0; i < column.Length; i++)
        {
            if (!double.IsNaN(lanes.T2Star[i]))
                column[i] *= Kernels.Elementary.Exp(echo * (1 / lanes.T2[i] - 1 / lanes.T2Star[i]));
        }
    }
}
