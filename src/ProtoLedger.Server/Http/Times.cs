using System.Globalization;

namespace ProtoLedger.Server.Http;

/// <summary>Times of the interface: RFC 3339 with an offset.</summary>
internal static class Times
{
    public static bool TryParse(string text, out DateTime utc)
    {
        utc = default;
        if (text.Length is < 20 or > 40 || text[10] is not 'T' || !(text[^1] is 'Z' || text[^6] is '+' or '-')
            || !DateTimeOffset.TryParse(text, CultureInfo.InvariantCulture, DateTimeStyles.None, out var time))
            return false;
        utc = time.UtcDateTime;
        return true;
    }
}
