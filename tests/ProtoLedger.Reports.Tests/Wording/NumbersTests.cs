using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Tests.Wording;

public sealed class NumbersTests
{
    [Theory]
    [InlineData(0, "0.00")]
    [InlineData(0.05, "0.05")]
    [InlineData(0.004, "under 0.01")]
    [InlineData(-0.004, "about 0")]
    [InlineData(0.6789, "0.68")]
    [InlineData(1.04, "1.0")]
    [InlineData(9.94, "9.9")]
    [InlineData(12.4, "12")]
    [InlineData(2404.4, "2404")]
    [InlineData(-0.17, "−0.17")]
    public void Plain_HasTwoSignificantDigitsAndAtMostTwoDecimals(double value, string text) => Assert.Equal(text, Numbers.Plain(value));

    [Theory]
    [InlineData(1.63, 1.62, "1.63", "1.62")]
    [InlineData(1.880, 1.877, "1.88", "1.88")]
    [InlineData(0.05, 1.0, "0.05", "1.0")]
    [InlineData(2404, 1940, "2404", "1940")]
    public void Pair_TellsNumbersApartWithThreeDigitsAtMost(double old, double now, string shown, string shownNow) =>
        Assert.Equal((shown, shownNow), Numbers.Pair(old, now));

    [Theory]
    [InlineData(186, "3:06")]
    [InlineData(59.6, "1:00")]
    public void Minutes_RoundsToSeconds(double seconds, string text) => Assert.Equal(text, Numbers.Minutes(seconds));

    [Theory]
    [InlineData(1, "all plausible tissue values")]
    [InlineData(0.995, "more than 99 % of plausible tissue values")]
    [InlineData(0.87, "about 87 % of plausible tissue values")]
    [InlineData(0.004, "less than 1 % of plausible tissue values")]
    [InlineData(0, "no plausible tissue value")]
    public void OfTissueValues_IsAPhrase(double share, string text) => Assert.Equal(text, Numbers.OfTissueValues(share));

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void Plain_NotFinite_IsRefused(double value) => Assert.Throws<ArgumentException>(() => Numbers.Plain(value));
}
