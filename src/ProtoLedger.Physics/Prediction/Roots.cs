namespace ProtoLedger.Physics.Prediction;

/// <summary>Root of a continuous function between two points of opposite sign.</summary>
internal static class Roots
{
    private const double Tolerance = 1e-8;
    private const int MostSteps = 200;

    /// <summary>Regula falsi in the Illinois form, with a bisection whenever three steps did not halve the bracket; ends at a bracket of 10⁻⁸.</summary>
    /// <remarks>Source: Dowell, Jarratt, BIT 1971;11:168 (from memory).</remarks>
    internal static double Find(Func<double, double> function, double low, double atLow, double high, double atHigh)
    {
        if (atLow == 0)
            return low;
        if (atHigh == 0)
            return high;
        var (width, slow, side) = (high - low, 0, 0);
        for (var step = 0; step < MostSteps && high - low > Tolerance; step++)
        {
            var middle = slow >= 3 ? (low + high) / 2 : high - atHigh * (high - low) / (atHigh - atLow);
            if (!(middle > low && middle < high))
                middle = (low + high) / 2;
            var value = function(middle);
            if (value == 0)
                return middle;
            if (value > 0 == atHigh > 0)
            {
                (high, atHigh) = (middle, value);
                atLow = side == 1 ? atLow / 2 : atLow;
                side = 1;
            }
            else
            {
                (low, atLow) = (middle, value);
                atHigh = side == -1 ? atHigh / 2 : atHigh;
                side = -1;
            }

            slow = high - low > width / 2 ? slow + 1 : 0;
            width = slow == 0 ? high - low : width;
        }

        return (low + high) / 2;
    }
}
