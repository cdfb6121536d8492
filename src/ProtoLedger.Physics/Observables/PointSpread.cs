using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Observables;

/// <summary>Width of the point-spread function along the phase-encoding direction of an echo train.</summary>
/// <remarks>Source: Constable, Gore, MRM 1992;28:9 (from memory). Without decay the width is 1.2067 pixels, that of |sinc|.</remarks>
public static class PointSpread
{
    /// <summary>Full width at half height of |PSF|, pixels, ≥ 0.</summary>
    /// <param name="weights">Non-negative weight of each line of k-space in order, from one edge to the other; n ≥ 2.</param>
    /// <exception cref="ArgumentException">Fewer than two lines, or no weight at all.</exception>
    public static double Width(ReadOnlySpan<double> weights)
    {
        if (weights.Length < 2)
            throw new ArgumentException($"{weights.Length} lines of k-space; a width needs at least 2.", nameof(weights));
        var half = Magnitude(weights, 0) / 2;
        if (!(half > 0))
            throw new ArgumentException("The lines of k-space have no weight.", nameof(weights));

        // Weights are real, so |PSF| is even, and non-negative, so its maximum is at 0.
        const double Step = 0.05;
        var outside = Step;
        while (Magnitude(weights, outside) > half && outside < weights.Length / 2.0)
            outside += Step;
        var inside = outside - Step;
        for (var i = 0; i < 36; i++)
        {
            var middle = (inside + outside) / 2;
            if (Magnitude(weights, middle) > half)
                inside = middle;
            else
                outside = middle;
        }

        return 2 * inside;
    }

    /// <summary>Weights of a train that decays with T2 over the whole of k-space.</summary>
    /// <param name="lines">Number of lines, ≥ 2.</param>
    /// <param name="trainDuration">Linear: from the first line to the last; centre-out: from the centre to the edge. ms.</param>
    /// <param name="t2">ms.</param>
    /// <param name="centreOut">Whether both halves start at the centre.</param>
    public static double[] Decay(int lines, double trainDuration, double t2, bool centreOut)
    {
        var weights = new double[lines];
        for (var k = 0; k < lines; k++)
        {
            var part = centreOut ? Math.Abs(k - lines / 2) / (lines / 2.0) : k / (double)lines;
            weights[k] = Elementary.Exp(-part * trainDuration / t2);
        }

        return weights;
    }

    /// <summary>Weights of the lines of k-space from the echoes of a train.</summary>
    /// <param name="echoes">Signal of each echo in order; n ≥ 1, magnitudes are used.</param>
    /// <param name="effective">Number, from 0, of the echo that fills the centre.</param>
    /// <param name="lines">Number of lines, ≥ 2.</param>
    /// <remarks>
    /// A document does not say in which order echoes fill k-space; assumed: linear where the effective echo is the middle one (within one echo),
    /// otherwise outward from the centre on both sides, the effective echo first and the others by their distance in time from it (common practice, no source).
    /// </remarks>
    public static double[] FromTrain(ReadOnlySpan<double> echoes, int effective, int lines)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(effective);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(effective, echoes.Length);
        var weights = new double[lines];
        var linear = Math.Abs(effective - (echoes.Length - 1) / 2.0) <= 1;
        var outward = Enumerable.Range(0, echoes.Length).OrderBy(e => Math.Abs(e - effective)).ThenBy(e => e).ToArray();
        for (var k = 0; k < lines; k++)
        {
            var block = linear
                ? k * echoes.Length / lines
                : outward[Math.Min(echoes.Length - 1, (int)(Math.Abs(k + 0.5 - lines / 2.0) * 2 * echoes.Length / lines))];
            weights[k] = Math.Abs(echoes[block]);
        }

        return weights;
    }

    private static double Magnitude(ReadOnlySpan<double> weights, double x)
    {
        // The phase factor turns by the same angle from line to line.
        var angle = 2 * Math.PI * x / weights.Length;
        var (cosine, sine) = (Elementary.Cos(angle), Elementary.Sin(angle));
        double real = 0, imaginary = 0, phaseReal = 1, phaseImaginary = 0;
        foreach (var weight in weights)
        {
            real += weight * phaseReal;
            imaginary += weight * phaseImaginary;
            (phaseReal, phaseImaginary) = (phaseReal * cosine - phaseImaginary * sine, phaseReal * sine + phaseImaginary * cosine);
        }

        return Math.Sqrt(real * real + imaginary * imaginary);
    }
}
