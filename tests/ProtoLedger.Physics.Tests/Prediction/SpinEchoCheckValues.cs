using ProtoLedger.Physics.Acquisition;
using static ProtoLedger.Physics.Tests.Predictions;

namespace ProtoLedger.Physics.Tests.Prediction;

/// <summary>
/// Check values of the finite-TR spin echo (E…), computed in double precision outside this project and confirmed there by brute-force repetition of the
/// pulse train. Formula: Haacke et al., Magnetic Resonance Imaging, 1999; Bernstein, King, Zhou, Handbook of MRI Pulse Sequences, 2004 (from memory).
/// </summary>
public sealed class SpinEchoCheckValues
{
    [Theory]
    [InlineData("E1", 90, 500, 20, 830, 80, 0.342078)]
    [InlineData("E2", 90, 500, 20, 1330, 110, 0.252620)]
    [InlineData("E3", 90, 500, 20, 650, 80, 0.406739)]
    [InlineData("E4", 90, 500, 20, 260, 80, 0.656047)]
    [InlineData("E5", 90, 2000, 80, 1330, 110, 0.369248)]
    [InlineData("E6", 90, 2000, 20, 4300, 2000, 0.365342)]
    [InlineData("E7", 90, 2000, 80, 4300, 2000, 0.346075)]
    [InlineData("E8", 90, 500, 100, 830, 80, 0.110167)]
    [InlineData("E9", 70, 500, 20, 830, 80, 0.270750)]
    [InlineData("E10", 110, 500, 20, 830, 80, 0.395508)]
    public void Signal_FiniteRepetition_IsTheCheckValue(string number, double flip, double repetition, double echo, double t1, double t2, double expected)
    {
        Assert.NotEmpty(number);
        Close(expected, Signed(Series(new SpinEcho(repetition, echo, flip, 180)), Lane(t1, t2)));
    }

    /// <summary>E11: the echo time of largest contrast between T2 80 and 110 is ln(T2b/T2a) T2a T2b / (T2b − T2a) (derived).</summary>
    [Fact]
    public void Contrast_BetweenTwoT2_PeaksAtTheCheckValue()
    {
        double Contrast(double echo) =>
            Signed(Series(new SpinEcho(60_000, echo, 90, 180)), Lane(100, 110)) - Signed(Series(new SpinEcho(60_000, echo, 90, 180)), Lane(100, 80));

        Assert.True(Contrast(93.4131) > Contrast(93.4131 - 0.5));
        Assert.True(Contrast(93.4131) > Contrast(93.4131 + 0.5));
        Assert.Equal(Contrast(93.4131 - 0.2), Contrast(93.4131 + 0.2), 1e-7);
    }

    /// <summary>E12: the repetition time of largest contrast between T1 830 and 1330 (derived; the echo time goes to zero).</summary>
    [Fact]
    public void Contrast_BetweenTwoT1_PeaksAtTheCheckValue()
    {
        double Contrast(double repetition) =>
            Signed(Series(new SpinEcho(repetition, 0.001, 90, 180)), Lane(830, 800)) - Signed(Series(new SpinEcho(repetition, 0.001, 90, 180)), Lane(1330, 800));

        Assert.True(Contrast(1041.00) > Contrast(1035));
        Assert.True(Contrast(1041.00) > Contrast(1047));
    }
}
