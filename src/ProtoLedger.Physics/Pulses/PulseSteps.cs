using System.Runtime.CompilerServices;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Pulses;

/// <summary>
/// A pulse cut into steps of equal duration, in radians a step at B1+ scale 1, in the frame that follows its frequency sweep.
/// In step k a lane of B1+ scale s and precession w a step turns about (s·X, s·(Y + w·Slope), w − Sweep).
/// </summary>
/// <remarks>
/// Magnus expansion of fourth order at the two Gauss points (Iserles, Nørsett, Phil Trans R Soc A 1999;357:983; Blanes et al., Phys Rep 2009;470:151;
/// formula from memory, order shown by the tests): Ω = h/2 (ω₁ + ω₂) − √3/12 h² ω₁ × ω₂.
/// At a quarter of the steps it is far closer to the limit than sampling at mid-step.
/// </remarks>
internal sealed class PulseSteps
{
    private const int FewestSteps = 512;
    private const double LongestStepMs = 0.01;
    private const double LargestTurn = 0.25;
    private static readonly ConditionalWeakTable<RfPulse, PulseSteps> Known = [];

    private PulseSteps(double durationMs, int count)
    {
        StepMs = durationMs / count;
        X = new double[count];
        Y = new double[count];
        Slope = new double[count];
        Sweep = new double[count];
    }

    /// <summary>Duration of one step, ms.</summary>
    public double StepMs { get; }

    /// <summary>∫ (γ̄B1)² dt, Hz²·s.</summary>
    public double Energy { get; private set; }

    /// <summary>Duration of the pulse, ms.</summary>
    public double DurationMs => StepMs * X.Length;

    /// <summary>Turn about x, rad.</summary>
    public double[] X { get; }

    /// <summary>Turn about y, rad.</summary>
    public double[] Y { get; }

    /// <summary>Turn about y per radian of precession of the lane in one step.</summary>
    public double[] Slope { get; }

    /// <summary>Advance of the sweep, rad.</summary>
    public double[] Sweep { get; }

    /// <summary>Steps of a shaped pulse of finite length; made once for each pulse object.</summary>
    public static PulseSteps Of(RfPulse pulse) => Known.GetValue(pulse, Make);

    private static PulseSteps Make(RfPulse pulse) => pulse switch
    {
        HardPulse p => ByArea(p.Duration, p.FlipAngle, static _ => 1, 16),
        WindowedSincPulse p => ByArea(p.Duration, p.FlipAngle, x => (0.54 + 0.46 * Elementary.Cos(2 * Math.PI * x)) * Sinc(p.TimeBandwidth * x), FewestSteps),
        GaussianPulse p => ByArea(p.Duration, p.FlipAngle, x => Elementary.Exp(-x * x / (2 * p.SigmaFraction * p.SigmaFraction)), FewestSteps),
        HyperbolicSecantPulse p => Secant(p),
        SampledPulse p => Samples(p),
        _ => throw new ArgumentException($"Pulse '{pulse.Name}' of kind {pulse.GetType().Name} has no shape to integrate.", nameof(pulse)),
    };

    /// <summary>Envelope over x = t/T in [−½, ½], scaled so that its area is the flip angle.</summary>
    private static PulseSteps ByArea(double durationMs, double flipAngle, Func<double, double> envelope, int fewest)
    {
        var count = Count(durationMs, fewest);
        double area = 0, largest = 0;
        foreach (var (_, first, second) in GaussPoints(count))
        {
            var (e1, e2) = (envelope(first), envelope(second));
            area += (e1 + e2) / (2 * count);
            largest = Math.Max(largest, Math.Max(Math.Abs(e1), Math.Abs(e2)));
        }

        // Hz at B1+ scale 1: 360° · ∫ b1 dt is the flip angle.
        var scale = flipAngle / 360 / (area * durationMs * 1e-3);
        return FromShape(durationMs, Count(durationMs, count, scale * largest), x => scale * envelope(x), static _ => 0);
    }

    private static PulseSteps Secant(HyperbolicSecantPulse p)
    {
        var half = p.Beta * p.Duration * 1e-3;
        var sweepHz = p.Mu * p.Beta / (2 * Math.PI);
        return FromShape(
            p.Duration,
            Count(p.Duration, FewestSteps, p.PeakB1Hz + sweepHz),
            x => p.PeakB1Hz * Sech(half * x),
            x => -sweepHz * Tanh(half * x));
    }

    private static PulseSteps FromShape(double durationMs, int count, Func<double, double> amplitudeHz, Func<double, double> frequencyHz)
    {
        var steps = new PulseSteps(durationMs, count);
        var turn = 2 * Math.PI * steps.StepMs * 1e-3;
        var cross = Math.Sqrt(3) / 12 * turn;
        foreach (var (k, first, second) in GaussPoints(count))
        {
            var (b1, b2, f1, f2) = (amplitudeHz(first), amplitudeHz(second), frequencyHz(first), frequencyHz(second));
            steps.X[k] = turn * (b1 + b2) / 2;
            steps.Energy += (b1 * b1 + b2 * b2) / 2 * (steps.StepMs * 1e-3);
            steps.Sweep[k] = turn * (f1 + f2) / 2;
            steps.Slope[k] = -cross * (b2 - b1);
            steps.Y[k] = -cross * turn * (b1 * f2 - f1 * b2);
        }

        return steps;
    }

    /// <summary>Samples are constant over their own duration, so cutting them further loses nothing.</summary>
    private static PulseSteps Samples(SampledPulse p)
    {
        if (p.AmplitudeHz.Count == 0 || p.AmplitudeHz.Count != p.PhaseDegrees.Count)
            throw new ArgumentException($"Pulse '{p.Name}' has {p.AmplitudeHz.Count} amplitudes and {p.PhaseDegrees.Count} phases; both lists need the same number, at least 1.", nameof(p));
        var samples = p.AmplitudeHz.Count;
        var each = (Count(p.Duration, samples, p.AmplitudeHz.Max(Math.Abs)) + samples - 1) / samples;
        var steps = new PulseSteps(p.Duration, samples * each);
        var turn = 2 * Math.PI * steps.StepMs * 1e-3;
        for (var k = 0; k < steps.X.Length; k++)
        {
            var (amplitude, phase) = (p.AmplitudeHz[k / each], p.PhaseDegrees[k / each] * (Math.PI / 180));
            steps.X[k] = turn * amplitude * Elementary.Cos(phase);
            steps.Y[k] = turn * amplitude * Elementary.Sin(phase);
            steps.Energy += amplitude * amplitude * (steps.StepMs * 1e-3);
        }

        return steps;
    }

    /// <summary>Steps so short that off-resonance within <see cref="PulseResponse.LargestOffResonanceHz"/> and the peak field turn a lane by little in one of them.</summary>
    private static int Count(double durationMs, int fewest, double peakHz = 0) =>
        (int)Math.Max(fewest, Math.Ceiling(Math.Max(durationMs / LongestStepMs, 2 * Math.PI * peakHz * durationMs * 1e-3 / LargestTurn)));

    private static IEnumerable<(int Step, double First, double Second)> GaussPoints(int count)
    {
        var offset = 1 / (2 * Math.Sqrt(3));
        for (var k = 0; k < count; k++)
            yield return (k, (k + 0.5 - offset) / count - 0.5, (k + 0.5 + offset) / count - 0.5);
    }

    private static double Sinc(double x) => Math.Abs(x) < 1e-8 ? 1 : Elementary.Sin(Math.PI * x) / (Math.PI * x);

    private static double Sech(double x)
    {
        var e = Elementary.Exp(-Math.Abs(x));
        return 2 * e / (1 + e * e);
    }

    private static double Tanh(double x)
    {
        var e = Elementary.Exp(-2 * Math.Abs(x));
        return Math.CopySign((1 - e) / (1 + e), x);
    }
}
