using CsCheck;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using static ProtoLedger.Physics.Tests.Predictions;

namespace ProtoLedger.Physics.Tests.Prediction;

/// <summary>What holds for any series and any tissue.</summary>
public sealed class PropertyTests
{
    private const int Iterations = 200;

    private static readonly Gen<EchoTrain> Trains =
        from length in Gen.Int[1, 24]
        from effective in Gen.Int[1, 24]
        from spacing in Gen.Double[4, 15]
        from repetition in Gen.Double[3500, 12000]
        from angles in Gen.Double[30, 180].Array[length]
        from scheduled in Gen.Bool
        select new EchoTrain(repetition, Math.Min(effective, length) * spacing, 90, spacing, length, scheduled || length == 1 ? angles : [angles[0]]);

    private static readonly Gen<Series> AnySeries =
        from train in Trains
        from inversion in Gen.Double[100, 2900]
        from efficiency in Gen.Double[0, 1]
        from kind in Gen.Int[0, 5]
        select kind switch
        {
            0 => Series(train),
            1 => Series(train, new T2Preparation(40)),
            2 => Series(new SpoiledGradientEcho(20 + inversion / 10, 3, 25, [])),
            3 => Series(new BalancedGradientEcho(5, 2.5, 45)),
            4 => Series(new SpoiledGradientEchoTrain(3500, 3, 9, 6, 64, EncodingOrder.Linear), Inversion(inversion, new EfficiencyInversion("f", efficiency))),
            _ => Series(train, Inversion(inversion, new EfficiencyInversion("f", efficiency))),
        };

    private static readonly Gen<Tissue> Tissues =
        from t1 in Gen.Double[150, 4500]
        from ratio in Gen.Double[0.01, 1]
        from density in Gen.Double[0.1, 1]
        from fat in Gen.Bool
        select new Tissue("any", t1, t1 * ratio, t1 * ratio * 0.7, density, 1.1, fat);

    private static readonly Gen<FieldPoint> Points =
        from b1 in Gen.Double[0.5, 1.5]
        from frequency in Gen.Double[-200, 200]
        from inflow in Gen.Double[0, 1]
        select new FieldPoint(b1, frequency, inflow);

    [Fact]
    public void Signal_AnySeries_IsWithinTheProtonDensity() =>
        Gen.Select(AnySeries, Tissues, Points).Sample(
            (series, tissue, point) =>
            {
                var table = SignalPredictor.Predict(series, Ideal, LaneTable.FromGrid([tissue], [point]), PredictionOutputs.AllEchoes);
                return table.Magnitude[0] <= tissue.ProtonDensity * (1 + 1e-12)
                    && Math.Abs(table.Signed[0]) <= table.Magnitude[0] * (1 + 1e-12)
                    && Math.Abs(table.LongitudinalBeforeExcitation[0]) <= 1 + 1e-12
                    && table.EchoMagnitudes.All(e => e >= 0 && e <= tissue.ProtonDensity * (1 + 1e-12));
            },
            iter: Iterations);

    [Fact]
    public void Signal_ProtonDensity_Scales() =>
        Gen.Select(AnySeries, Tissues, Points, Gen.Double[0.1, 5]).Sample(
            (series, tissue, point, factor) =>
            {
                double Of(double density) =>
                    SignalPredictor.Predict(series, Ideal, LaneTable.FromGrid([tissue with { ProtonDensity = density }], [point])).Signed[0];
                return Near(Of(factor), factor * Of(1));
            },
            iter: Iterations);

    [Fact]
    public void Signal_UnitB1_IsNominal() =>
        Gen.Select(AnySeries, Tissues).Sample(
            (series, tissue) => Predict(series, tissue, new FieldPoint(1)) == Predict(series, tissue, new FieldPoint()),
            iter: Iterations);

    /// <summary>f = 0 saturates; a pulse that leaves Mz as it is (efficiency offset aside) is a rotation of 0° and equals no inversion.</summary>
    [Fact]
    public void Signal_InversionOfNoEfficiency_IsThatWithoutInversion() =>
        Gen.Select(Trains, Tissues, Gen.Double[100, 2900]).Sample(
            (train, tissue, time) => Near(
                Predict(Series(train, Inversion(time, new HardPulse("nothing", 0))), tissue, new FieldPoint()), Predict(Series(train), tissue, new FieldPoint())),
            iter: Iterations);

    [Fact]
    public void Signal_PermutedLanes_ArePermuted() =>
        Gen.Select(AnySeries, Gen.Select(Tissues, Points).Array[2, 40], Gen.Int[0, 10_000]).Sample(
            (series, cells, seed) =>
            {
                var lanes = new LaneTable(cells.Length);
                for (var i = 0; i < cells.Length; i++)
                    lanes.Set(i, cells[i].Item1, cells[i].Item2);
                var order = Enumerable.Range(0, cells.Length).ToArray();
                new Random(seed).Shuffle(order);
                var straight = SignalPredictor.Predict(series, Ideal, lanes).Signed;
                var permuted = SignalPredictor.Predict(series, Ideal, lanes.Select(order)).Signed;
                return order.Select((from, to) => straight[from] == permuted[to]).All(same => same);
            },
            iter: 60);

    [Fact]
    public void SteadyState_ManyDummies_IsTheirLimit() =>
        Gen.Select(Trains, Tissues, Points).Sample(
            (train, tissue, point) =>
            {
                var series = Series(train, Inversion(900, EfficiencyInversion.Default));
                var dummies = series with { Timing = new SeriesTiming(DummyRepetitions: 60, State: StartState.AfterDummies) };
                return Near(Predict(series, tissue, point), Predict(dummies, tissue, point));
            },
            iter: Iterations);

    [Fact]
    public void Signal_MoreDiffusionWeighting_Falls() =>
        Gen.Select(Tissues, Gen.Double[0, 1500], Gen.Double[1, 500]).Sample(
            (tissue, b, more) =>
                Predict(Series(new DiffusionSpinEcho(4000, 80, 90, 180, b + more)), tissue, new FieldPoint())
                < Predict(Series(new DiffusionSpinEcho(4000, 80, 90, 180, b)), tissue, new FieldPoint()),
            iter: Iterations);

    [Fact]
    public void Inflow_PreparedAndUnprepared_MixBeforeTheMagnitude() =>
        Gen.Select(Trains, Tissues, Gen.Double[0, 1]).Sample(
            (train, tissue, fraction) =>
            {
                var series = Series(train, Inversion(400, EfficiencyInversion.Default));
                var mixed = SignalPredictor.Predict(series, Ideal, LaneTable.FromGrid([tissue], [new FieldPoint(1, 0, fraction)]));
                var fresh = Predict(Series(train) with { Timing = new SeriesTiming(State: StartState.FirstShot) }, tissue, new FieldPoint());
                var signed = (1 - fraction) * Predict(series, tissue, new FieldPoint()) + fraction * fresh;
                return Near(signed, mixed.Signed[0]) && Near(Math.Abs(signed), mixed.Magnitude[0]);
            },
            iter: Iterations);

    private static double Predict(Series series, Tissue tissue, FieldPoint point) =>
        SignalPredictor.Predict(series, Ideal, LaneTable.FromGrid([tissue], [point])).Signed[0];

    private static bool Near(double expected, double actual) => Math.Abs(expected - actual) <= 1e-12 * (1 + Math.Abs(expected));
}
