using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.OdeSolvers;
using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Tests.Pulses;

/// <summary>
/// The Bloch equation written from its source (Bloch, Phys Rev 1946;70:460) and integrated by MathNet's Runge-Kutta solver, in the frame of the carrier:
/// a sweep is a phase of the pulse here, while the product follows the sweep. Shapes are written from the definitions in the reference files.
/// </summary>
internal static class BlochOde
{
    /// <summary>Magnetisation after the pulse.</summary>
    public static Vector<double> Run(RfPulse pulse, double b1Scale, double offResonanceHz, double t1, double t2, double[] start, double equilibrium, int steps = 12_000)
    {
        if (pulse is SampledPulse samples)
            return Samples(samples, b1Scale, offResonanceHz, t1, t2, start, equilibrium);
        var (duration, field) = Field(pulse);
        return Integrate(duration, field, b1Scale, offResonanceHz, t1, t2, start, equilibrium, steps);
    }

    /// <summary>One sample after the other, so that no step of the solver crosses a jump.</summary>
    private static Vector<double> Samples(SampledPulse pulse, double b1Scale, double offResonanceHz, double t1, double t2, double[] start, double equilibrium)
    {
        var m = start;
        for (var k = 0; k < pulse.AmplitudeHz.Count; k++)
        {
            var phase = pulse.PhaseDegrees[k] * Math.PI / 180;
            var (x, y) = (pulse.AmplitudeHz[k] * Math.Cos(phase), pulse.AmplitudeHz[k] * Math.Sin(phase));
            m = [.. Integrate(pulse.Duration / 1e3 / pulse.AmplitudeHz.Count, _ => (x, y), b1Scale, offResonanceHz, t1, t2, m, equilibrium, 2000)];
        }

        return Vector<double>.Build.Dense(m);
    }

    private static Vector<double> Integrate(
        double duration, Func<double, (double X, double Y)> field, double b1Scale, double offResonanceHz, double t1, double t2, double[] start, double equilibrium, int steps)
    {
        var precession = 2 * Math.PI * offResonanceHz;
        Vector<double> Derivative(double t, Vector<double> m)
        {
            var (x, y) = field(t);
            var (wx, wy) = (2 * Math.PI * b1Scale * x, 2 * Math.PI * b1Scale * y);
            return Vector<double>.Build.Dense(
            [
                wy * m[2] - precession * m[1] - m[0] * 1e3 / t2,
                precession * m[0] - wx * m[2] - m[1] * 1e3 / t2,
                wx * m[1] - wy * m[0] - (m[2] - equilibrium) * 1e3 / t1,
            ]);
        }

        return RungeKutta.FourthOrder(Vector<double>.Build.Dense(start), -duration / 2, duration / 2, steps + 1, Derivative)[^1];
    }

    /// <summary>Duration in seconds, and the field in Hz about x and y over time from the middle of the pulse.</summary>
    private static (double Duration, Func<double, (double X, double Y)> Field) Field(RfPulse pulse)
    {
        switch (pulse)
        {
            case HardPulse p:
                var length = p.Duration / 1e3;
                return (length, _ => (p.FlipAngle / 360 / length, 0));
            case WindowedSincPulse p:
                return ByArea(p.Duration / 1e3, p.FlipAngle, x => (0.54 + 0.46 * Math.Cos(2 * Math.PI * x)) * MathNet.Numerics.Trig.Sinc(p.TimeBandwidth * x));
            case GaussianPulse p:
                return ByArea(p.Duration / 1e3, p.FlipAngle, x => Math.Exp(-x * x / 2 / p.SigmaFraction / p.SigmaFraction));
            case HyperbolicSecantPulse p:
                return (p.Duration / 1e3, t =>
                {
                    var amplitude = p.PeakB1Hz / Math.Cosh(p.Beta * t);
                    var phase = -p.Mu * Math.Log(Math.Cosh(p.Beta * t));
                    return (amplitude * Math.Cos(phase), amplitude * Math.Sin(phase));
                });
            default:
                throw new ArgumentException(pulse.Name);
        }
    }

    private static (double, Func<double, (double, double)>) ByArea(double duration, double flipAngle, Func<double, double> envelope)
    {
        var area = MathNet.Numerics.Integration.GaussLegendreRule.Integrate(envelope, -0.5, 0.5, 256) * duration;
        return (duration, t => (flipAngle / 360 / area * envelope(t / duration), 0));
    }
}
