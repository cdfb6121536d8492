using System.Runtime.Intrinsics;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>How many lanes the engine takes at once. Results are equal to the bit.</summary>
internal enum LaneWidth
{
    /// <summary>The widest that the machine has.</summary>
    Machine,

    /// <summary>One: the scalar twin.</summary>
    Scalar,

    /// <summary>128-bit vectors.</summary>
    Two,

    /// <summary>256-bit vectors.</summary>
    Four,

    /// <summary>512-bit vectors.</summary>
    Eight,
}

/// <summary>Runs a resolved pulse program over lanes.</summary>
internal static unsafe class Engine
{
    /// <summary>Computes every lane.</summary>
    /// <param name="plan">The structure.</param>
    /// <param name="durations">ms, one a duration slot.</param>
    /// <param name="angles">Degrees at B1+ scale 1, one an angle slot at least.</param>
    /// <param name="arguments">Lanes and results; inputs must be valid (positive T1, T2, B1).</param>
    /// <param name="width">Lanes at once.</param>
    internal static void Run(
        ProgramPlan plan, ReadOnlySpan<double> durations, ReadOnlySpan<double> angles, in EngineArguments arguments, LaneWidth width = LaneWidth.Machine)
    {
        angles = angles[..plan.AngleCount];
        if (width == LaneWidth.Machine)
            width = Vector512.IsHardwareAccelerated ? LaneWidth.Eight : Vector256.IsHardwareAccelerated ? LaneWidth.Four
                : Vector128.IsHardwareAccelerated ? LaneWidth.Two : LaneWidth.Scalar;
        switch (width)
        {
            case LaneWidth.Eight:
                Run<Lanes8>(plan, durations, angles, arguments);
                break;
            case LaneWidth.Four:
                Run<Lanes4>(plan, durations, angles, arguments);
                break;
            case LaneWidth.Two:
                Run<Lanes2>(plan, durations, angles, arguments);
                break;
            default:
                Run<Lanes1>(plan, durations, angles, arguments);
                break;
        }
    }

    private static void Run<T>(ProgramPlan plan, ReadOnlySpan<double> durations, ReadOnlySpan<double> angles, in EngineArguments arguments)
        where T : unmanaged, ILanes<T>
    {
        Span<double> times = plan.Times.Length <= 128 ? stackalloc double[plan.Times.Length] : new double[plan.Times.Length];
        for (var i = 0; i < times.Length; i++)
            times[i] = plan.Times[i].Evaluate(durations);

        // Two groups of lanes at once: short trains are bound by latency.
        var lane = 0;
        for (; arguments.Count - lane > T.Width; lane += 2 * T.Width)
            RunBlock<LanePair<T>>(plan, times, angles, arguments, lane);
        if (lane < arguments.Count)
            RunBlock<T>(plan, times, angles, arguments, lane);
    }

    private static void RunBlock<T>(ProgramPlan plan, ReadOnlySpan<double> times, ReadOnlySpan<double> angles, in EngineArguments arguments, int lane)
        where T : unmanaged, ILanes<T>
    {
        if (lane + T.Width <= arguments.Count)
            LaneBlock<T>.Run(plan, times, angles, arguments, lane);
        else
            RunTail<T>(plan, times, angles, arguments, lane);
    }

    /// <summary>The last lanes, filled up with copies of the last one to a whole block.</summary>
    private static void RunTail<T>(ProgramPlan plan, ReadOnlySpan<double> times, ReadOnlySpan<double> angles, in EngineArguments arguments, int first)
        where T : unmanaged, ILanes<T>
    {
        var used = arguments.Count - first;
        var width = T.Width;
        var samples = arguments.Samples == null ? 0 : plan.SampleCount;
        var size = (7 + 2 * plan.MapCount + samples) * width;
        Span<double> memory = size <= 512 ? stackalloc double[size] : new double[size];
        fixed (double* start = memory)
        {
            var next = start;
            var tail = arguments;
            tail.Count = width;
            tail.T1 = Fill(arguments.T1 + first, used, width, ref next);
            tail.T2 = Fill(arguments.T2 + first, used, width, ref next);
            tail.B1 = Fill(arguments.B1 + first, used, width, ref next);
            tail.Maps = next;
            tail.MapStride = width;
            for (var i = 0; i < 2 * plan.MapCount; i++)
                Fill(arguments.Maps + (long)i * arguments.MapStride + first, used, width, ref next);
            tail.Signed = Reserve(width, ref next);
            tail.Before = Reserve(width, ref next);
            tail.End = Reserve(width, ref next);
            tail.Period = Reserve(width, ref next);
            tail.Samples = samples == 0 ? null : next;
            tail.SampleStride = width;
            LaneBlock<T>.Run(plan, times, angles, tail, 0);
            for (var i = 0; i < used; i++)
            {
                arguments.Signed[first + i] = tail.Signed[i];
                arguments.Before[first + i] = tail.Before[i];
                arguments.End[first + i] = tail.End[i];
                arguments.Period[first + i] = tail.Period[i];
                for (var s = 0; s < samples; s++)
                    arguments.Samples[(long)s * arguments.SampleStride + first + i] = tail.Samples[s * width + i];
            }
        }
    }

    private static double* Fill(double* source, int used, int width, ref double* next)
    {
        var column = Reserve(width, ref next);
        for (var i = 0; i < width; i++)
            column[i] = source[Math.Min(i, used - 1)];
        return column;
    }

    private static double* Reserve(int width, ref double* next)
    {
        var column = next;
        next += width;
        return column;
    }
}
