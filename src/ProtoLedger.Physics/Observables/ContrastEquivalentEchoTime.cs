using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Observables;

/// <summary>Echo time of a plain spin echo that would show the same T2 contrast as an echo of a train with reduced refocusing angles.</summary>
public static class ContrastEquivalentEchoTime
{
    /// <summary>−T2 · ln(S / S₀), ms, with S₀ the same echo of the same train without relaxation.</summary>
    /// <param name="signal">Echo with T1 and T2, &gt; 0.</param>
    /// <param name="signalWithoutRelaxation">The same echo from the same longitudinal magnetisation with T1 and T2 infinite, ≥ <paramref name="signal"/>.</param>
    /// <param name="t2">ms, &gt; 0.</param>
    /// <remarks>
    /// Source: Busse, Hariharan, Vu, Brittain, MRM 2006;55:1030 (from memory). With 180° refocusing it is the echo time exactly;
    /// below, magnetisation rests along z for part of the train and the equivalent time is shorter. Depends on T1/T2, weakly.
    /// </remarks>
    public static double Of(double signal, double signalWithoutRelaxation, double t2) => -t2 * Elementary.Log(Math.Abs(signal / signalWithoutRelaxation));
}
