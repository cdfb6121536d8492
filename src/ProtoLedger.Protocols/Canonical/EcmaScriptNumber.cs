using System.Globalization;
using System.Text;

namespace ProtoLedger.Protocols.Canonical;

/// <summary>Text of a double as ECMAScript's Number::toString writes it (ECMA-262, 6.1.6.1.20), which RFC 8785 3.2.2.3 asks for.</summary>
public static class EcmaScriptNumber
{
    /// <summary>Shortest digits that read back as the same double, in the ECMAScript layout.</summary>
    /// <param name="value">Finite; −0 is written as 0.</param>
    public static string Format(double value)
    {
        if (!double.IsFinite(value))
            throw new ArgumentOutOfRangeException(nameof(value), value, "The number is not finite.");
        if (value == 0)
            return "0";
        // .NET's round-trip digits are the shortest ones; only its layout differs.
        var shortest = Math.Abs(value).ToString("R", CultureInfo.InvariantCulture);
        var (digits, point) = Split(shortest);
        var sign = value < 0 ? "-" : "";
        return sign + Lay(digits, point);
    }

    /// <summary>Significant digits without leading or trailing zeros, and the place of the decimal point: value = 0.digits · 10^point.</summary>
    private static (string Digits, int Point) Split(string shortest)
    {
        var mark = shortest.IndexOf('E', StringComparison.Ordinal);
        var exponent = mark < 0 ? 0 : int.Parse(shortest.AsSpan(mark + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
        var mantissa = mark < 0 ? shortest : shortest[..mark];
        var dot = mantissa.IndexOf('.', StringComparison.Ordinal);
        var whole = dot < 0 ? mantissa : mantissa[..dot];
        var all = dot < 0 ? mantissa : whole + mantissa[(dot + 1)..];
        var leading = all.Length - all.TrimStart('0').Length;
        return (all.Trim('0'), whole.Length - leading + exponent);
    }

    private static string Lay(string digits, int point)
    {
        var count = digits.Length;
        if (count <= point && point <= 21)
            return digits + new string('0', point - count);
        if (point is > 0 and <= 21)
            return $"{digits[..point]}.{digits[point..]}";
        if (point is > -6 and <= 0)
            return "0." + new string('0', -point) + digits;
        var exponent = point - 1;
        var text = new StringBuilder().Append(digits[0]);
        if (count > 1)
            text.Append('.').Append(digits, 1, count - 1);
        return text.Append('e').Append(exponent < 0 ? '-' : '+').Append(Math.Abs(exponent)).ToString();
    }
}
