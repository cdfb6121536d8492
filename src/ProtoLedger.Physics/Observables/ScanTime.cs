using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Observables;

/// <summary>Scan time: number of repetitions times repetition time.</summary>
public static class ScanTime
{
    /// <summary>Scan time, s, dummy repetitions and concatenations counted, at the set repetition time.</summary>
    /// <param name="series">The series.</param>
    /// <returns>s, &gt; 0.</returns>
    public static double Seconds(Series series)
    {
        ArgumentNullException.ThrowIfNull(series);
        return Repetitions(series) * series.Readout.RepetitionTime / 1000;
    }

    /// <summary>Shortest and longest scan time over the rates that trigger the series, s.</summary>
    /// <param name="series">The series.</param>
    public static (double Shortest, double Longest) Range(Series series)
    {
        var (shortest, longest) = RepetitionPeriod.Range(series);
        var repetitions = Repetitions(series);
        return (repetitions * shortest / 1000, repetitions * longest / 1000);
    }

    /// <summary>Repetition times from the first pulse to the last.</summary>
    /// <param name="series">The series.</param>
    /// <remarks>
    /// Encodings over those of one repetition, rounded up, times averages, plus dummy repetitions, times concatenations (2D). Encodings of a 3D series:
    /// phase steps times partitions. One repetition of an echo train or of a gradient-echo train fills a train of encodings; a diffusion-weighted series is
    /// taken as single shot (common practice, no source). Source: arithmetic of "TR times the number of TRs", teaching texts.
    /// </remarks>
    public static double Repetitions(Series series)
    {
        ArgumentNullException.ThrowIfNull(series);
        var (geometry, timing) = (series.Geometry, series.Timing);
        var lines = geometry.MatrixPhase * geometry.PartialFourier / geometry.Acceleration;
        var encodings = geometry.Dimensions == 3 ? lines * timing.Slices : lines;
        var each = series.Readout switch
        {
            EchoTrain train => train.EchoTrainLength,
            SpoiledGradientEchoTrain train => train.ReadoutTrainLength,
            DiffusionSpinEcho => encodings,
            _ => 1.0,
        };

        // The quotient of two decimals may miss a whole number by its last bit.
        var shots = Math.Ceiling(encodings / each - 1e-9);
        return (shots * geometry.NumberOfAverages + timing.DummyRepetitions) * (geometry.Dimensions == 3 ? 1 : timing.Concatenations);
    }
}
