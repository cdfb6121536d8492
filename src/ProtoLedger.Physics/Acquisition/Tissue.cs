namespace ProtoLedger.Physics.Acquisition;

/// <summary>Relaxation, water content and diffusion of one tissue at one field strength.</summary>
/// <param name="Name">Name as in the catalogue.</param>
/// <param name="T1">ms, &gt; 0.</param>
/// <param name="T2">ms, &gt; 0, ≤ 2 · T1.</param>
/// <param name="T2Star">ms, &gt; 0; null where it is unknown: a gradient echo then refuses the tissue.</param>
/// <param name="ProtonDensity">Relative to cerebrospinal fluid, &gt; 0.</param>
/// <param name="ApparentDiffusionCoefficient">10⁻³ mm²/s, ≥ 0; null where it is unknown.</param>
/// <param name="IsFat">True for a tissue whose signal comes from the six-peak fat spectrum.</param>
public sealed record Tissue(
    string Name, double T1, double T2, double? T2Star, double ProtonDensity, double? ApparentDiffusionCoefficient = null, bool IsFat = false);

/// <summary>One point of the fields that a voxel can meet.</summary>
/// <param name="B1Scale">Actual over nominal flip angle, &gt; 0; 1 is nominal.</param>
/// <param name="OffResonanceHz">Hz; 0 is on resonance.</param>
/// <param name="UnpreparedInflow">Fraction, in [0, 1], of spins that missed the preparations.</param>
public sealed record FieldPoint(double B1Scale = 1, double OffResonanceHz = 0, double UnpreparedInflow = 0);
