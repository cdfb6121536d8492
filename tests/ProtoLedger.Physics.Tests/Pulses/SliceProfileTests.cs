using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Tests.Pulses;

public sealed class SliceProfileTests
{
    /// <summary>Small flip angles: the profile is the Fourier transform of the pulse (Hoult, J Magn Reson 1979;35:69, from memory).</summary>
    [Fact]
    public void Excitation_OfASmallAngle_IsTheFourierTransform()
    {
        var pulse = new WindowedSincPulse("excitation", 1, 2.56, 4);
        double[] z = [0, 0.2, 0.4, 0.5, 0.6, 0.8];
        var (transverse, longitudinal) = (new double[z.Length], new double[z.Length]);

        SliceProfile.Excitation(new SliceSelection(pulse), 1, 0, z, transverse, longitudinal);

        double Envelope(double x) => (0.54 + 0.46 * Math.Cos(2 * Math.PI * x)) * MathNet.Numerics.Trig.Sinc(4 * x);
        var area = MathNet.Numerics.Integration.GaussLegendreRule.Integrate(Envelope, -0.5, 0.5, 128);
        for (var i = 0; i < z.Length; i++)
        {
            var transform = MathNet.Numerics.Integration.GaussLegendreRule.Integrate(x => Envelope(x) * Math.Cos(2 * Math.PI * 4 * z[i] * x), -0.5, 0.5, 128) / area;
            Approximately.Absolute(Math.Abs(transform), transverse[i] / Math.Sin(Math.PI / 180), 1e-4);
        }
    }

    /// <summary>A field error only moves the profile, against the gradient.</summary>
    [Theory]
    [InlineData(GradientPolarity.Positive)]
    [InlineData(GradientPolarity.Negative)]
    public void Excitation_OffResonance_IsShifted(GradientPolarity polarity)
    {
        var selection = new SliceSelection(new WindowedSincPulse("excitation", 90, 2.56, 4), polarity);
        var shift = selection.ShiftAt(300);
        double[] z = [-0.4, 0, 0.3];
        var (centred, moved, longitudinal) = (new double[3], new double[3], new double[3]);

        SliceProfile.Excitation(selection, 1, 0, z, centred, longitudinal);
        SliceProfile.Excitation(selection, 1, 300, [.. z.Select(x => x + shift)], moved, longitudinal);

        Approximately.Absolute((polarity == GradientPolarity.Positive ? -1 : 1) * 300 / 1562.5, shift, 1e-12);
        for (var i = 0; i < 3; i++)
            Approximately.Absolute(centred[i], moved[i], 1e-12);
    }

    /// <summary>Hard pulses of no bandwidth limit stand for a perfect slice: the echo inside ±½ is the closed form of a spin echo.</summary>
    [Fact]
    public void Integrate_WithPulsesFarWiderThanTheSlice_IsAPlainSpinEcho()
    {
        var wide = new SelectiveSpinEcho(
            new SliceSelection(new HardPulse("excitation", 90, 0.001), Thickness: 2000),
            new SliceSelection(new HardPulse("refocusing", 180, 0.001), Thickness: 2000),
            15, 600, Reach: 0.5, Intervals: 20);

        var signal = SliceProfile.Integrate(wide, 850, 69);

        var expected = (1 - 2 * Math.Exp(-(600 - 7.5) / 850) + Math.Exp(-600 / 850.0)) * Math.Exp(-15 / 69.0);
        Approximately.Absolute(expected, signal.Coherent, 1e-5);
        Approximately.Absolute(expected, signal.MagnitudeIntegral, 1e-5);
    }

    /// <summary>Twice the intervals must not move the integral.</summary>
    [Fact]
    public void Integrate_WithFinerIntervals_IsConverged()
    {
        var echo = new SelectiveSpinEcho(
            new SliceSelection(new WindowedSincPulse("excitation", 90, 2.56, 6)), new SliceSelection(new WindowedSincPulse("refocusing", 180, 2.56, 4)), 80, 3000);

        var (coarse, fine) = (SliceProfile.Integrate(echo, 1607, 99), SliceProfile.Integrate(echo with { Intervals = 2400 }, 1607, 99));

        Approximately.Absolute(fine.Coherent, coarse.Coherent, 1e-7);
        Approximately.Absolute(fine.MagnitudeIntegral, coarse.MagnitudeIntegral, 1e-7);
    }
}
