using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Observables;

/// <summary>Noise relative to the signal of a unit of tissue: 1 / (voxel volume · √sampling time).</summary>
public static class RelativeNoise
{
    /// <summary>Noise over signal, 1/(mm³·√s), to be compared between series on one scanner and coil only.</summary>
    /// <param name="geometry">Voxel and sampling.</param>
    /// <param name="partitions">Encodings along the third dimension of a 3D series; 1 for 2D.</param>
    /// <param name="geometryFactor">g of parallel imaging, ≥ 1; unknown to a document, so 1 is a stated assumption.</param>
    /// <remarks>
    /// g / (V √(N_phase N_partition averages partial / (R · Hz per pixel))). Sources: Edelstein et al., MRM 1986;3:604; Macovski, MRM 1996;36:494;
    /// g/√R: Pruessmann et al., MRM 1999;42:952 (all from memory). Points along the readout enter through voxel and Hz per pixel only.
    /// </remarks>
    public static double Of(SeriesGeometry geometry, int partitions = 1, double geometryFactor = 1)
    {
        ArgumentNullException.ThrowIfNull(geometry);
        var voxel = geometry.FieldOfViewRead / geometry.MatrixRead * (geometry.FieldOfViewPhase / geometry.MatrixPhase) * geometry.SliceThickness;
        var encodings = geometry.MatrixPhase * geometry.PartialFourier / geometry.Acceleration * (geometry.Dimensions == 3 ? partitions : 1);
        return geometryFactor / (voxel * Math.Sqrt(encodings * geometry.NumberOfAverages / geometry.PixelBandwidth));
    }

    /// <summary>Noise of a series, over signal.</summary>
    /// <param name="series">The series.</param>
    /// <param name="geometryFactor">As in the other form.</param>
    public static double Of(Series series, double geometryFactor = 1)
    {
        ArgumentNullException.ThrowIfNull(series);
        return Of(series.Geometry, series.Timing.Slices, geometryFactor);
    }
}
