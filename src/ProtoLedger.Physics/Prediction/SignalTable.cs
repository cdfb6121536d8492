namespace ProtoLedger.Physics.Prediction;

/// <summary>Predicted signals, lane for lane.</summary>
/// <remarks>
/// All values are proton density times a fraction of M0; with proton density 1 they are in units of M0.
/// Signed is the component along the direction into which an excitation of +z is tipped, in the frame of water on resonance at the same place:
/// negative after an inversion that has not recovered through zero, and for fat in opposed phase.
/// </remarks>
public sealed class SignalTable
{
    private readonly Func<IReadOnlyList<Assumption>> _assume;
    private IReadOnlyList<Assumption>? _assumptions;

    internal SignalTable(int count, IReadOnlyList<double> echoTimes, Func<IReadOnlyList<Assumption>> assume)
    {
        Count = count;
        Signed = new double[count];
        Magnitude = new double[count];
        LongitudinalBeforeExcitation = new double[count];
        LongitudinalAtEnd = new double[count];
        EchoTimes = echoTimes;
        LongitudinalAtStart = new double[count];
        Echoes = new double[count * echoTimes.Count];
        EchoMagnitudes = new double[count * echoTimes.Count];
        _assume = assume;
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

    /// <summary>Longitudinal magnetisation at the start of a repetition, before its first pulse, in units of M0.</summary>
    public double[] LongitudinalAtStart { get; }

    /// <summary>Times of the columns of <see cref="Echoes"/> after the excitation, ms; empty unless echoes were asked for.</summary>
    public IReadOnlyList<double> EchoTimes { get; }

    /// <summary>Signed signal of every echo: echo e of lane i is at i · <see cref="EchoTimes"/>.Count + e.</summary>
    public double[] Echoes { get; }

    /// <summary>Magnitude of every echo, in the order of <see cref="Echoes"/>.</summary>
    public double[] EchoMagnitudes { get; }

    /// <summary>What the prediction takes for granted.</summary>
    public IReadOnlyList<Assumption> Assumptions => _assumptions ??= _assume();
}
