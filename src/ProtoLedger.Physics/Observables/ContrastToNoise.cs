using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Observables;

/// <summary>Contrast-to-noise per root of scan time, relative: comparable only between series that are reconstructed in the same way.</summary>
public static class ContrastToNoise
{
    /// <summary>Contrast over relative noise over the root of the scan time, 1/√s in relative units.</summary>
    /// <param name="contrastDifference">Signal difference of the pair.</param>
    /// <param name="relativeNoise">Noise as <see cref="RelativeNoise"/> gives it, &gt; 0.</param>
    /// <param name="scanTimeSeconds">s, &gt; 0.</param>
    /// <remarks>Source: noise per root of sampling time, Macovski, MRM 1996;36:494 (from memory).</remarks>
    public static double PerRootTime(double contrastDifference, double relativeNoise, double scanTimeSeconds) =>
        contrastDifference / relativeNoise / Math.Sqrt(scanTimeSeconds);

    /// <summary>Why two series are not reconstructed in the same way, in words; null where their noise may be compared.</summary>
    /// <param name="first">One geometry.</param>
    /// <param name="second">The other.</param>
    /// <remarks>Geometry factor, homodyne steps and magnitude of multi-coil data change with these, and nothing here models them.</remarks>
    public static string? WhyNotComparable(SeriesGeometry first, SeriesGeometry second) =>
        first.Acceleration != second.Acceleration
            ? $"acceleration {first.Acceleration} against {second.Acceleration}: the geometry factor is unknown"
            : first.PartialFourier != second.PartialFourier
                ? $"partial Fourier {first.PartialFourier} against {second.PartialFourier}: the missing part is filled differently"
                : first.Dimensions != second.Dimensions
                    ? $"{first.Dimensions}D against {second.Dimensions}D: another transform"
                    : null;
}
