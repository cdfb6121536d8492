using System.Collections.Concurrent;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Pulses;

/// <summary>
/// What a pulse does to Mz at one B1+ scale and off-resonance, as a function of T1 and T2: polynomial through integrated values at Chebyshev nodes of the two rates.
/// Many tissues and draws that meet one point of the fields then share a few integrations.
/// </summary>
/// <remarks>
/// Both values are entire functions of the rates, so the polynomial converges faster than any power; its distance from the integration is below 10⁻¹⁰ (tested).
/// Domain: pulse length over T1 up to 0.2, over T2 up to 2. Source of the method: Trefethen, Approximation Theory and Approximation Practice, 2013 (from memory).
/// </remarks>
internal sealed class RelaxationSurface
{
    /// <summary>Lanes at one point of the fields from which a surface costs less than an integration each.</summary>
    public const int FewestLanes = 64;

    private const double LargestOverT1 = 0.2;
    private const double LargestOverT2 = 2;
    private const int NodesT1 = 6;
    private const int NodesT2 = 14;
    private const int Capacity = 16_384;
    private static readonly ConcurrentDictionary<(RfPulse, double, double), RelaxationSurface> Known = new();

    private readonly double duration;
    private readonly double[] kept;
    private readonly double[] grown;

    private RelaxationSurface(PulseSteps steps, double b1Scale, double offResonanceHz)
    {
        duration = steps.DurationMs;
        const int Count = NodesT1 * NodesT2;
        var (b1, frequency, t1, t2) = (new double[Count], new double[Count], new double[Count], new double[Count]);
        (kept, grown) = (new double[Count], new double[Count]);
        Array.Fill(b1, b1Scale);
        Array.Fill(frequency, offResonanceHz);
        for (var k = 0; k < Count; k++)
        {
            t1[k] = duration / (LargestOverT1 / 2 * (1 + Node(k / NodesT2, NodesT1)));
            t2[k] = duration / (LargestOverT2 / 2 * (1 + Node(k % NodesT2, NodesT2)));
        }

        RelaxingKernel.Run(steps, b1, frequency, t1, t2, kept, grown);
        ToCoefficients(kept);
        ToCoefficients(grown);
    }

    /// <summary>Whether a tissue lies in the domain.</summary>
    public static bool Covers(PulseSteps steps, double t1, double t2) =>
        steps.DurationMs <= LargestOverT1 * t1 && steps.DurationMs <= LargestOverT2 * t2;

    /// <summary>Surface of a pulse at a point of the fields; kept for the next call; all are forgotten when they become too many.</summary>
    public static RelaxationSurface Of(RfPulse pulse, double b1Scale, double offResonanceHz)
    {
        var key = (pulse, b1Scale, offResonanceHz);
        if (Known.TryGetValue(key, out var surface))
            return surface;
        surface = new RelaxationSurface(PulseSteps.Of(pulse), b1Scale, offResonanceHz);
        if (Known.Count >= Capacity)
            Known.Clear();
        Known.TryAdd(key, surface);
        return surface;
    }

    /// <summary>Mz → Multiplier · Mz + Recovery for one tissue in the domain.</summary>
    public LongitudinalMap At(double t1, double t2)
    {
        var x = duration / t1 * (2 / LargestOverT1) - 1;
        var y = duration / t2 * (2 / LargestOverT2) - 1;
        return new LongitudinalMap(Sum(kept, x, y), Sum(grown, x, y));
    }

    private static double Node(int k, int count) => Elementary.Cos(Math.PI * (k + 0.5) / count);

    /// <summary>Values at the nodes to coefficients of T_i(x) T_j(y), in place.</summary>
    private static void ToCoefficients(double[] values)
    {
        Transform(values, NodesT1, NodesT2, NodesT2, 1);
        Transform(values, NodesT2, 1, NodesT1, NodesT2);
    }

    /// <param name="values">All values.</param>
    /// <param name="count">Values of one row.</param>
    /// <param name="stride">From one value of a row to the next.</param>
    /// <param name="rows">Number of rows.</param>
    /// <param name="rowStride">From one row to the next.</param>
    private static void Transform(double[] values, int count, int stride, int rows, int rowStride)
    {
        var coefficients = new double[count];
        for (var row = 0; row < rows; row++)
        {
            for (var i = 0; i < count; i++)
            {
                double sum = 0;
                for (var k = 0; k < count; k++)
                    sum += values[row * rowStride + k * stride] * Elementary.Cos(Math.PI * i * (k + 0.5) / count);
                coefficients[i] = sum * (i == 0 ? 1.0 : 2.0) / count;
            }

            for (var i = 0; i < count; i++)
                values[row * rowStride + i * stride] = coefficients[i];
        }
    }

    /// <summary>Clenshaw's recurrence along y inside that along x.</summary>
    private static double Sum(double[] coefficients, double x, double y)
    {
        double next = 0, afterNext = 0;
        for (var i = NodesT1 - 1; i > 0; i--)
            (next, afterNext) = (Row(coefficients, i, y) + 2 * x * next - afterNext, next);
        return Row(coefficients, 0, y) + x * next - afterNext;
    }

    private static double Row(double[] coefficients, int row, double y)
    {
        double next = 0, afterNext = 0;
        for (var j = NodesT2 - 1; j > 0; j--)
            (next, afterNext) = (coefficients[row * NodesT2 + j] + 2 * y * next - afterNext, next);
        return coefficients[row * NodesT2] + y * next - afterNext;
    }
}
