using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Observables;

/// <summary>Effect of a gadolinium agent on relaxation: rates grow in proportion to concentration.</summary>
/// <param name="R1">Longitudinal, l/(mmol·s), &gt; 0.</param>
/// <param name="R2">Transverse, l/(mmol·s), &gt; 0.</param>
/// <remarks>1/T = 1/T₀ + r · C. Valid for fast water exchange and without T2* effects of compartments; they are left out.</remarks>
public readonly record struct Relaxivity(double R1, double R2)
{
    /// <summary>A macrocyclic agent in general: r1 3.8 (1.5 T), 3.5 (3 T), 3.2 (7 T); r2 1.25, 1.45 times r1.</summary>
    /// <param name="fieldStrength">T.</param>
    /// <remarks>
    /// Estimate over Szomolanyi et al., Invest Radiol 2019;54:559, Shen et al., Invest Radiol 2015;50:330 and Rohrer et al., Invest Radiol 2005;40:715,
    /// whose agents differ by ± 20 %; linear in field between those points and constant outside them.
    /// </remarks>
    public static Relaxivity Generic(double fieldStrength)
    {
        var r1 = fieldStrength <= 1.5 ? 3.8 : fieldStrength <= 3 ? 3.8 - 0.2 * (fieldStrength - 1.5) : Math.Max(3.2, 3.5 - 0.075 * (fieldStrength - 3));
        var ratio = fieldStrength <= 1.5 ? 1.25 : Math.Min(1.45, 1.25 + 0.2 / 1.5 * (fieldStrength - 1.5));
        return new Relaxivity(r1, ratio * r1);
    }

    /// <summary>T1 at a concentration, ms.</summary>
    /// <param name="t1">Without the agent, ms.</param>
    /// <param name="concentration">mmol/l, ≥ 0.</param>
    public double T1(double t1, double concentration) => 1 / (1 / t1 + R1 * concentration * 1e-3);

    /// <summary>T2 (or T2*) at a concentration, ms.</summary>
    /// <param name="t2">Without the agent, ms.</param>
    /// <param name="concentration">mmol/l, ≥ 0.</param>
    public double T2(double t2, double concentration) => 1 / (1 / t2 + R2 * concentration * 1e-3);

    /// <summary>A tissue with the agent in it.</summary>
    /// <param name="tissue">Without the agent.</param>
    /// <param name="concentration">mmol/l, ≥ 0.</param>
    public Tissue Enhance(Tissue tissue, double concentration)
    {
        ArgumentNullException.ThrowIfNull(tissue);
        return tissue with
        {
            T1 = T1(tissue.T1, concentration),
            T2 = T2(tissue.T2, concentration),
            T2Star = tissue.T2Star is { } t2Star ? T2(t2Star, concentration) : null,
        };
    }
}
