using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Cosine and sine of kδ, the same for all lanes.</summary>
internal sealed class SpoilingPhases
{
    /// <summary>Cut-off order over T2/TR: exp(−2 · 20) is below 10⁻¹⁷.</summary>
    internal const double OrdersPerRatio = 20;

    /// <summary>Highest order that is ever computed; reached only where T2 exceeds 5,000 repetition times.</summary>
    internal const int Limit = 100_000;

    private readonly double[] _cosine;
    private readonly double[] _sine;

    /// <summary>Prepares the phases.</summary>
    /// <param name="incrementDegrees">δ.</param>
    /// <param name="repetition">TR, ms.</param>
    /// <param name="longestT2">ms.</param>
    internal SpoilingPhases(double incrementDegrees, double repetition, double longestT2)
    {
        Highest = (int)Math.Min(Limit, Math.Max(4, Math.Ceiling(OrdersPerRatio * longestT2 / repetition) + 1));
        _cosine = new double[2 * Highest];
        _sine = new double[2 * Highest];
        for (var k = 0; k < _cosine.Length; k++)
        {
            var angle = Math.IEEERemainder(k * incrementDegrees, 360) * (Math.PI / 180);
            (_cosine[k], _sine[k]) = (Elementary.Cos(angle), Elementary.Sin(angle));
        }
    }

    /// <summary>Cut-off order.</summary>
    internal int Highest { get; }

    internal Complex<T> At<T>(int order)
        where T : unmanaged, ILanes<T> => new(T.All(_cosine[order]), T.All(_sine[order]));
}
