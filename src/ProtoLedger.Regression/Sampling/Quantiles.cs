namespace ProtoLedger.Regression.Sampling;

/// <summary>Quantiles of draws.</summary>
internal static class Quantiles
{
    internal const double Low = 0.05;
    internal const double High = 0.95;

    /// <summary>5 % and 95 % quantiles by linear interpolation between order statistics (Hyndman and Fan 1996, type 7).</summary>
    /// <param name="draws">n ≥ 1 values; they are sorted in place. NaN anywhere gives NaN.</param>
    internal static (double Low, double High) Interval(Span<double> draws)
    {
        draws.Sort();
        return double.IsNaN(draws[0]) ? (double.NaN, double.NaN) : (At(draws, Low), At(draws, High));
    }

    private static double At(ReadOnlySpan<double> sorted, double share)
    {
        var position = share * (sorted.Length - 1);
        var below = (int)position;
        return below + 1 >= sorted.Length ? sorted[^1] : sorted[below] + (position - below) * (sorted[below + 1] - sorted[below]);
    }
}
