using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;

namespace ProtoLedger.Physics.Tests.Observables;

/// <summary>b of gradient lobes and relaxivity; values computed apart from this program.</summary>
public sealed class DiffusionAndAgentCheckValuesTests
{
    /// <summary>b = γ²G²δ²(Δ − δ/3) of rectangular lobes, Stejskal, Tanner 1965 (from memory). The program integrates k(t)² instead.</summary>
    [Theory]
    [InlineData(40, 20, 40, 1526.79)]
    [InlineData(30, 25, 45, 1476.09)]
    [InlineData(45, 15, 35, 978.247)]
    public void Trapezoids_WithoutRamps_FollowStejskalAndTanner(double amplitude, double duration, double separation, double expected) =>
        Approximately.Relative(expected, BValue.Trapezoids(amplitude, duration, separation), 1e-5);

    /// <summary>b = γ²G²[δ²(Δ − δ/3) + ε³/30 − δε²/6] with ramps ε; textbook form (Bernstein, King, Zhou 2004, from memory).</summary>
    [Theory]
    [InlineData(60, 14, 32, 0.5)]
    [InlineData(40, 20, 40, 2)]
    [InlineData(25, 10, 30, 10)]
    public void Trapezoids_WithRamps_FollowTheTextbook(double amplitude, double duration, double separation, double ramp)
    {
        var (g, d, s, e) = (2 * Math.PI * 42.577478518e6 * amplitude * 1e-3, duration * 1e-3, separation * 1e-3, ramp * 1e-3);
        var expected = g * g * (d * d * (s - d / 3) + e * e * e / 30 - d * e * e / 6) * 1e-6;

        Approximately.Relative(expected, BValue.Trapezoids(amplitude, duration, separation, ramp), 1e-9);
    }

    /// <summary>PD exp(−TE/T2) exp(−b ADC) at TE 80, b 0 and 1000 (Stejskal, Tanner 1965): white and grey matter, facilitated and acute lesion, fluid.</summary>
    [Theory]
    [InlineData(0.70, 80, 0.70, 0.257516, 0.127878)]
    [InlineData(0.82, 100, 0.89, 0.368450, 0.151306)]
    [InlineData(0.85, 150, 1.2, 0.498649, 0.150190)]
    [InlineData(0.80, 110, 0.40, 0.386580, 0.259132)]
    [InlineData(1, 2000, 3.0, 0.960789, 0.0478349)]
    public void Signal_OfDiffusionWeighting(double density, double t2, double coefficient, double plain, double weighted)
    {
        var tissue = new Tissue("tissue", 900, t2, null, density, coefficient);

        Approximately.Relative(plain, DiffusionSignal(80, 0, tissue), 1e-5);
        Approximately.Relative(weighted, DiffusionSignal(80, 1000, tissue), 1e-5);
        Approximately.Relative(coefficient, Math.Log(DiffusionSignal(80, 0, tissue) / DiffusionSignal(80, 1000, tissue)), 1e-4);
    }

    /// <summary>Shine-through, equal density and coefficient, T2 150 against 80 ms: exp(TE (1/80 − 1/150)); evened out where b ΔADC is its logarithm.</summary>
    [Theory]
    [InlineData(80, 1.59467)]
    [InlineData(60, 1.41907)]
    public void Signal_OfLongT2_ShinesThrough(double echoTime, double expected)
    {
        var (bright, plain) = (new Tissue("bright", 900, 150, null, 0.8, 0.9), new Tissue("plain", 900, 80, null, 0.8, 0.9));

        Approximately.Relative(expected, DiffusionSignal(echoTime, 1000, bright) / DiffusionSignal(echoTime, 1000, plain), 1e-5);
        var faster = bright with { ApparentDiffusionCoefficient = 0.9 + Math.Log(expected) };
        Approximately.Relative(1, DiffusionSignal(echoTime, 1000, faster) / DiffusionSignal(echoTime, 1000, plain), 1e-5);
    }

    private static double DiffusionSignal(double echoTime, double b, Tissue tissue) => Signals.Signed(
        Signals.Of(new DiffusionSpinEcho(5000, echoTime, 90, 180, b)) with { Timing = new SeriesTiming(State: StartState.FirstShot) }, tissue);

    [Fact]
    public void Trapezoids_ThatOverlap_AreRefused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => BValue.Trapezoids(40, 20, 20.5, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => BValue.Trapezoids(40, 20, 60, 21));
    }

    /// <summary>1/T = 1/T₀ + r C; relaxivities of the kind seen in Szomolanyi et al. 2019 and Rohrer et al. 2005.</summary>
    [Theory]
    [InlineData(1200, 3.6, 0.1, 837.989)]
    [InlineData(1200, 3.6, 0.5, 379.747)]
    [InlineData(1200, 3.6, 1, 225.564)]
    [InlineData(1200, 3.6, 5, 53.0973)]
    [InlineData(100, 4.3, 0.1, 95.8773)]
    [InlineData(100, 4.3, 0.5, 82.3045)]
    [InlineData(100, 4.3, 1, 69.9301)]
    [InlineData(100, 4.3, 5, 31.7460)]
    [InlineData(1400, 3.5, 0.1, 939.597)]
    [InlineData(1400, 3.5, 0.5, 405.797)]
    [InlineData(1400, 3.5, 1, 237.288)]
    [InlineData(1400, 3.5, 5, 54.9020)]
    [InlineData(100, 4.9, 0.1, 95.3289)]
    [InlineData(100, 4.9, 0.5, 80.3213)]
    [InlineData(100, 4.9, 1, 67.1141)]
    [InlineData(100, 4.9, 5, 28.9855)]
    [InlineData(1441, 3.32, 0.1, 974.694)]
    [InlineData(1441, 3.32, 0.5, 424.816)]
    [InlineData(1441, 3.32, 1, 249.130)]
    [InlineData(1441, 3.32, 5, 57.8236)]
    [InlineData(1664, 3.00, 0.1, 1109.93)]
    [InlineData(1664, 3.00, 0.5, 475.973)]
    [InlineData(1664, 3.00, 1, 277.704)]
    [InlineData(1664, 3.00, 5, 64.0986)]
    public void Relaxivity_ShortensRelaxation(double time, double relaxivity, double concentration, double expected)
    {
        Approximately.Relative(expected, new Relaxivity(relaxivity, 1).T1(time, concentration), 1e-5);
        Approximately.Relative(expected, new Relaxivity(1, relaxivity).T2(time, concentration), 1e-5);
    }

    /// <summary>Generic values at the fields where they were estimated.</summary>
    [Theory]
    [InlineData(1.5, 3.8, 4.75)]
    [InlineData(3, 3.5, 5.075)]
    [InlineData(7, 3.2, 4.64)]
    public void Generic_AtTheFieldsOfItsSources(double field, double r1, double r2)
    {
        Approximately.Relative(r1, Relaxivity.Generic(field).R1, 1e-12);
        Approximately.Relative(r2, Relaxivity.Generic(field).R2, 1e-12);
    }

    /// <summary>At about 0.9 mmol/l a tissue of T1 1200 ms takes the T1 of fat: a null set for fat nulls it as well (consequence of the values above).</summary>
    [Fact]
    public void Enhance_AtNineTenthsOfAMillimole_GivesTissueTheT1OfFat()
    {
        var enhanced = new Relaxivity(3.6, 4.3).Enhance(new Tissue("tissue", 1200, 100, null, 0.8), 0.9);

        Approximately.Absolute(245, enhanced.T1, 1);
        Assert.Null(enhanced.T2Star);
    }
}
