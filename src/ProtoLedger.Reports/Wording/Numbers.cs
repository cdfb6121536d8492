using System.Globalization;

namespace ProtoLedger.Reports.Wording;

/// <summary>Numbers as people read them: few digits, a point, no group marks.</summary>
internal static class Numbers
{
    /// <summary>Two numbers with two significant digits, three where only that tells numbers of 1 and more apart.</summary>
    public static (string Old, string New) Pair(double old, double @new)
    {
        var pair = (Plain(old), Plain(@new));
        return pair.Item1 == pair.Item2 && !old.Equals(@new) && Math.Abs(old) >= 0.995 && Math.Abs(old) < 100
            ? (Plain(old, 1), Plain(@new, 1))
            : pair;
    }

    /// <summary>A number with about two significant digits and at most two decimals, plus <paramref name="extra"/> decimals.</summary>
    public static string Plain(double value, int extra = 0)
    {
        if (!double.IsFinite(value))
            throw new ArgumentException("A report holds finite numbers only.", nameof(value));
        var size = Math.Abs(value);
        var decimals = (size >= 9.95 ? 0 : size >= 0.995 ? 1 : 2) + extra;
        var text = Signed(value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture));
        return IsZero(text) && size > 1e-9 && extra == 0 ? (value > 0 ? "under 0.01" : "about 0") : text;
    }

    /// <summary>A number with its sign always shown, for contributions.</summary>
    public static string Change(double value)
    {
        var text = Plain(value, 1);
        return text.StartsWith('\u2212') || IsZero(text) ? text : "+" + text;
    }

    /// <summary>Seconds as minutes and seconds, "3:06".</summary>
    public static string Minutes(double seconds)
    {
        var whole = (long)Math.Round(seconds, MidpointRounding.AwayFromZero);
        return string.Create(CultureInfo.InvariantCulture, $"{whole / 60}:{whole % 60:00}");
    }

    /// <summary>A share of tissue values in words: "all plausible tissue values", "about 87 % of plausible tissue values".</summary>
    public static string OfTissueValues(double share) =>
        share >= 1 ? "all plausible tissue values" : share <= 0 ? "no plausible tissue value" : $"{Share(share)} of plausible tissue values";

    /// <summary>A share in words: "more than 99 %", "about 87 %", "less than 1 %".</summary>
    public static string Share(double share) => share switch
    {
        >= 1 => "all",
        > 0.99 => "more than 99 %",
        <= 0 => "none",
        < 0.01 => "less than 1 %",
        _ => string.Create(CultureInfo.InvariantCulture, $"about {Math.Round(share * 100):0} %"),
    };

    /// <summary>A probability for a table: "> 0.99", "0.87", "&lt; 0.01".</summary>
    public static string Probability(double probability) => probability switch
    {
        > 0.995 => "over 0.99",
        < 0.005 => "under 0.01",
        _ => probability.ToString("F2", CultureInfo.InvariantCulture),
    };

    /// <summary>Two decimals, for columns that are compared line by line.</summary>
    public static string Hundredths(double value) => Signed(value.ToString("F2", CultureInfo.InvariantCulture));

    /// <summary>Whole number.</summary>
    public static string Whole(long value) => value.ToString(CultureInfo.InvariantCulture);

    /// <summary>A setting as entered: all its digits.</summary>
    public static string Setting(double value) => Signed(value.ToString("0.######", CultureInfo.InvariantCulture));

    /// <summary>A date, UTC.</summary>
    public static string Date(DateTimeOffset time) => time.UtcDateTime.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture);

    /// <summary>A time to the minute, UTC.</summary>
    public static string Time(DateTimeOffset time) => time.UtcDateTime.ToString("yyyy-MM-dd HH:mm 'UTC'", CultureInfo.InvariantCulture);

    private static string Signed(string text) =>
        text.StartsWith('-') ? (IsZero(text) ? text[1..] : "\u2212" + text[1..]) : text;

    private static bool IsZero(string text) => text.All(c => c is '-' or '\u2212' or '0' or '.');
}
