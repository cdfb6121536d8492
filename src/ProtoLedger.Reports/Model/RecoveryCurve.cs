namespace ProtoLedger.Reports.Model;

/// <summary>Longitudinal magnetisation of the tissues after the inversion, before and after the edit.</summary>
/// <param name="ScannerId">Scanner.</param>
/// <param name="SeriesTitle">Series.</param>
/// <param name="InversionTimeBefore">ms from inversion to excitation; null without an inversion.</param>
/// <param name="InversionTimeAfter">ms; null without an inversion.</param>
/// <param name="Tissues">At least one tissue.</param>
public sealed record RecoveryCurve(
    string ScannerId,
    string SeriesTitle,
    double? InversionTimeBefore,
    double? InversionTimeAfter,
    IReadOnlyList<TissueRecovery> Tissues);

/// <summary>One tissue of a recovery plot.</summary>
/// <param name="Tissue">In plain words.</param>
/// <param name="NullBefore">Time at which it crosses zero, ms; null where it does not.</param>
/// <param name="NullAfter">The same after the edit.</param>
/// <param name="Before">Curve of the base version, in order of time; empty without an inversion.</param>
/// <param name="After">Curve of the proposal.</param>
public sealed record TissueRecovery(
    string Tissue,
    double? NullBefore,
    double? NullAfter,
    IReadOnlyList<CurvePoint> Before,
    IReadOnlyList<CurvePoint> After);

/// <summary>A point of a recovery curve.</summary>
/// <param name="Time">ms since the inversion.</param>
/// <param name="Longitudinal">Longitudinal magnetisation over equilibrium, in [−1, 1].</param>
public readonly record struct CurvePoint(double Time, double Longitudinal);
