namespace ProtoLedger.Physics.Prediction;

/// <summary>Predicted signals, lane for lane.</summary>
/// <remarks>
/// All values are proton density times a fraction of M0; with proton density 1 they are in units of M0.
/// Signed is the component along the direction into which an excitation of +z is tipped, in the frame of water on resonance at the same place:
/// negative after an inversion that has not recovered through zero, and for fat in opposed phase.
/// </remarks>
public sealed class SignalTable
{
    internal SignalTable(int count, int echoCount, IReadOnlyList<double> echoTimes, IReadOnlyList<Assumption> assumptions)
    {
        Count = count;
        Signed = new double[count];
        Magnitude = new double[count];
        LongitudinalBeforeExcitation = new double[count];
        LongitudinalAtEnd = new double[count];
        EchoTimes = echoTimes;
        Echoes = new double[count * echoCount];
        EchoMagnitudes = new double[count * echoCount];
        Assumptions = assumptions;
    }

    /// <summary>Number of lanes.</summary>
    public int Count { get; }

    /// <summary>Signed signal at the effective echo; |value| ≤ proton density.</summary>
    public double[] Signed { get; }

    /// <summary>Magnitude of the signal at the effective echo, ≥ 0.</summary>
    public double[] Magnitude { get; }

    /// <summary>Longitudinal magnetisation immediately before the excitation of the effective echo, in units of M0 (not weighted by proton density), in [−1, 1].</summary>
    public double[] LongitudinalBeforeExcitation { get; }

    /// <summary>Longitudinal magnetisation at the end of the readout (after the last echo, or after the flip-back), in units of M0.</summary>
    public double[] LongitudinalAtEnd { get; }

    /// <summary>Times of the columns of <see cref="Echoes"/> after the excitation, ms; empty unless echoes were asked for.</summary>
    public IReadOnlyList<double> EchoTimes { get; }

    /// <summary>Signed signal of every echo: echo e of lane i is at i · <see cref="EchoTimes"/>.Count + e.</summary>
    public double[] Echoes { get; }

    /// <summary>Magnitude of every echo, in the order of <see cref="Echoes"/>.</summary>
    public double[] EchoMagnitudes { get; }

    /// <summary>What the prediction takes for granted.</summary>
    public IReadOnlyList<Assumption> Assumptions { get; }
}
