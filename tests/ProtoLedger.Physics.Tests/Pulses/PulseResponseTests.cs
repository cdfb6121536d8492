using System.Numerics;
using CsCheck;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Tests.Pulses;

public sealed class PulseResponseTests
{
    private static readonly Dictionary<string, RfPulse> Shapes = new()
    {
        ["hard"] = new HardPulse("hard", 180, 0.5),
        ["windowed sinc"] = new WindowedSincPulse("windowed sinc", 180, 4, 4),
        ["gaussian"] = new GaussianPulse("gaussian", 105, 8, 1 / 6.0),
        ["hyperbolic secant"] = new HyperbolicSecantPulse("hyperbolic secant", 10, 800, 4.9, 600),
        ["sampled"] = new SampledPulse("sampled", 3, [120, 300, 480, 250, 90], [0, 30, 75, -60, 10]),
    };

    public static TheoryData<string, double, double> Cases => new(
        from shape in Shapes.Keys
        from point in new[] { (1.0, 0.0), (0.8, 130.0), (1.2, -260.0), (1.0, 900.0) }
        select new TheoryDataRow<string, double, double>(shape, point.Item1, point.Item2));

    /// <summary>Tolerance: the solver's own error at its step, below 1e-8 where the field is smooth.</summary>
    [Theory]
    [MemberData(nameof(Cases))]
    public void Longitudinal_AgainstRungeKutta_Agrees(string shape, double b1Scale, double offResonanceHz)
    {
        var oracle = BlochOde.Run(Shapes[shape], b1Scale, offResonanceHz, double.PositiveInfinity, double.PositiveInfinity, [0, 0, 1], 0);

        Approximately.Absolute(oracle[2], Multiplier(Shapes[shape], b1Scale, offResonanceHz), 1e-6);
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void Longitudinal_WithRelaxation_AgreesWithRungeKutta(string shape, double b1Scale, double offResonanceHz)
    {
        var kept = BlochOde.Run(Shapes[shape], b1Scale, offResonanceHz, 300, 12, [0, 0, 1], 0);
        var grown = BlochOde.Run(Shapes[shape], b1Scale, offResonanceHz, 300, 12, [0, 0, 0], 1);

        var map = Map(Shapes[shape], b1Scale, offResonanceHz, 300, 12);

        Approximately.Absolute(kept[2], map.Multiplier, 1e-6);
        Approximately.Absolute(grown[2], map.Recovery, 1e-6);
    }

    /// <summary>M+ → (a*)² M+ − b² (M+)* + 2 a* b Mz against the three columns of the integrated rotation.</summary>
    [Theory]
    [MemberData(nameof(Cases))]
    public void Rotation_AgainstRungeKutta_TurnsEveryDirectionAlike(string shape, double b1Scale, double offResonanceHz)
    {
        double ar = 0, ai = 0, br = 0, bi = 0;
        PulseResponse.Rotation(
            Shapes[shape], [b1Scale], [offResonanceHz], new CayleyKleinLanes(new(ref ar), new(ref ai), new(ref br), new(ref bi)));
        var (a, b) = (new Complex(ar, ai), new Complex(br, bi));

        // The carrier frame of the solver has the pulse's phase at its first instant as that of the sweep.
        var edge = Shapes[shape] is HyperbolicSecantPulse p ? -p.Mu * Math.Log(Math.Cosh(p.Beta * p.Duration / 2000)) : 0;
        b *= Complex.FromPolarCoordinates(1, edge);
        foreach (double[] start in new double[][] { [1, 0, 0], [0, 1, 0], [0, 0, 1] })
        {
            var end = BlochOde.Run(Shapes[shape], b1Scale, offResonanceHz, double.PositiveInfinity, double.PositiveInfinity, start, 0);
            var before = new Complex(start[0], start[1]);
            var after = Complex.Conjugate(a) * Complex.Conjugate(a) * before - b * b * Complex.Conjugate(before) + 2 * Complex.Conjugate(a) * b * start[2];
            Approximately.Absolute(end[0], after.Real, 1e-6);
            Approximately.Absolute(end[1], after.Imaginary, 1e-6);
            Approximately.Absolute(end[2], (Complex.Abs(a) * Complex.Abs(a) - Complex.Abs(b) * Complex.Abs(b)) * start[2] - 2 * (a * b * Complex.Conjugate(before)).Real, 1e-6);
        }
    }

    [Fact]
    public void Rotation_AnyPulse_IsUnitary() =>
        Gen.Select(Gen.Int[0, Shapes.Count - 1].Select(i => Shapes.Values.ElementAt(i)), Gen.Double[0, 2], Gen.Double[-5000, 5000]).Sample((pulse, b1, offResonance) =>
        {
            double ar = 0, ai = 0, br = 0, bi = 0;
            PulseResponse.Rotation(pulse, [b1], [offResonance], new CayleyKleinLanes(new(ref ar), new(ref ai), new(ref br), new(ref bi)));
            return Math.Abs(ar * ar + ai * ai + br * br + bi * bi - 1) < 1e-11;
        }, iter: 200);

    /// <summary>Samples far finer than the product's steps, each constant, stand for the limit of the sinc.</summary>
    [Fact]
    public void Steps_AgainstTwentyThousandSamples_AreCloserThanTwoThousand()
    {
        var exact = new WindowedSincPulse("sinc", 180, 2.56, 4);
        var offResonance = new[] { 0.0, 350, 800, 1400 };
        var (fine, coarse) = (Sampled(exact, 20_000), Sampled(exact, 2_000));
        for (var i = 0; i < offResonance.Length; i++)
        {
            var limit = Multiplier(fine, 1, offResonance[i]);
            Approximately.Absolute(limit, Multiplier(exact, 1, offResonance[i]), 2e-8);
            Approximately.Absolute(limit, Multiplier(coarse, 1, offResonance[i]), 5e-5);
        }
    }

    [Fact]
    public void Longitudinal_EfficiencyInversion_IgnoresTheFields()
    {
        var multiplier = new double[2];
        PulseResponse.Longitudinal(EfficiencyInversion.Default, [0.5, 1.2], [0, 2000], multiplier);

        Assert.Equal([-0.96, -0.96], multiplier);
    }

    [Fact]
    public void Longitudinal_InstantaneousHardPulse_IsACosine()
    {
        var map = Map(new HardPulse("instant", 120), 0.9, 500, 300, 12);

        Approximately.Absolute(Math.Cos(108 * Math.PI / 180), map.Multiplier, 1e-14);
        Assert.Equal(0, map.Recovery);
    }

    /// <summary>Rabi: Mz = 1 − 2 (ω₁/Ω)² sin²(ΩT/2) for a constant field (Rabi, Phys Rev 1937;51:652, from memory).</summary>
    [Theory]
    [InlineData(0)]
    [InlineData(333)]
    [InlineData(-1700)]
    public void Longitudinal_HardPulse_FollowsRabi(double offResonanceHz)
    {
        var field = 180 / 360.0 / 0.5e-3;
        var turn = Math.Sqrt(field * field + offResonanceHz * offResonanceHz);
        var sine = Math.Sin(Math.PI * turn * 0.5e-3);

        Approximately.Absolute(1 - 2 * field * field / (turn * turn) * sine * sine, Multiplier(Shapes["hard"], 1, offResonanceHz), 1e-12);
    }

    /// <summary>0 to 35 lanes cover full blocks of eight, parts of them and their borders.</summary>
    [Fact]
    public void Longitudinal_AnyNumberOfLanes_GivesTheBitsOfOneLane()
    {
        for (var n = 0; n <= 35; n++)
        {
            var b1 = Enumerable.Range(0, n).Select(i => 0.7 + 0.02 * i).ToArray();
            var offResonance = Enumerable.Range(0, n).Select(i => -400.0 + 31 * i).ToArray();
            var t1 = Enumerable.Range(0, n).Select(i => 200.0 + 90 * i).ToArray();
            var t2 = Enumerable.Range(0, n).Select(i => 20.0 + 7 * i).ToArray();
            var (rotated, kept, grown) = (new double[n], new double[n], new double[n]);
            PulseResponse.Longitudinal(Shapes["sampled"], b1, offResonance, rotated);
            PulseResponse.Longitudinal(Shapes["sampled"], b1, offResonance, t1, t2, kept, grown);
            for (var i = 0; i < n; i++)
            {
                Assert.Equal(Multiplier(Shapes["sampled"], b1[i], offResonance[i]), rotated[i]);
                Assert.Equal(Map(Shapes["sampled"], b1[i], offResonance[i], t1[i], t2[i]), new LongitudinalMap(kept[i], grown[i]));
            }
        }
    }

    /// <summary>Many lanes at one point of the fields share integrations; each of them alone is integrated by itself.</summary>
    [Theory]
    [InlineData("gaussian", 1, 0)]
    [InlineData("gaussian", 0.8, 90)]
    [InlineData("windowed sinc", 1.2, -300)]
    [InlineData("hyperbolic secant", 1, 500)]
    [InlineData("hard", 1, 1500)]
    public void Longitudinal_ManyTissuesAtOnePoint_AreWithinTheBound(string shape, double b1Scale, double offResonanceHz)
    {
        const int Count = 300;
        double[] Filled(double value) => [.. Enumerable.Repeat(value, Count)];
        var duration = Shapes[shape] switch { GaussianPulse p => p.Duration, WindowedSincPulse p => p.Duration, HyperbolicSecantPulse p => p.Duration, _ => 0.5 };

        // Over the whole domain, and a few tissues outside it.
        var t1 = Enumerable.Range(0, Count).Select(i => duration / 0.21 * Math.Exp(5.0 * (i % 17) / 16)).ToArray();
        var t2 = Enumerable.Range(0, Count).Select(i => Math.Min(2 * t1[i], duration / 2.1 * Math.Exp(6.0 * (i % 19) / 18))).ToArray();
        var (multiplier, recovery) = (new double[Count], new double[Count]);

        PulseResponse.Longitudinal(Shapes[shape], Filled(b1Scale), Filled(offResonanceHz), t1, t2, multiplier, recovery);

        for (var i = 0; i < Count; i++)
        {
            var alone = Map(Shapes[shape], b1Scale, offResonanceHz, t1[i], t2[i]);
            Approximately.Absolute(alone.Multiplier, multiplier[i], 1e-10);
            Approximately.Absolute(alone.Recovery, recovery[i], 1e-10);
        }
    }

    [Fact]
    public void Longitudinal_ValuesOutsideTheRange_AreNamed()
    {
        var offResonance = Assert.Throws<ArgumentOutOfRangeException>(() => Multiplier(Shapes["hard"], 1, 20_001));
        var scale = Assert.Throws<ArgumentOutOfRangeException>(() => Multiplier(Shapes["hard"], double.NaN, 0));
        var lanes = Assert.Throws<ArgumentException>(() => PulseResponse.Longitudinal(Shapes["hard"], [1, 1], [0], new double[2]));

        Assert.Contains("20000", offResonance.Message, StringComparison.Ordinal);
        Assert.Contains("0 to 4", scale.Message, StringComparison.Ordinal);
        Assert.Contains("2 B1+ scales, 1 off-resonances", lanes.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Rotation_OfAPulseWithoutShape_IsRefused() =>
        Assert.Throws<ArgumentException>(() =>
            PulseResponse.Rotation(EfficiencyInversion.Default, [1], [0], new CayleyKleinLanes(new double[1], new double[1], new double[1], new double[1])));

    private static SampledPulse Sampled(WindowedSincPulse pulse, int samples)
    {
        var amplitude = new double[samples];
        for (var k = 0; k < samples; k++)
        {
            var x = (k + 0.5) / samples - 0.5;
            amplitude[k] = (0.54 + 0.46 * Math.Cos(2 * Math.PI * x)) * MathNet.Numerics.Trig.Sinc(pulse.TimeBandwidth * x);
        }

        var scale = pulse.FlipAngle / 360 / (amplitude.Average() * pulse.Duration / 1000);
        return new SampledPulse("sampled sinc", pulse.Duration, [.. amplitude.Select(a => a * scale)], new double[samples]);
    }

    private static double Multiplier(RfPulse pulse, double b1Scale, double offResonanceHz)
    {
        double result = 0;
        PulseResponse.Longitudinal(pulse, [b1Scale], [offResonanceHz], new Span<double>(ref result));
        return result;
    }

    private static LongitudinalMap Map(RfPulse pulse, double b1Scale, double offResonanceHz, double t1, double t2)
    {
        double multiplier = 0, recovery = 0;
        PulseResponse.Longitudinal(pulse, [b1Scale], [offResonanceHz], [t1], [t2], new Span<double>(ref multiplier), new Span<double>(ref recovery));
        return new LongitudinalMap(multiplier, recovery);
    }
}
