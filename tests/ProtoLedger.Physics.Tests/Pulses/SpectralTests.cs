using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Tests.Pulses;

public sealed class SpectralTests
{
    private static readonly GaussianPulse Saturation = new("saturation", 95, 12, 1 / 6.0);

    /// <summary>Hamilton et al., NMR Biomed 2011;24:784: 8.6 % of the fat signal lies under or around water.</summary>
    [Fact]
    public void Spectrum_HasTheShareUnderWater()
    {
        Approximately.Relative(1, FatSpectrum.Peaks.Sum(p => p.Amplitude), 1e-12);
        Approximately.Absolute(0.086, FatSpectrum.Peaks.Where(p => p.ShiftPpm > -1).Sum(p => p.Amplitude), 2e-3);
        Assert.Equal("methylene", FatSpectrum.Peaks.MaxBy(p => p.Amplitude).Name);
    }

    /// <summary>A spectral pulse leaves about the share of fat that lies under water: a floor, whatever its angle.</summary>
    [Fact]
    public void Saturation_OfSixPeaks_LeavesTheFloorUnderWater()
    {
        var response = new SpectralResponse(Saturation, 0, 3);
        var left = FatSpectrum.Peaks.Where(p => p.ShiftPpm > -1).Sum(p => p.Amplitude * Mz(response, p.ShiftPpm, 0));
        var main = Math.Abs(Mz(response, -3.4, 0));

        Assert.InRange(left, 0.07, 0.09);
        Assert.True(main < 0.1, $"main peak {main}");
    }

    /// <summary>Off-resonance as large as the fat shift puts the pulse on water: fat stays, water is saturated.</summary>
    [Fact]
    public void Saturation_OffResonanceByTheFatShift_SaturatesWater()
    {
        var response = new SpectralResponse(Saturation, 0, 1.5);
        var shift = Proton.ShiftHz(FatSpectrum.CarrierPpm, 1.5);

        Approximately.Absolute(0, response.FrequencyOf(0, shift), 1e-9);
        Assert.True(Math.Abs(Mz(response, 0, shift)) < 0.2);
        Assert.True(Mz(response, 0, 0) > 0.95);
    }

    /// <summary>The steady state against the repeated sequence: 60 repetitions, pulse by pulse.</summary>
    [Theory]
    [InlineData(1)]
    [InlineData(7)]
    public void SteadyState_AgainstRepetitions_Agrees(int pulses)
    {
        var pulse = new LongitudinalMap(-0.12, 0.02);
        const double T1 = 380, T2 = 120, Duration = 8, Delay = 4, Echo = 20, Interval = 90;
        double m = 1, after = 0, before = 0;
        for (var i = 0; i < 60 * pulses; i++)
        {
            m = pulse.Apply(m);
            if (i % pulses == 0)
            {
                after = m;
                m = before = 1 - (1 - m) * Math.Exp(-Delay / T1);
                m = 1 - (1 - m * Math.Cos(70 * Math.PI / 180)) * Math.Exp(-Echo / 2 / T1);
                m = 1 - (1 - m * Math.Cos(150 * Math.PI / 180)) * Math.Exp(-Echo / 2 / T1);
                m = 1 - (1 - m) * Math.Exp(-(Interval - Duration - Delay - Echo) / T1);
            }
            else
            {
                m = 1 - (1 - m) * Math.Exp(-(Interval - Duration) / T1);
            }
        }

        var signal = new SpectralSteadyState(Duration, Delay, Echo, Interval, pulses, 70, 150).Solve(pulse, T1, T2);

        Approximately.Absolute(after, signal.AfterPulse, 1e-12);
        Approximately.Absolute(before, signal.BeforeExcitation, 1e-12);
        Approximately.Absolute(
            before * Math.Sin(70 * Math.PI / 180) * Math.Pow(Math.Sin(75 * Math.PI / 180), 2) * Math.Exp(-Echo / T2), signal.Signed, 1e-12);
    }

    private static double Mz(SpectralResponse response, double shiftPpm, double offResonanceHz) =>
        response.Longitudinal(shiftPpm, 1, offResonanceHz, 375, 90).Apply(1);
}
