namespace ProtoLedger.Physics.Acquisition;

/// <summary>One imaging series as the scanner plays it: any number of preparations, one readout, its timing over slices and its geometry.</summary>
/// <param name="Preparations">In the order in which they are played; empty where there is none.</param>
/// <param name="Readout">What samples the echo.</param>
/// <param name="Timing">How slices share the repetition time.</param>
/// <param name="Geometry">What the voxel and the sampling are.</param>
/// <remarks>Times are in ms, angles in degrees, frequencies in Hz, lengths in mm. Any preparation goes with any readout.</remarks>
public sealed record Series(
    IReadOnlyList<Preparation> Preparations,
    Readout Readout,
    SeriesTiming Timing,
    SeriesGeometry Geometry);

/// <summary>How the slices of a series share a repetition time.</summary>
/// <param name="Slices">Number of slices (2D) or of partitions of the slab (3D), ≥ 1.</param>
/// <param name="SliceOrder">Order of excitation.</param>
/// <param name="Concatenations">Number of passes over which the slices are spread, ≥ 1; scan time grows with it.</param>
/// <param name="DummyRepetitions">Repetitions played before the first one that is sampled, ≥ 0.</param>
/// <param name="Trigger">What starts a repetition.</param>
/// <param name="HeartRate">Beats a minute, lowest and highest, for a triggered series; both 0 otherwise.</param>
/// <param name="State">From which state the prediction starts.</param>
public sealed record SeriesTiming(
    int Slices = 1,
    SliceOrder SliceOrder = SliceOrder.Interleaved,
    int Concatenations = 1,
    int DummyRepetitions = 0,
    SeriesTrigger Trigger = SeriesTrigger.None,
    RateRange HeartRate = default,
    StartState State = StartState.Steady);

/// <summary>A closed range of rates, 1/min.</summary>
/// <param name="Low">Lowest rate.</param>
/// <param name="High">Highest rate, ≥ <paramref name="Low"/>.</param>
public readonly record struct RateRange(double Low, double High);

/// <summary>Order in which slices are excited.</summary>
public enum SliceOrder
{
    /// <summary>Every second slice first, then the others.</summary>
    Interleaved,

    /// <summary>One after the other, from the first.</summary>
    Ascending,

    /// <summary>One after the other, from the last.</summary>
    Descending,
}

/// <summary>What starts a repetition.</summary>
public enum SeriesTrigger
{
    /// <summary>The clock of the sequence: the repetition time is what the document says.</summary>
    None,

    /// <summary>The heart: the repetition time is a whole number of beats.</summary>
    Cardiac,

    /// <summary>Breathing: the repetition time is a breath.</summary>
    Respiratory,
}

/// <summary>The state in which a prediction finds the magnetisation.</summary>
public enum StartState
{
    /// <summary>After so many repetitions that nothing changes any more.</summary>
    Steady,

    /// <summary>The first repetition after rest, longitudinal magnetisation at equilibrium.</summary>
    FirstShot,

    /// <summary>After the dummy repetitions of the series, from equilibrium.</summary>
    AfterDummies,
}

/// <summary>Voxel, sampling and reconstruction of a series.</summary>
/// <param name="Dimensions">2 or 3.</param>
/// <param name="FieldOfViewRead">mm, &gt; 0.</param>
/// <param name="FieldOfViewPhase">mm, &gt; 0.</param>
/// <param name="MatrixRead">Points along the read direction, ≥ 1.</param>
/// <param name="MatrixPhase">Phase-encoding steps of the full matrix, ≥ 1.</param>
/// <param name="SliceThickness">mm, &gt; 0.</param>
/// <param name="SliceGap">Edge to edge, mm, ≥ 0.</param>
/// <param name="NumberOfAverages">≥ 1.</param>
/// <param name="PixelBandwidth">Hz per pixel, &gt; 0.</param>
/// <param name="Acceleration">Parallel reduction factor in plane, ≥ 1.</param>
/// <param name="PartialFourier">Fraction of phase-encoding steps taken, in [0.5, 1].</param>
/// <param name="PhaseDirection">Phase-encoding direction in the image.</param>
public sealed record SeriesGeometry(
    int Dimensions = 2,
    double FieldOfViewRead = 230,
    double FieldOfViewPhase = 230,
    int MatrixRead = 256,
    int MatrixPhase = 256,
    double SliceThickness = 5,
    double SliceGap = 0,
    double NumberOfAverages = 1,
    double PixelBandwidth = 200,
    double Acceleration = 1,
    double PartialFourier = 1,
    PhaseDirection PhaseDirection = PhaseDirection.Row);

/// <summary>In-plane phase-encoding direction, words of the DICOM attribute InPlanePhaseEncodingDirection.</summary>
public enum PhaseDirection
{
    /// <summary>Along image rows.</summary>
    Row,

    /// <summary>Along image columns.</summary>
    Column,
}
