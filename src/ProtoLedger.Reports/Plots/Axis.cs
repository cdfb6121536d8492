using System.Globalization;

namespace ProtoLedger.Reports.Plots;

/// <summary>A linear axis between two pixel positions, with round ticks.</summary>
internal sealed class Axis
{
    private readonly double from;
    private readonly double to;

    /// <summary>Makes an axis that holds <paramref name="low"/> and <paramref name="high"/>, ends on ticks.</summary>
    public Axis(double low, double high, double from, double to, int aboutTicks = 6)
    {
        if (!double.IsFinite(low) || !double.IsFinite(high))
            throw new ArgumentException("A plot holds finite numbers only.", nameof(low));
        if (high - low < 1e-9 * Math.Max(1, Math.Abs(low)))
            (low, high) = (low - 0.5, high + 0.5);
        Step = RoundStep((high - low) / aboutTicks);
        Low = Math.Floor((low / Step) + 1e-9) * Step;
        High = Math.Ceiling((high / Step) - 1e-9) * Step;
        (this.from, this.to) = (from, to);
    }

    /// <summary>Value at the first end.</summary>
    public double Low { get; }

    /// <summary>Value at the last end.</summary>
    public double High { get; }

    private double Step { get; }

    /// <summary>Pixel position of a value.</summary>
    public double At(double value) => from + ((value - Low) / (High - Low) * (to - from));

    /// <summary>Values of the ticks with their labels.</summary>
    public IEnumerable<(double Value, string Label)> Ticks()
    {
        var decimals = Math.Max(0, -(int)Math.Floor(Math.Log10(Step) + 1e-9));
        var count = (int)Math.Round((High - Low) / Step);
        for (var i = 0; i <= count; i++)
        {
            var value = Low + (i * Step);
            var text = value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
            yield return (value, Math.Abs(value) < Step * 1e-6 ? "0" : text.Replace('-', '\u2212'));
        }
    }

    private static double RoundStep(double rough)
    {
        var power = Math.Pow(10, Math.Floor(Math.Log10(rough)));
        var rest = rough / power;
        return power * (rest <= 1.0001 ? 1 : rest <= 2.0001 ? 2 : rest <= 5.0001 ? 5 : 10);
    }
}
