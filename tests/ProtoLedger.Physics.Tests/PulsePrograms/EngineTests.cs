using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Physics.Tests.PulsePrograms;

/// <summary>The engine against itself: widths, pruning, guards, extreme lanes. Truth stands in the other test classes.</summary>
public sealed class EngineTests
{
    public static TheoryData<int> Programs() => [.. Enumerable.Range(0, Probes.All().Count())];

    [Theory]
    [MemberData(nameof(Programs))]
    public void Compute_EveryLengthAndWidth_EqualsTheScalarTwinToTheBit(int program)
    {
        var series = Probes.All().ElementAt(program);
        for (var count = 0; count <= 67; count += count < 19 ? 1 : 12)
        {
            var lanes = Random(count, 17 + program);
            var scalar = Compute(series, lanes, LaneWidth.Scalar);
            foreach (var width in new[] { LaneWidth.Two, LaneWidth.Four, LaneWidth.Eight, LaneWidth.Machine })
                AssertBits(scalar, Compute(series, lanes, width));
        }
    }

    [Theory]
    [InlineData(nameof(LaneWidth.Two))]
    [InlineData(nameof(LaneWidth.Four))]
    [InlineData(nameof(LaneWidth.Eight))]
    public void Compute_EveryLengthUpTo67_EqualsTheScalarTwinToTheBit(string lanesAtOnce)
    {
        var width = Enum.Parse<LaneWidth>(lanesAtOnce);
        var series = Predictions.Series(new EchoTrain(4000, 50, 90, 10, 8, [140]), Predictions.Inversion(1500, EfficiencyInversion.Default));
        for (var count = 0; count <= 67; count++)
        {
            var lanes = Random(count, 5);
            AssertBits(Compute(series, lanes, LaneWidth.Scalar), Compute(series, lanes, width));
        }
    }

    [Theory]
    [MemberData(nameof(Programs))]
    public void Compute_WithoutPruning_AgreesToTheThirteenthDigit(int program)
    {
        var series = Probes.All().ElementAt(program);
        var lanes = Random(40, 3);
        var pruned = SignalPredictor.Compute(series, new PredictionSetting(3), lanes, PredictionOutputs.AllEchoes, pruned: true, LaneWidth.Machine);
        var textbook = SignalPredictor.Compute(series, new PredictionSetting(3), lanes, PredictionOutputs.AllEchoes, pruned: false, LaneWidth.Machine);

        AssertNear(textbook.Signed, pruned.Signed);
        AssertNear(textbook.Echoes, pruned.Echoes);
        AssertNear(textbook.LongitudinalBeforeExcitation, pruned.LongitudinalBeforeExcitation);
        AssertNear(textbook.LongitudinalAtEnd, pruned.LongitudinalAtEnd);
    }

    [Theory]
    [InlineData(1e-3)]
    [InlineData(0.05)]
    [InlineData(0.5)]
    [InlineData(2)]
    public void Compute_VeryShortT2AmongOthers_IsFiniteAndLeavesTheOthersAlone(double t2)
    {
        var series = Predictions.Series(new EchoTrain(3000, 240, 90, 10, 32, [120]));
        var lanes = Random(20, 9);
        var alone = SignalPredictor.Predict(series, Predictions.Ideal, lanes).Signed;
        lanes.T2[7] = t2;
        lanes.T1[7] = 1000;
        var table = SignalPredictor.Predict(series, Predictions.Ideal, lanes, PredictionOutputs.AllEchoes);
        var plain = SignalPredictor.Predict(series, Predictions.Ideal, lanes);
        var textbook = SignalPredictor.Compute(series, Predictions.Ideal, lanes, PredictionOutputs.AllEchoes, pruned: false, LaneWidth.Machine);

        Assert.All(table.Echoes, e => Assert.True(double.IsFinite(e)));
        AssertNear(textbook.Echoes, table.Echoes);
        for (var i = 0; i < lanes.Count; i++)
            if (i != 7)
                Assert.Equal(alone[i], plain.Signed[i]);
    }

    [Fact]
    public unsafe void Run_Results_StayWithinTheirLanes()
    {
        const int Count = 21;
        const double Guard = 12345;
        var program = SeriesCompiler.Compile(Predictions.Series(new EchoTrain(3000, 20, 90, 10, 4, [150])));
        var lanes = Random(Count, 2);
        var columns = new double[4][];
        for (var i = 0; i < 4; i++)
        {
            columns[i] = new double[Count + 2];
            Array.Fill(columns[i], Guard);
        }

        fixed (double* t1 = lanes.T1, t2 = lanes.T2, b1 = lanes.B1Scale, signed = columns[0], before = columns[1], end = columns[2], period = columns[3])
        {
            Engine.Run(program.Plan, program.Durations, program.Angles, new EngineArguments
            {
                Count = Count, T1 = t1, T2 = t2, B1 = b1, Signed = signed + 1, Before = before + 1, End = end + 1, Period = period + 1,
            });
        }

        Assert.All(columns, c => Assert.Equal((Guard, Guard), (c[0], c[^1])));
        Assert.All(columns, c => Assert.DoesNotContain(Guard, c[1..^1]));
    }

    [Fact]
    public void PredictAll_AnyNumberOfThreads_GivesTheSameBits()
    {
        var requests = Probes.All().Select((s, i) => new PredictionRequest(s, new PredictionSetting(3), Random(30, i))).ToArray();

        var one = SignalPredictor.PredictAll(requests, 1);
        var four = SignalPredictor.PredictAll(requests, 4);

        for (var i = 0; i < requests.Length; i++)
            AssertBits(one[i], four[i]);
    }

    [Fact]
    public void PredictAll_OneBadRequest_IsRefusedWithItsReason()
    {
        var good = new PredictionRequest(Predictions.Series(new SpinEcho(500, 10, 90, 180)), Predictions.Ideal, Random(3, 1));
        var bad = good with { Series = Predictions.Series(new SpinEcho(5, 10, 90, 180)) };

        var error = Assert.Throws<ArgumentException>(() => SignalPredictor.PredictAll([good, bad], 2));

        Assert.Contains("RepetitionTime", error.Message, StringComparison.Ordinal);
    }

    internal static LaneTable Random(int count, int seed)
    {
        var random = new Random(seed);
        var lanes = new LaneTable(count);
        for (var i = 0; i < count; i++)
        {
            lanes.T1[i] = 200 + 4200 * random.NextDouble();
            lanes.T2[i] = Math.Min(lanes.T1[i], 15 + 1500 * Math.Pow(random.NextDouble(), 3));
            lanes.T2Star[i] = lanes.T2[i] * 0.6;
            lanes.ProtonDensity[i] = 0.5 + 0.5 * random.NextDouble();
            lanes.ApparentDiffusionCoefficient[i] = 3 * random.NextDouble();
            lanes.IsFat[i] = random.Next(5) == 0;
            lanes.B1Scale[i] = 0.6 + 0.8 * random.NextDouble();
            lanes.OffResonanceHz[i] = 200 * (random.NextDouble() - 0.5);
            lanes.UnpreparedInflow[i] = random.Next(3) == 0 ? random.NextDouble() : 0;
        }

        return lanes;
    }

    private static SignalTable Compute(Series series, LaneTable lanes, LaneWidth width) =>
        SignalPredictor.Compute(series, new PredictionSetting(3), lanes, PredictionOutputs.AllEchoes, pruned: true, width);

    private static void AssertBits(SignalTable expected, SignalTable actual)
    {
        Assert.Equal(Bits(expected), Bits(actual));
    }

    private static IEnumerable<long> Bits(SignalTable table) =>
        table.Signed.Concat(table.Magnitude).Concat(table.LongitudinalBeforeExcitation).Concat(table.LongitudinalAtEnd).Concat(table.Echoes)
            .Select(BitConverter.DoubleToInt64Bits);

    private static void AssertNear(double[] expected, double[] actual)
    {
        Assert.Equal(expected.Length, actual.Length);
        for (var i = 0; i < expected.Length; i++)
            Assert.Equal(expected[i], actual[i], 1e-13);
    }
}
