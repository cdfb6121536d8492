namespace ProtoLedger.Physics.Acquisition;

/// <summary>A radio-frequency pulse, as a shape whose response is integrated or as a measured efficiency.</summary>
/// <param name="Name">Name by which documents refer to it, and by which reports state it.</param>
public abstract record RfPulse(string Name);

/// <summary>An inversion known by what it achieves: longitudinal magnetisation M becomes −f · M.</summary>
/// <param name="Name">Name of the model.</param>
/// <param name="Efficiency">f in [0, 1]; 1 is a perfect inversion. Not scaled by B1+.</param>
/// <param name="EfficiencySd">Standard deviation of f between patients, ≥ 0.</param>
public sealed record EfficiencyInversion(string Name, double Efficiency, double EfficiencySd = 0) : RfPulse(Name)
{
    /// <summary>Default of every document that names no inversion pulse: adiabatic, f = 0.96 ± 0.02.</summary>
    /// <remarks>f: Marques et al., NeuroImage 2010;49:1271 (quoted from memory); the SD covers 0.92 to 1.00, common practice, no source.</remarks>
    public static EfficiencyInversion Default { get; } = new("adiabatic", 0.96, 0.02);

    /// <summary>A perfect inversion, for comparison with textbook values only.</summary>
    public static EfficiencyInversion Perfect { get; } = new("perfect", 1);
}

/// <summary>Rectangular pulse of constant phase.</summary>
/// <param name="Name">Name.</param>
/// <param name="FlipAngle">Degrees at B1+ scale 1.</param>
/// <param name="Duration">ms, ≥ 0; 0 is an instantaneous rotation.</param>
public sealed record HardPulse(string Name, double FlipAngle, double Duration = 0) : RfPulse(Name);

/// <summary>Hamming-windowed sinc: (0.54 + 0.46 cos(2πt/T)) sinc(TBW · t/T) over |t| ≤ T/2, scaled by area to the flip angle.</summary>
/// <param name="Name">Name.</param>
/// <param name="FlipAngle">Degrees at B1+ scale 1, by pulse area.</param>
/// <param name="Duration">T, ms, &gt; 0.</param>
/// <param name="TimeBandwidth">TBW, no unit, &gt; 0; nominal bandwidth is TBW/T.</param>
public sealed record WindowedSincPulse(string Name, double FlipAngle, double Duration, double TimeBandwidth) : RfPulse(Name);

/// <summary>Gaussian exp(−t²/2s²), truncated at ±T/2, scaled by area to the flip angle.</summary>
/// <param name="Name">Name.</param>
/// <param name="FlipAngle">Degrees at B1+ scale 1.</param>
/// <param name="Duration">T, ms, &gt; 0.</param>
/// <param name="SigmaFraction">s/T, in (0, 0.5].</param>
public sealed record GaussianPulse(string Name, double FlipAngle, double Duration, double SigmaFraction) : RfPulse(Name);

/// <summary>Hyperbolic secant: amplitude peak · sech(βt), frequency −(μβ/2π) tanh(βt).</summary>
/// <param name="Name">Name.</param>
/// <param name="Duration">ms, &gt; 0.</param>
/// <param name="Beta">β, rad/s, &gt; 0.</param>
/// <param name="Mu">μ, no unit, &gt; 0.</param>
/// <param name="PeakB1Hz">Peak amplitude γB1/2π at B1+ scale 1, Hz, &gt; 0.</param>
public sealed record HyperbolicSecantPulse(string Name, double Duration, double Beta, double Mu, double PeakB1Hz) : RfPulse(Name);

/// <summary>A pulse given by samples of equal duration.</summary>
/// <param name="Name">Name.</param>
/// <param name="Duration">Of the whole pulse, ms, &gt; 0.</param>
/// <param name="AmplitudeHz">γB1/2π of each sample, Hz; n ≥ 1 values.</param>
/// <param name="PhaseDegrees">Phase of each sample; n values.</param>
public sealed record SampledPulse(string Name, double Duration, IReadOnlyList<double> AmplitudeHz, IReadOnlyList<double> PhaseDegrees) : RfPulse(Name);
