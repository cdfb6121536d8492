namespace ProtoLedger.Physics.Prediction;

/// <summary>Predicted signals, lane for lane.</summary>
/// <remarks>
/// All values are proton density times a fraction of M0; with proton density 1 they are in units of M0.
/// Signed is the component along the direction into which an excitation of +z is tipped, in the frame of water on resonance at the same place:
/// negative after an inversion that has not recovered through zero, and for fat in opposed phase.
/// </remarks>
public sealed class SignalTable
{
    private Func<IReadOnlyList<Assumption>> _assume;
    private IReadOnlyList<Assumption>? _assumptions;

    /// <summary>Makes a table that <see cref="SignalPredictor.PredictInto"/> fills again and again.</summary>
    /// <param name="count">Number of lanes, ≥ 0.</param>
    public SignalTable(int count)
        : this(count, [], () => [])
    {
    }

    internal SignalTable(int count, IReadOnlyList<double> echoTimes, Func<IReadOnlyList<Assumption>> assume)
        : this(new double[count], new double[count], new double[count], new double[count], echoTimes, assume)
    {
    }

    /// <summary>Takes the columns over; nothing is copied.</summary>
    internal SignalTable(
        double[] signed, double[] before, double[] end, double[] start, IReadOnlyList<double> echoTimes, Func<IReadOnlyList<Assumption>> assume)
    {
        Count = signed.Length;
        Signed = signed;
        Magnitude = new double[Count];
        LongitudinalBeforeExcitation = before;
        LongitudinalAtEnd = end;
        LongitudinalAtStart = start;
        EchoTimes = echoTimes;
        Echoes = new double[Count * echoTimes.Count];
        EchoMagnitudes = new double[Count * echoTimes.Count];
        _assume = assume;
    }

    internal void Assume(Func<IReadOnlyList<Assumption>> assume) => (_assume, _assumptions) = (assume, null);

    internal void CopyFrom(SignalTable other)
    {
        other.Signed.CopyTo(Signed, 0);
        other.Magnitude.CopyTo(Magnitude, 0);
        other.LongitudinalBeforeExcitation.CopyTo(LongitudinalBeforeExcitation, 0);
        other.LongitudinalAtEnd.CopyTo(LongitudinalAtEnd, 0);
        other.LongitudinalAtStart.CopyTo(LongitudinalAtStart, 0);
        Assume(other._assume);
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
