using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Prediction;

/// <summary>Inversion times at which the signed signal vanishes, by root finding on the engine itself.</summary>
public static class NullTimes
{
    /// <summary>Finds, lane by lane, the inversion time of one preparation that nulls the signal while everything else, the repetition time included, stays.</summary>
    /// <param name="series">The series.</param>
    /// <param name="preparation">Index of an <see cref="Inversion"/> or <see cref="SpectralInversion"/> among the preparations.</param>
    /// <param name="setting">Field strength and treatment of pulses.</param>
    /// <param name="lanes">The lanes.</param>
    /// <returns>ms, to 10⁻⁶ ms, one value a lane, in the document's meaning of that inversion time; null where no time that fits nulls the lane.</returns>
    /// <exception cref="ArgumentException">The index does not name an inversion, or as <see cref="SignalPredictor.Predict"/>.</exception>
    public static double?[] Find(Series series, int preparation, PredictionSetting setting, LaneTable lanes) =>
        throw new NotSupportedException("The engine is being built.");

    /// <summary>Finds the pair of inversion times of a double inversion that nulls two tissues at once.</summary>
    /// <param name="series">A series with exactly two inversions.</param>
    /// <param name="setting">Field strength and treatment of pulses.</param>
    /// <param name="lanes">Two lanes, one for each tissue.</param>
    /// <returns>Intervals first to second inversion and second inversion to excitation, ms; null where there is no such pair.</returns>
    /// <exception cref="ArgumentException">Not two inversions or not two lanes, or as <see cref="SignalPredictor.Predict"/>.</exception>
    public static NullPair? FindPair(Series series, PredictionSetting setting, LaneTable lanes) =>
        throw new NotSupportedException("The engine is being built.");
}

/// <summary>Two intervals that null two tissues.</summary>
/// <param name="FirstToSecond">First to second inversion centre, ms.</param>
/// <param name="SecondToExcitation">Second inversion centre to excitation centre, ms.</param>
public sealed record NullPair(double FirstToSecond, double SecondToExcitation);
