using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.Pulses;

namespace ProtoLedger.Physics.Tests.Pulses;

/// <summary>
/// Hyperbolic secant inversion: Silver, Joseph, Hoult, Phys Rev A 1985;31:2753 and J Magn Reson 1984;59:347 (from memory);
/// microtesla by the shielded proton; values computed apart from this program in double precision and confirmed there by brute-force integration.
/// </summary>
public sealed class AdiabaticCheckValuesTests
{
    /// <summary>Truncated at |βt| = 10, so that the untruncated closed form is met to 3e-4 and far better in the middle.</summary>
    private static HyperbolicSecantPulse Untruncated(double mu, double beta, double overThreshold) =>
        new("secant", 20_000 / beta, beta, mu, overThreshold * mu * beta / (2 * Math.PI));

    [Theory]
    [InlineData(4.9, 800, 1247.77)]
    [InlineData(5, 672, 1069.52)]
    [InlineData(4.9, 1000, 1559.72)]
    public void Bandwidth_OfSecant_IsMuBetaOverPi(double mu, double beta, double expected) =>
        Approximately.Relative(expected, PulseBandwidth.Hz(Untruncated(mu, beta, 1)), 1e-5);

    [Theory]
    [InlineData(4.9, 800, 14.6534)]
    [InlineData(5, 672, 12.5600)]
    [InlineData(4.9, 1000, 18.3167)]
    public void Threshold_OfSecant_InMicrotesla(double mu, double beta, double expected) =>
        Approximately.Relative(expected, Untruncated(mu, beta, 1).PeakB1Hz / Proton.ShieldedHzPerTesla * 1e6, 1e-5);

    [Theory]
    [InlineData(0.5, -0.745697)]
    [InlineData(0.75, -0.989095)]
    [InlineData(1, -0.999998)]
    [InlineData(1.5, -0.999999)]
    public void Longitudinal_OnResonance_MeetsTheClosedForm(double overThreshold, double expected) =>
        Approximately.Absolute(expected, Mz(Untruncated(4.9, 800, overThreshold), 0), 3e-4);

    [Theory]
    [InlineData(0.8, -0.912016)]
    [InlineData(1.0, 0)]
    [InlineData(1.2, 0.912016)]
    public void Longitudinal_AcrossTheBand_MeetsTheClosedForm(double offResonanceOverMuBeta, double expected) =>
        Approximately.Absolute(expected, Mz(Untruncated(4.9, 800, 1.5), offResonanceOverMuBeta * 4.9 * 800 / (2 * Math.PI)), 3e-4);

    [Fact]
    public void Threshold_ForNinetyNinePercent_IsThreeQuartersOfMuBeta()
    {
        var smallest = Enumerable.Range(0, 400).Select(i => 0.6 + i * 0.001).First(x => Mz(Untruncated(4.9, 800, x), 0) < -0.99);

        Approximately.Absolute(0.755, smallest, 0.002);
    }

    [Fact]
    public void Energy_OfSecant_IsPeakSquaredTimesTwoOverBeta()
    {
        var tesla = RelativeRfPower.Energy(Untruncated(4.9, 800, 1)) / (Proton.ShieldedHzPerTesla * Proton.ShieldedHzPerTesla);

        Approximately.Relative(536.803, tesla * 1e12 * 1e3, 1e-5);
    }

    [Fact]
    public void Energy_OfHardPulse_IsOneThirdOfIt()
    {
        var tesla = RelativeRfPower.Energy(new HardPulse("hard", 180, 1)) / (Proton.ShieldedHzPerTesla * Proton.ShieldedHzPerTesla);

        Approximately.Relative(137.912, tesla * 1e12 * 1e3, 1e-5);
    }

    private static double Mz(RfPulse pulse, double offResonanceHz)
    {
        double result = 0;
        PulseResponse.Longitudinal(pulse, [1], [offResonanceHz], new Span<double>(ref result));
        return result;
    }
}
