using System.Runtime.Intrinsics;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Runs the gradient echoes whose transverse magnetisation crosses the repetition time over lanes.</summary>
internal static unsafe class CrossingRun
{
    /// <summary>Computes every lane at one echo time.</summary>
    /// <param name="readout">A balanced gradient echo, or a spoiled one with a phase increment.</param>
    /// <param name="echo">Echo time, ms.</param>
    /// <param name="arguments">Lanes and results; <see cref="EngineArguments.Period"/> takes the component across the tipped direction.</param>
    /// <param name="offResonanceHz">Off-resonance of each lane, chemical shift included.</param>
    /// <param name="width">Lanes at once.</param>
    internal static void Run(
        Readout readout, double echo, in EngineArguments arguments, double* offResonanceHz, LaneWidth width = LaneWidth.Machine)
    {
        var phases = readout is SpoiledGradientEcho { SpoilingIncrement: { } increment }
            ? new SpoilingPhases(increment, readout.RepetitionTime, Longest(arguments))
            : null;
        if (width == LaneWidth.Eight || (width == LaneWidth.Machine && Vector512.IsHardwareAccelerated))
            Run<Lanes8>(readout, echo, phases, arguments, offResonanceHz);
        else if (width == LaneWidth.Four || (width == LaneWidth.Machine && Vector256.IsHardwareAccelerated))
            Run<Lanes4>(readout, echo, phases, arguments, offResonanceHz);
        else if (width == LaneWidth.Two || (width == LaneWidth.Machine && Vector128.IsHardwareAccelerated))
            Run<Lanes2>(readout, echo, phases, arguments, offResonanceHz);
        else
            Run<Lanes1>(readout, echo, phases, arguments, offResonanceHz);
    }

    private static double Longest(in EngineArguments arguments)
    {
        var longest = 0.0;
        for (var i = 0; i < arguments.Count; i++)
            longest = Math.Max(longest, arguments.T2[i]);
        return longest;
    }

    private static void Run<T>(Readout readout, double echo, SpoilingPhases? phases, in EngineArguments arguments, double* offResonanceHz)
        where T : unmanaged, ILanes<T>
    {
        var lane = 0;
        for (; lane <= arguments.Count - T.Width; lane += T.Width)
            Block<T>(readout, echo, phases, arguments, offResonanceHz, lane);
        for (; lane < arguments.Count; lane++)
            Block<Lanes1>(readout, echo, phases, arguments, offResonanceHz, lane);
    }

    private static void Block<T>(Readout readout, double echo, SpoilingPhases? phases, in EngineArguments arguments, double* offResonanceHz, int lane)
        where T : unmanaged, ILanes<T>
    {
        var rate1 = T.All(1) / T.Load(arguments.T1 + lane);
        var rate2 = T.All(1) / T.Load(arguments.T2 + lane);
        var b1 = T.Load(arguments.B1 + lane);
        var signal = phases is null
            ? BalancedState<T>.Solve(
                readout.RepetitionTime, echo, readout.ExcitationFlipAngle, rate1, rate2, b1, T.Load(offResonanceHz + lane) * T.All(1e-3))
            : RfSpoiledState<T>.Solve(readout.RepetitionTime, echo, readout.ExcitationFlipAngle, phases, rate1, rate2, b1);
        T.Store(signal.Signed, arguments.Signed + lane);
        T.Store(signal.Quadrature, arguments.Period + lane);
        T.Store(signal.Before, arguments.Before + lane);
        T.Store(signal.End, arguments.End + lane);
    }
}
