using ProtoLedger.Application.Accounts;

namespace ProtoLedger.Application.Tests.Accounts;

public sealed class SecondFactorTests
{
    /// <summary>RFC 6238 appendix B, SHA-1 column, last six digits of the eight printed there.</summary>
    [Theory]
    [InlineData(59, "287082")]
    [InlineData(1111111109, "081804")]
    [InlineData(1111111111, "050471")]
    [InlineData(1234567890, "005924")]
    [InlineData(2000000000, "279037")]
    [InlineData(20000000000, "353130")]
    public void Code_OfTheStandardsSecret_IsTheStandardsCode(long seconds, string code) =>
        Assert.Equal(code, SecondFactor.Code("12345678901234567890"u8, seconds / 30));

    /// <summary>RFC 4648 section 10, without padding.</summary>
    [Theory]
    [InlineData("", "")]
    [InlineData("f", "MY")]
    [InlineData("fo", "MZXQ")]
    [InlineData("foo", "MZXW6")]
    [InlineData("foob", "MZXW6YQ")]
    [InlineData("fooba", "MZXW6YTB")]
    [InlineData("foobar", "MZXW6YTBOI")]
    public void Base32_OfTheStandardsTexts_IsTheStandardsForm(string text, string encoded)
    {
        var bytes = System.Text.Encoding.ASCII.GetBytes(text);
        Assert.Equal(encoded, Base32.Encode(bytes));
        Assert.Equal(bytes, Base32.Decode(encoded));
    }
}
