using System.Globalization;

namespace ProtoLedger.Ledger;

/// <summary>Times as they stand in hashed bytes: UTC with exactly six digits after the second, <c>2026-03-01T08:30:00.000000Z</c>.</summary>
public static class LedgerTime
{
    private const string Pattern = "yyyy-MM-dd'T'HH:mm:ss.ffffff'Z'";

    /// <summary>The same moment in UTC, cut (not rounded) to the microsecond, which is what a database column keeps.</summary>
    public static DateTimeOffset Truncate(DateTimeOffset time)
    {
        var utc = time.ToUniversalTime();
        return utc.AddTicks(-(utc.Ticks % TimeSpan.TicksPerMicrosecond));
    }

    /// <summary>The text form.</summary>
    /// <exception cref="ArgumentException">Not UTC, or finer than a microsecond: see <see cref="Truncate"/>.</exception>
    public static string Format(DateTimeOffset time) =>
        time.Offset == TimeSpan.Zero && time.Ticks % TimeSpan.TicksPerMicrosecond == 0
            ? time.ToString(Pattern, CultureInfo.InvariantCulture)
            : throw new ArgumentException($"{time:O} is not a UTC time in whole microseconds.", nameof(time));

    /// <summary>Reads the text form and nothing else.</summary>
    public static bool TryParse(string? text, out DateTimeOffset time) =>
        DateTimeOffset.TryParseExact(text, Pattern, CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out time);
}
