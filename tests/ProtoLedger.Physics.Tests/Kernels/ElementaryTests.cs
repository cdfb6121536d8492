using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Tests.Kernels;

/// <summary>Own elementary functions against the platform's, and vector forms against the scalar twin.</summary>
public sealed class ElementaryTests
{
    private const int Values = 20_000;

    [Fact]
    public void Exp_WholeRange_IsWithinTwoUnitsOfThePlatform() =>
        AssertUnits(Spread(-700, 700), Elementary.Exp, Math.Exp);

    [Fact]
    public void Exp_SmallArguments_IsWithinTwoUnitsOfThePlatform() =>
        AssertUnits(Spread(-2, 0), Elementary.Exp, Math.Exp);

    [Theory]
    [InlineData(0, 1)]
    [InlineData(-709, 0)]
    [InlineData(double.NegativeInfinity, 0)]
    [InlineData(710, double.PositiveInfinity)]
    public void Exp_AtTheEnds_IsExact(double x, double expected) => Assert.Equal(expected, Elementary.Exp(x));

    [Fact]
    public void SineAndCosine_ManyTurns_AreWithinTwoUnitsOfThePlatform()
    {
        AssertUnits(Spread(-1000, 1000), Elementary.Sin, Math.Sin);
        AssertUnits(Spread(-1000, 1000), Elementary.Cos, Math.Cos);
    }

    [Fact]
    public void SineAndCosine_NearTheAxes_AreWithinTwoUnitsOfThePlatform()
    {
        var near = Enumerable.Range(-8, 17).SelectMany(n => new[] { -1e-9, 0, 1e-9 }.Select(d => n * Math.PI / 2 + d)).ToArray();
        AssertUnits(near, Elementary.Sin, Math.Sin);
        AssertUnits(near, Elementary.Cos, Math.Cos);
    }

    [Fact]
    public void Log_ManyMagnitudes_IsWithinTwoUnitsOfThePlatform() =>
        AssertUnits([.. Spread(-300, 300).Select(x => Math.Pow(10, x))], Elementary.Log, Math.Log);

    [Fact]
    public void VectorForms_AnyLane_EqualTheScalarTwinToTheBit()
    {
        var values = Spread(-700, 700);
        AssertBits<Lanes2>(values);
        AssertBits<Lanes4>(values);
        AssertBits<Lanes8>(values);
        AssertBits<LanePair<Lanes8>>(values);
    }

    private static double[] Spread(double low, double high) =>
        [.. Enumerable.Range(0, Values).Select(i => low + (high - low) * (i + 0.37) / Values)];

    private static void AssertUnits(double[] values, Func<double, double> own, Func<double, double> platform)
    {
        foreach (var x in values)
        {
            var distance = Math.Abs(BitConverter.DoubleToInt64Bits(own(x)) - BitConverter.DoubleToInt64Bits(platform(x)));
            Assert.True(distance <= 2, $"x = {x:R}: {own(x):R} is {distance} units from {platform(x):R}");
        }
    }

    private static unsafe void AssertBits<T>(double[] values)
        where T : unmanaged, ILanes<T>
    {
        var results = stackalloc double[4 * T.Width];
        fixed (double* start = values)
        {
            for (var i = 0; i + T.Width <= values.Length; i += T.Width)
            {
                var x = T.Load(start + i);
                Elementary.SinCos(x, out var sine, out var cosine);
                T.Store(Elementary.Exp(x), results);
                T.Store(sine, results + T.Width);
                T.Store(cosine, results + 2 * T.Width);
                T.Store(Elementary.Log(x * x), results + 3 * T.Width);
                for (var lane = 0; lane < T.Width; lane++)
                {
                    var value = values[i + lane];
                    double[] expected = [Elementary.Exp(value), Elementary.Sin(value), Elementary.Cos(value), Elementary.Log(value * value)];
                    for (var f = 0; f < 4; f++)
                        Assert.Equal(BitConverter.DoubleToInt64Bits(expected[f]), BitConverter.DoubleToInt64Bits(results[f * T.Width + lane]));
                }
            }
        }
    }
}
