namespace ProtoLedger.Physics.Pulses;

/// <summary>Six-peak spectrum of human fat, relative to water at body temperature.</summary>
/// <remarks>
/// Hamilton et al., NMR Biomed 2011;24:784 and Yu et al., MRM 2008;60:1122, seen second hand; the amplitudes printed there add up to 0.999 and are scaled to 1 here.
/// About 8.6 % of the fat signal lies under or around water (the last two peaks), where no spectrally selective pulse removes it.
/// </remarks>
public static class FatSpectrum
{
    private static readonly FatPeak[] All =
    [
        new("methyl", -3.80, 0.087 / 0.999),
        new("methylene", -3.40, 0.693 / 0.999),
        new("allylic", -2.60, 0.128 / 0.999),
        new("diallylic", -1.94, 0.004 / 0.999),
        new("glycerol", -0.39, 0.039 / 0.999),
        new("olefinic", 0.60, 0.048 / 0.999),
    ];

    /// <summary>Shift at which a spectral pulse looks for fat, ppm: the convention −3.5, between the main peaks (−3.4 is in use as well).</summary>
    public const double CarrierPpm = -3.5;

    /// <summary>The peaks; amplitudes add up to 1.</summary>
    public static IReadOnlyList<FatPeak> Peaks => All;
}

/// <summary>One peak of the fat spectrum.</summary>
/// <param name="Name">Chemical group.</param>
/// <param name="ShiftPpm">ppm from water, negative at lower frequency.</param>
/// <param name="Amplitude">Share of the fat signal, in (0, 1).</param>
public readonly record struct FatPeak(string Name, double ShiftPpm, double Amplitude);
