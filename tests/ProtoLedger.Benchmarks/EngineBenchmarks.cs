using BenchmarkDotNet.Attributes;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Benchmarks;

/// <summary>One fluid-nulled train over 4,096 lanes: scalar twin, machine width, and without pruning.</summary>
[MemoryDiagnoser]
public class EngineBenchmarks
{
    private readonly PredictionSetting _setting = new(3);
    private readonly LaneTable _lanes = LaneTable.FromGrid(
        [.. Enumerable.Range(0, 64).Select(i => new Tissue($"{i}", 300 + 60 * i, 30 + 20 * i, null, 1))],
        [.. Enumerable.Range(0, 64).Select(i => new FieldPoint(0.7 + i / 100.0))]);

    private readonly Series _series = new(
        [new Inversion(2400, InversionTimeEnd.Excitation, EfficiencyInversion.Default)],
        new EchoTrain(9000, 120, 90, 10, 24, [150]),
        new SeriesTiming(),
        new SeriesGeometry());

    /// <summary>The scalar twin.</summary>
    [Benchmark(Baseline = true)]
    public double Scalar() => Run(pruned: true, LaneWidth.Scalar);

    /// <summary>The product's engine.</summary>
    [Benchmark]
    public double Machine() => Run(pruned: true, LaneWidth.Machine);

    /// <summary>Every state of every order.</summary>
    [Benchmark]
    public double Textbook() => Run(pruned: false, LaneWidth.Machine);

    private double Run(bool pruned, LaneWidth width) =>
        SignalPredictor.Compute(_series, _setting, _lanes, PredictionOutputs.EffectiveEcho, pruned, width).Signed[0];
}
