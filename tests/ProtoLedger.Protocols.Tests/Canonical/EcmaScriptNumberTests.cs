using System.Globalization;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Protocols.Tests.Canonical;

public sealed class EcmaScriptNumberTests
{
    // RFC 8785, appendix B: bits of the double and its text.
    [Theory]
    [InlineData("0000000000000000", "0")]
    [InlineData("8000000000000000", "0")]
    [InlineData("0000000000000001", "5e-324")]
    [InlineData("8000000000000001", "-5e-324")]
    [InlineData("7fefffffffffffff", "1.7976931348623157e+308")]
    [InlineData("ffefffffffffffff", "-1.7976931348623157e+308")]
    [InlineData("4340000000000000", "9007199254740992")]
    [InlineData("c340000000000000", "-9007199254740992")]
    [InlineData("4430000000000000", "295147905179352830000")]
    [InlineData("44b52d02c7e14af5", "9.999999999999997e+22")]
    [InlineData("44b52d02c7e14af6", "1e+23")]
    [InlineData("44b52d02c7e14af7", "1.0000000000000001e+23")]
    [InlineData("444b1ae4d6e2ef4e", "999999999999999700000")]
    [InlineData("444b1ae4d6e2ef4f", "999999999999999900000")]
    [InlineData("444b1ae4d6e2ef50", "1e+21")]
    [InlineData("3eb0c6f7a0b5ed8c", "9.999999999999997e-7")]
    [InlineData("3eb0c6f7a0b5ed8d", "0.000001")]
    [InlineData("41b3de4355555553", "333333333.3333332")]
    [InlineData("41b3de4355555554", "333333333.33333325")]
    [InlineData("41b3de4355555555", "333333333.3333333")]
    [InlineData("41b3de4355555556", "333333333.3333334")]
    [InlineData("41b3de4355555557", "333333333.33333343")]
    [InlineData("becbf647612f3696", "-0.0000033333333333333333")]
    [InlineData("43143ff3c1cb0959", "1424953923781206.2")]
    public void Format_VectorOfTheStandard_GivesItsText(string bits, string text) => Assert.Equal(text, EcmaScriptNumber.Format(FromBits(bits)));

    // RFC 8785, appendix B: NaN and Infinity have no form.
    [Theory]
    [InlineData("7fffffffffffffff")]
    [InlineData("7ff0000000000000")]
    [InlineData("fff0000000000000")]
    public void Format_NotFinite_IsRefused(string bits) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => EcmaScriptNumber.Format(FromBits(bits)));

    // Text made once by JSON.stringify of Node 20: see the head of the file.
    [Fact]
    public void Format_TenThousandDoubles_EqualsNode()
    {
        var path = Path.Combine(AppContext.BaseDirectory, "Canonical", "Data", "ecmascript-numbers.csv");
        var rows = File.ReadLines(path).Where(line => !line.StartsWith('#')).Select(line => line.Split(',')).ToArray();
        var wrong = rows.Where(row => EcmaScriptNumber.Format(FromBits(row[0])) != row[1]).Select(row => row[0]).ToArray();
        Assert.Equal(10_000, rows.Length);
        Assert.Empty(wrong);
    }

    private static double FromBits(string bits) => BitConverter.UInt64BitsToDouble(ulong.Parse(bits, NumberStyles.HexNumber, CultureInfo.InvariantCulture));
}
