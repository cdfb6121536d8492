namespace ProtoLedger.Physics.Observables;

/// <summary>Signal of a voxel that holds several tissues.</summary>
public static class PartialVolume
{
    /// <summary>Sum of fraction · signed signal: tissues of opposite sign cancel before the magnitude is taken. |result| is the brightness of a magnitude image.</summary>
    /// <param name="fractions">n volume fractions in [0, 1] that add up to 1 (within 10⁻⁹).</param>
    /// <param name="signed">n signed signals of the tissues alone, as <see cref="Prediction.SignalTable.Signed"/> gives them.</param>
    /// <exception cref="ArgumentException">Lengths differ, or the fractions are no fractions.</exception>
    /// <remarks>Linear superposition of magnetisation (derived). Exchange between the tissues is left out.</remarks>
    public static double Mix(ReadOnlySpan<double> fractions, ReadOnlySpan<double> signed)
    {
        if (fractions.Length != signed.Length)
            throw new ArgumentException($"{fractions.Length} fractions for {signed.Length} tissues.", nameof(fractions));
        double sum = 0, total = 0;
        for (var i = 0; i < fractions.Length; i++)
        {
            if (!(fractions[i] is >= 0 and <= 1))
                throw new ArgumentException($"Fraction {i} is {fractions[i]}; it must lie in [0, 1].", nameof(fractions));
            sum += fractions[i] * signed[i];
            total += fractions[i];
        }

        return Math.Abs(total - 1) <= 1e-9 ? sum : throw new ArgumentException($"The fractions add up to {total}, not to 1.", nameof(fractions));
    }
}
