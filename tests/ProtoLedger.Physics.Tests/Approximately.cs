namespace ProtoLedger.Physics.Tests;

/// <summary>Comparison of numbers with a stated tolerance.</summary>
internal static class Approximately
{
    /// <summary>Fails unless |actual − expected| ≤ tolerance · |expected|.</summary>
    public static void Relative(double expected, double actual, double tolerance) =>
        Assert.True(
            Math.Abs(actual - expected) <= tolerance * Math.Abs(expected),
            $"{actual:r} instead of {expected:r}, off by {Math.Abs(actual / expected - 1):e2}, allowed {tolerance:e2}");

    /// <summary>Fails unless |actual − expected| ≤ tolerance.</summary>
    public static void Absolute(double expected, double actual, double tolerance) =>
        Assert.True(
            Math.Abs(actual - expected) <= tolerance,
            $"{actual:r} instead of {expected:r}, off by {Math.Abs(actual - expected):e2}, allowed {tolerance:e2}");
}
