using ProtoLedger.Physics.Observables;

namespace ProtoLedger.Physics.Tests.Observables;

/// <summary>Constants and frequencies; values computed apart from this program from the constants named.</summary>
public sealed class FrequencyCheckValuesTests
{
    private const double FreeOverShielded = Proton.HzPerTesla / Proton.ShieldedHzPerTesla;

    /// <summary>CODATA 2022 and 2018, proton gyromagnetic ratio over 2π (seen in constant listings of public numeric libraries).</summary>
    [Theory]
    [InlineData(42.577478461)]
    [InlineData(42.577478518)]
    public void HzPerTesla_IsTheFreeProton(double megahertz) => Approximately.Relative(megahertz * 1e6, Proton.HzPerTesla, 1e-8);

    /// <summary>CODATA 2022 and 2018, shielded proton.</summary>
    [Theory]
    [InlineData(42.57638543)]
    [InlineData(42.57638474)]
    public void ShieldedHzPerTesla_IsTheProtonInWater(double megahertz) => Approximately.Relative(megahertz * 1e6, Proton.ShieldedHzPerTesla, 2e-8);

    /// <summary>CODATA 2022, rad/(s T).</summary>
    [Fact]
    public void HzPerTesla_TimesTwoPi_IsTheAngularRatio() => Approximately.Relative(2.67522187e8, 2 * Math.PI * Proton.HzPerTesla, 1e-8);

    [Theory]
    [InlineData(0.55, 23.4176)]
    [InlineData(1.5, 63.8662)]
    [InlineData(3, 127.732)]
    [InlineData(7, 298.042)]
    public void Larmor_InMegahertz(double field, double expected) => Approximately.Relative(expected, Proton.LarmorHz(field) / 1e6, 1e-5);

    /// <summary>3.4 ppm (methylene 1.30 against water 4.70 ppm, Gajdosik et al. 2014) of the shielded proton's frequency.</summary>
    [Theory]
    [InlineData(3.4, 0.55, 79.6178)]
    [InlineData(3.4, 1.5, 217.140)]
    [InlineData(3.4, 3, 434.279)]
    [InlineData(3.4, 7, 1013.32)]
    [InlineData(3.5, 0.55, 81.9595)]
    [InlineData(3.5, 1.5, 223.526)]
    [InlineData(3.5, 3, 447.052)]
    [InlineData(3.5, 7, 1043.12)]
    public void Shift_OfFat_InHertz(double ppm, double field, double expected) =>
        Approximately.Relative(expected, Proton.ShiftHz(ppm, field) / FreeOverShielded, 1e-5);

    /// <summary>Dixon, Radiology 1984;153:189 (from memory); 2.3 ms at 3 T and 4.6 ms at 1.5 T in phase: Hori et al., Invest Radiol 2021.</summary>
    [Theory]
    [InlineData(-3.4, 0.55, 6.28000, 12.5600)]
    [InlineData(-3.4, 1.5, 2.30267, 4.60533)]
    [InlineData(-3.4, 3, 1.15133, 2.30267)]
    [InlineData(-3.4, 7, 0.493429, 0.986857)]
    [InlineData(-3.5, 1.5, 2.23688, 4.47375)]
    [InlineData(-3.5, 3, 1.11844, 2.23688)]
    public void EchoTimes_OfOpposedAndInPhase(double ppm, double field, double opposed, double inPhase)
    {
        Approximately.Relative(opposed, FatWater.OpposedPhaseEchoTime(ppm, field) * FreeOverShielded, 1e-5);
        Approximately.Relative(inPhase, FatWater.InPhaseEchoTime(ppm, field) * FreeOverShielded, 1e-5);
        Approximately.Absolute(180, Math.Abs(FatWater.PhaseDegrees(ppm, field, FatWater.OpposedPhaseEchoTime(ppm, field))), 1e-9);
        Approximately.Absolute(0, FatWater.PhaseDegrees(ppm, field, FatWater.InPhaseEchoTime(ppm, field)), 1e-9);
    }

    /// <summary>tanh(h f₀ / 2 k T) at 310.15 K, statistical mechanics.</summary>
    [Theory]
    [InlineData(0.55, 1.81177e-6)]
    [InlineData(1.5, 4.94118e-6)]
    [InlineData(3, 9.88237e-6)]
    [InlineData(7, 2.30589e-5)]
    public void Polarization_AtBodyTemperature(double field, double expected) => Approximately.Relative(expected, Proton.Polarization(field), 1e-4);

    /// <summary>Derived: Δf over Hz per pixel, 3.4 ppm.</summary>
    [Theory]
    [InlineData(130, 0.55, 0.612445)]
    [InlineData(130, 1.5, 1.67030)]
    [InlineData(130, 3, 3.34061)]
    [InlineData(130, 7, 7.79475)]
    [InlineData(220, 0.55, 0.361899)]
    [InlineData(220, 1.5, 0.986998)]
    [InlineData(220, 3, 1.97400)]
    [InlineData(220, 7, 4.60599)]
    [InlineData(400, 0.55, 0.199045)]
    [InlineData(400, 1.5, 0.542849)]
    [InlineData(400, 3, 1.08570)]
    [InlineData(400, 7, 2.53329)]
    [InlineData(434.279, 3, 1)]
    [InlineData(244.141, 3, 1.77881)]
    [InlineData(15.625, 3, 27.7939)]
    public void Shift_InPixels(double pixelBandwidth, double field, double expected) =>
        Approximately.Relative(expected, FatWater.ShiftPixels(3.4, field, pixelBandwidth) / FreeOverShielded, 1e-5);

    [Theory]
    [InlineData(3, 1.44760)]
    [InlineData(1.5, 0.723800)]
    public void Shift_OfTheSlice_InMillimetres(double field, double expected) =>
        Approximately.Relative(expected, FatWater.SliceShift(3.4, field, 1500, 5) / FreeOverShielded, 1e-5);
}
