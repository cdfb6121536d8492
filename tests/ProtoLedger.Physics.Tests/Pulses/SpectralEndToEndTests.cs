using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using static ProtoLedger.Physics.Tests.Signals;

namespace ProtoLedger.Physics.Tests.Pulses;

/// <summary>
/// Whole predictions with spectral pulses and off-resonance, against a sequence played step by step with MathNet's solution of the Bloch equation for the pulse:
/// six peaks, slice interval, relaxation during the pulse.
/// </summary>
public sealed class SpectralEndToEndTests
{
    private const int Slices = 12;
    private const double RepetitionTime = 1800, EchoTime = 16;
    private static readonly GaussianPulse Pulse = new("fat pulse", 100, 8, 1 / 6.0);

    /// <summary>Six peaks as printed by Hamilton et al. 2011 and Yu et al. 2008, over their sum 0.999.</summary>
    private static (double Ppm, double Share)[] Peaks =>
        [(-3.8, 0.087 / 0.999), (-3.4, 0.693 / 0.999), (-2.6, 0.128 / 0.999), (-1.94, 0.004 / 0.999), (-0.39, 0.039 / 0.999), (0.6, 0.048 / 0.999)];

    /// <summary>Delay: from the end of the pulse (saturation) or from its centre (inversion) to the excitation.</summary>
    [Theory]
    [InlineData(1, 0, false)]
    [InlineData(0.9, 140, false)]
    [InlineData(1, -300, false)]
    [InlineData(1, 0, true)]
    [InlineData(1.1, 200, true)]
    public void Fat_UnderASpectralPulse_IsTheSumOfItsPeaks(double b1Scale, double offResonanceHz, bool inverts)
    {
        var pulse = inverts ? Pulse with { FlipAngle = 180 } : Pulse;
        var delay = inverts ? 60 - pulse.Duration / 2 : 5;
        var expected = Fat3.ProtonDensity * Peaks.Sum(p => p.Share * Signal(pulse, delay, p.Ppm, b1Scale, offResonanceHz, Fat3));

        Approximately.Absolute(expected, Signed(Of(pulse, delay, inverts), Fat3, new FieldPoint(b1Scale, offResonanceHz)), 2e-6);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-300)]
    public void Water_UnderASpectralPulse_LosesWhereOffResonancePutsItInTheBand(double offResonanceHz)
    {
        var expected = Muscle3.ProtonDensity * Signal(Pulse, 5, 0, 1, offResonanceHz, Muscle3);
        var predicted = Signed(Of(Pulse, 5, false), Muscle3, new FieldPoint(1, offResonanceHz));

        Approximately.Absolute(expected, predicted, 2e-6);
        if (offResonanceHz < 0)
            Assert.True(predicted < 0.7 * Signed(Of(Pulse, 5, false), Muscle3));
    }

    /// <summary>Inverted fluid and white matter share a voxel: the signed mix of two predictions, then the magnitude.</summary>
    [Fact]
    public void PartialVolume_OfTwoPredictions_CancelsWhereTheSignsDiffer()
    {
        var series = Signals.Of(new EchoTrain(9000, 80, 90, 10, 16, [180]), Invert(1500));
        var (fluid, white) = (Signed(series, Fluid3), Signed(series, White3));
        var share = white / (white - fluid);

        Assert.True(fluid < 0 && white > 0);
        Approximately.Absolute(0, PartialVolume.Mix([share, 1 - share], [fluid, white]), 1e-12);
        Assert.True(Math.Abs(PartialVolume.Mix([0.5, 0.5], [fluid, white])) < 0.5 * (Magnitude(series, Fluid3) + Magnitude(series, White3)));
    }

    private static Series Of(GaussianPulse pulse, double delay, bool inverts) =>
        Signals.Of(new SpinEcho(RepetitionTime, EchoTime, 90, 180), inverts ? new SpectralInversion(delay + pulse.Duration / 2, pulse) : new SpectralSaturation(pulse, delay))
            with { Timing = new SeriesTiming(Slices) };

    /// <summary>Signed spin echo of one spin species in the steady state, played until nothing changes.</summary>
    private static double Signal(GaussianPulse pulse, double delay, double ppm, double b1Scale, double offResonanceHz, Tissue tissue)
    {
        var frequency = (ppm + 3.5) * 1e-6 * 42.577478518e6 * 3 + offResonanceHz;
        var kept = BlochOde.Run(pulse, b1Scale, frequency, tissue.T1, tissue.T2, [0, 0, 1], 0, 4000)[2];
        var grown = BlochOde.Run(pulse, b1Scale, frequency, tissue.T1, tissue.T2, [0, 0, 0], 1, 4000)[2];
        double Recover(double m, double time) => 1 - (1 - m) * Math.Exp(-time / tissue.T1);
        var (excitation, refocusing) = (Math.PI / 2 * b1Scale, Math.PI * b1Scale);
        double m = 1, before = 0;
        for (var repetition = 0; repetition < 60; repetition++)
        {
            before = Recover(kept * m + grown, delay);
            m = Recover(Math.Cos(refocusing) * Recover(Math.Cos(excitation) * before, EchoTime / 2), EchoTime / 2);
            m = Recover(m, RepetitionTime / Slices - pulse.Duration - delay - EchoTime);
            for (var other = 1; other < Slices; other++)
                m = Recover(kept * m + grown, RepetitionTime / Slices - pulse.Duration);
        }

        return before * Math.Sin(excitation) * (1 - Math.Cos(refocusing)) / 2 * Math.Exp(-EchoTime / tissue.T2);
    }
}
