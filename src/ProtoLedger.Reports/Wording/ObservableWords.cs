namespace ProtoLedger.Reports.Wording;

/// <summary>What an observable is called in a table, and how its values are written.</summary>
public static class ObservableWords
{
    /// <summary>A short name with the tissues it speaks of; the name itself where it is not a known one.</summary>
    public static string Label(string observable, string? subject, string? reference)
    {
        var (of, pair) = (subject ?? "", $"{subject} against {reference}");
        return observable switch
        {
            "signedSignal" => $"signed signal of {of}",
            "signal" => $"signal of {of}",
            "contrastDifference" => $"{pair}, difference",
            "contrastRatio" => $"{pair}, ratio",
            "residualRatio" => $"{of} relative to {reference}",
            "contrastToNoise" => $"{pair}, contrast to noise",
            "nullTime" => $"inversion time that nulls {of}",
            "nullDistance" => $"distance of the inversion time from the null of {of}",
            "nullWindow" => $"inversion times that keep {of} within the limit",
            "weightingT1" => $"T1 weighting{For(of)}",
            "weightingT2" => $"T2 weighting{For(of)}",
            "weightingProtonDensity" => $"proton-density weighting{For(of)}",
            "weightingDiffusion" => $"diffusion weighting{For(of)}",
            "contrastEquivalentEchoTime" => $"contrast-equivalent echo time{For(of)}",
            "blurWidth" => $"blur along the phase direction{For(of)}",
            "fatWaterShift" => "shift of fat against water",
            "fatWaterPhase" => "phase of fat against water",
            "relativeNoise" => "noise (old = 1)",
            "relativeRfPower" => "RF power (old = 1)",
            "scanTime" => "scan time",
            "slicesFit" => "slices fit in the repetition time",
            _ => (subject, reference) switch
            {
                (null, _) => observable,
                (_, null) => $"{observable} of {of}",
                _ => $"{observable} of {pair}",
            },
        };
    }

    /// <summary>Unit in which values of an observable are written; empty for ratios and relative numbers.</summary>
    public static string Unit(string observable) => observable switch
    {
        "nullTime" or "nullDistance" or "nullWindow" or "contrastEquivalentEchoTime" => "ms",
        "blurWidth" or "fatWaterShift" => "px",
        "fatWaterPhase" => "°",
        "scanTime" => "s",
        _ => "",
    };

    /// <summary>Old and new as people read them, with the unit; "none" where there is none.</summary>
    public static (string Old, string New) Values(string observable, double? before, double? after, string unit)
    {
        if (observable == "slicesFit")
            return (YesNo(before), YesNo(after));
        if (IsRelative(observable) && before is { } one and > 0)
            (before, after) = (1, after / one);
        if (unit == "s")
            return (Time(before), Time(after));
        var (old, @new) = before is { } b && after is { } a
            ? Numbers.Pair(b, a)
            : (before is { } x ? Numbers.Plain(x) : "none", after is { } y ? Numbers.Plain(y) : "none");
        return (WithUnit(old, unit), WithUnit(@new, unit));
    }

    /// <summary>True for a number that means something only against the same number before, which is written as 1.</summary>
    public static bool IsRelative(string observable) => observable is "relativeNoise" or "relativeRfPower";

    /// <summary>A text and its unit, with a blank between except before a degree sign.</summary>
    public static string WithUnit(string text, string unit) =>
        unit.Length == 0 || text == "none" ? text : unit == "°" ? text + unit : $"{text} {unit}";

    private static string For(string of) => of.Length == 0 ? "" : $" of {of}";

    private static string YesNo(double? value) => value is null ? "none" : value >= 0.5 ? "yes" : "no";

    private static string Time(double? seconds) => seconds is { } s ? $"{Numbers.Minutes(s)} min" : "none";
}
