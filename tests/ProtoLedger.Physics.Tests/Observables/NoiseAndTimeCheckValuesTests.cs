using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;

namespace ProtoLedger.Physics.Tests.Observables;

/// <summary>
/// Noise, scan time and sharpness. Signal to noise goes with voxel volume times the root of sampling time (Edelstein 1986, Macovski 1996, from memory;
/// Med Phys 1990;17:250); values computed apart from this program.
/// </summary>
public sealed class NoiseAndTimeCheckValuesTests
{
    private static readonly SeriesGeometry Plain = new(FieldOfViewRead: 256, FieldOfViewPhase: 256, SliceThickness: 5, PixelBandwidth: 130);

    private static double Gain(SeriesGeometry from, SeriesGeometry to, int fromPartitions = 1, int toPartitions = 1, double geometryFactor = 1) =>
        RelativeNoise.Of(from, fromPartitions) / RelativeNoise.Of(to, toPartitions, geometryFactor);

    [Fact]
    public void Voxel_From08By08By3_To1By1By4() => Approximately.Relative(
        2.08333, Gain(Plain with { FieldOfViewRead = 204.8, FieldOfViewPhase = 204.8, SliceThickness = 3 }, Plain with { SliceThickness = 4 }), 1e-5);

    [Fact]
    public void Averages_Doubled() => Approximately.Relative(1.41421, Gain(Plain, Plain with { NumberOfAverages = 2 }), 1e-5);

    [Fact]
    public void Bandwidth_Doubled() => Approximately.Relative(0.707107, Gain(Plain, Plain with { PixelBandwidth = 260 }), 1e-5);

    /// <summary>1/(g √R): Pruessmann et al., MRM 1999;42:952 (from memory).</summary>
    [Theory]
    [InlineData(2, 1.1, 0.642824)]
    [InlineData(3, 1.3, 0.444116)]
    [InlineData(2, 1, 0.707107)]
    public void Acceleration_WithGeometryFactor(double acceleration, double factor, double expected) =>
        Approximately.Relative(expected, Gain(Plain, Plain with { Acceleration = acceleration }, geometryFactor: factor), 1e-5);

    [Fact]
    public void Matrix_Doubled() => Approximately.Relative(0.353553, Gain(Plain, Plain with { MatrixRead = 512, MatrixPhase = 512 }), 1e-5);

    [Fact]
    public void Partitions_Doubled() => Approximately.Relative(
        1.41421, Gain(Plain with { Dimensions = 3 }, Plain with { Dimensions = 3 }, 32, 64), 1e-5);

    [Fact]
    public void PartialFourier_SixEighths() => Approximately.Relative(0.866025, Gain(Plain, Plain with { PartialFourier = 0.75 }), 1e-5);

    [Fact]
    public void Everything_AtOnce()
    {
        var before = new SeriesGeometry(2, 240, 240, 256, 256, 5, 0, 1, 130);
        var after = new SeriesGeometry(2, 240, 240, 320, 256, 4, 0, 2, 200);

        Approximately.Relative(0.729712, Gain(before, after), 1e-5);
    }

    [Fact]
    public void Comparison_OfDifferentReconstructions_IsRefusedInWords()
    {
        Assert.Null(ContrastToNoise.WhyNotComparable(Plain, Plain with { SliceThickness = 3, NumberOfAverages = 2 }));
        Assert.Contains("acceleration 1 against 2", ContrastToNoise.WhyNotComparable(Plain, Plain with { Acceleration = 2 }), StringComparison.Ordinal);
        Assert.Contains("partial Fourier", ContrastToNoise.WhyNotComparable(Plain, Plain with { PartialFourier = 0.75 }), StringComparison.Ordinal);
        Assert.Contains("3D", ContrastToNoise.WhyNotComparable(Plain, Plain with { Dimensions = 3 }), StringComparison.Ordinal);
    }

    /// <summary>Twice the averages: contrast per noise grows by √2, time by 2, so the quotient stays.</summary>
    [Fact]
    public void PerRootTime_DoesNotRewardAverages()
    {
        var once = ContrastToNoise.PerRootTime(0.1, RelativeNoise.Of(Plain), 100);
        var twice = ContrastToNoise.PerRootTime(0.1, RelativeNoise.Of(Plain with { NumberOfAverages = 2 }), 200);

        Approximately.Relative(once, twice, 1e-12);
    }

    /// <summary>TR times the number of TRs (teaching texts).</summary>
    [Theory]
    [InlineData(500, 256, 1, 1, 128)]
    [InlineData(2000, 256, 1, 1, 512)]
    [InlineData(200, 256, 1, 1, 51.2)]
    [InlineData(9000, 256, 16, 1, 144)]
    [InlineData(4000, 256, 15, 1, 72)]
    [InlineData(4000, 256, 15, 2, 144)]
    public void ScanTime_TwoDimensional(double repetitionTime, int lines, int train, double averages, double expected)
    {
        Readout readout = train == 1
            ? new SpinEcho(repetitionTime, 20, 90, 180)
            : new EchoTrain(repetitionTime, 80, 90, 10, train, [180]);
        var series = new Series([], readout, new SeriesTiming(), Plain with { MatrixPhase = lines, NumberOfAverages = averages });

        Approximately.Relative(expected, ScanTime.Seconds(series), 1e-12);
    }

    [Fact]
    public void ScanTime_ThreeDimensionalGradientEcho() => Approximately.Relative(
        262.144, Seconds3D(new SpoiledGradientEcho(8, 3, 15, []), 256, 128, 1), 1e-12);

    [Fact]
    public void ScanTime_InversionPreparedThreeDimensional() => Approximately.Relative(
        276, Seconds3D(new SpoiledGradientEchoTrain(2300, 3, 9, 7, 176, EncodingOrder.Linear), 240, 176, 2), 1e-12);

    [Fact]
    public void ScanTime_ThreeDimensionalTrain() => Approximately.Relative(
        329.6, Seconds3D(new EchoTrain(3200, 300, 90, 4, 110, [120]), 256, 176, 4), 1e-12);

    [Fact]
    public void ScanTime_WithConcatenationsAndDummies_CountsThem()
    {
        var series = new Series([], new EchoTrain(9000, 120, 90, 10, 16, [150]), new SeriesTiming(30, Concatenations: 2, DummyRepetitions: 1), Plain);

        Approximately.Relative((16 + 1) * 9.0 * 2, ScanTime.Seconds(series), 1e-12);
    }

    /// <summary>Teaching phantom series, large phantom of the American College of Radiology (from memory): 51.2, 128 and 512 s by the formula.</summary>
    [Theory]
    [InlineData(200, 20, 51.2)]
    [InlineData(500, 20, 128)]
    [InlineData(2000, 80, 512)]
    public void ScanTime_OfPhantomSeries(double repetitionTime, double echoTime, double expected)
    {
        var series = new Series([], new SpinEcho(repetitionTime, echoTime, 90, 180), new SeriesTiming(11), new SeriesGeometry(2, 250, 250, 256, 256, 5, 5));

        Approximately.Relative(expected, ScanTime.Seconds(series), 1e-12);
        Approximately.Relative(0.976563, series.Geometry.FieldOfViewRead / series.Geometry.MatrixRead, 1e-6);
        Assert.Equal(10, series.Geometry.SliceThickness + series.Geometry.SliceGap);
    }

    /// <summary>Width at half height of |PSF|, 256 lines, numeric (Constable, Gore, MRM 1992;28:9, from memory); tolerance 1 %.</summary>
    [Theory]
    [InlineData(100, 80, 1.28087, 1.47625)]
    [InlineData(200, 80, 1.53132, 1.87929)]
    [InlineData(400, 80, 2.80199, 3.17785)]
    [InlineData(200, 100, 1.40531, 1.69958)]
    [InlineData(160, 40, 2.21798, 2.58422)]
    [InlineData(200, 2000, 1.20716, 1.22427)]
    public void Width_OfADecayingTrain(double train, double t2, double linear, double centreOut)
    {
        Approximately.Relative(linear, PointSpread.Width(PointSpread.Decay(256, train, t2, false)), 0.01);
        Approximately.Relative(centreOut, PointSpread.Width(PointSpread.Decay(256, train, t2, true)), 0.01);
    }

    /// <summary>Asymptotes √3 T/(π T2) and 2T/(π T2) (derived): a long train of strong decay.</summary>
    [Fact]
    public void Width_OfStrongDecay_MeetsTheAsymptotes()
    {
        Approximately.Relative(Math.Sqrt(3) * 12 / Math.PI, PointSpread.Width(PointSpread.Decay(1024, 1200, 100, false)), 0.01);
        Approximately.Relative(24 / Math.PI, PointSpread.Width(PointSpread.Decay(1024, 1200, 100, true)), 0.01);
    }

    [Fact]
    public void Width_WithoutDecay_IsThatOfASinc() => Approximately.Relative(1.2067, PointSpread.Width(PointSpread.Decay(256, 100, 1e9, false)), 1e-4);

    /// <summary>The middle echo as effective gives the linear order, the first the centre-out order.</summary>
    [Fact]
    public void FromTrain_OrdersByTheEffectiveEcho()
    {
        var echoes = Enumerable.Range(0, 16).Select(e => Math.Exp(-(e + 1) * 10 / 80.0)).ToArray();

        var linear = PointSpread.FromTrain(echoes, 8, 256);
        var centreOut = PointSpread.FromTrain(echoes, 0, 256);

        Assert.Equal(echoes[0], linear[0]);
        Assert.Equal(echoes[15], linear[255]);
        Assert.Equal(echoes[0], centreOut[128]);
        Assert.Equal(echoes[15], centreOut[0]);
        Assert.Equal(echoes[15], centreOut[255]);
        Assert.Equal(echoes[5], PointSpread.FromTrain(echoes, 5, 256)[128]);
    }

    [Fact]
    public void Width_OfNothing_IsRefused()
    {
        Assert.Throws<ArgumentException>(() => PointSpread.Width([1]));
        Assert.Throws<ArgumentException>(() => PointSpread.Width([0, 0, 0]));
    }

    private static double Seconds3D(Readout readout, int lines, int partitions, double acceleration) =>
        ScanTime.Seconds(new Series([], readout, new SeriesTiming(partitions), Plain with { Dimensions = 3, MatrixPhase = lines, Acceleration = acceleration }));
}
