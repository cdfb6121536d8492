using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Prediction;

/// <summary>A fixed set of predictions, one or more of every family: their numbers stand for the model.</summary>
internal static class Probes
{
    private static readonly PredictionSetting Setting = new(3);

    internal static IEnumerable<double> Results()
    {
        var lanes = LaneTable.FromGrid(
            [
                new Tissue("a", 850, 69, 45, 0.7, 0.7),
                new Tissue("b", 4300, 1600, 300, 1, 3),
                new Tissue("c", 371, 90, 18, 0.9, 0.05, IsFat: true),
            ],
            [new FieldPoint(), new FieldPoint(0.8, 40, 0.2)]);
        foreach (var series in All())
        {
            var table = SignalPredictor.Predict(series, Setting, lanes, PredictionOutputs.AllEchoes);
            foreach (var column in new[] { table.Signed, table.Magnitude, table.LongitudinalBeforeExcitation, table.LongitudinalAtEnd, table.Echoes })
                foreach (var value in column)
                    yield return value;
        }

        yield return NullTimes.Find(All().First(s => s.Preparations.Count == 1), 0, Setting, lanes)[0] ?? 0;
    }

    internal static IEnumerable<Series> All()
    {
        var inversion = new Inversion(2400, InversionTimeEnd.Excitation, EfficiencyInversion.Default);
        var train = new EchoTrain(9000, 80, 90, 10, 12, [150]);
        var scheduled = train with { RefocusingFlipAngles = [160, 150, 140, 130, 120, 110, 100, 95, 90, 90, 90, 90], FlipBackAngle = -90 };
        var gradient = new SpoiledGradientEcho(150, 1.15, 40, [2.3]);
        yield return Of(new SpinEcho(600, 12, 90, 170));
        yield return Of(train, inversion);
        yield return Of(scheduled with { RepetitionTime = 3000 });
        yield return Of(train with { RepetitionTime = 11000 }, inversion with { InversionTime = 3700 }, inversion with { InversionTime = 560 });
        yield return Of(train, inversion with { Pulse = new HyperbolicSecantPulse("secant", 10, 800, 4.9, 600), SlabThickness = 1.4 });
        yield return Of(gradient);
        yield return Of(gradient with { RepetitionTime = 10, EchoTime = 3, ExcitationFlipAngle = 15, FurtherEchoTimes = [], SpoilingIncrement = 50 });
        yield return Of(new BalancedGradientEcho(5, 2.5, 45));
        yield return Of(new SpoiledGradientEchoTrain(2300, 3, 9, 7, 176, EncodingOrder.Linear), inversion with { InversionTime = 900, End = InversionTimeEnd.KSpaceCentre });
        yield return Of(new DiffusionSpinEcho(6000, 80, 90, 180, 1000));
        yield return Of(new SpinEcho(3000, 60, 90, 180), new T2Preparation(50));
        yield return Of(new SpoiledGradientEchoTrain(1500, 2, 12, 5, 40, EncodingOrder.Centric), new T2Preparation(40));
        yield return Of(new SpinEcho(3000, 60, 90, 180), new SpectralSaturation(new GaussianPulse("gaussian", 100, 8, 0.17), 4)) with { Timing = new SeriesTiming(20) };
        yield return Of(train with { RepetitionTime = 5000 }, new SpectralInversion(120, new GaussianPulse("gaussian", 180, 10, 0.17))) with { Timing = new SeriesTiming(10) };
        yield return Of(train with { RepetitionTime = 1500 }) with { Timing = new SeriesTiming(State: StartState.FirstShot) };
        yield return Of(train with { RepetitionTime = 1500 }) with { Timing = new SeriesTiming(DummyRepetitions: 2, State: StartState.AfterDummies) };
    }

    private static Series Of(Readout readout, params Preparation[] preparations) => new(preparations, readout, new SeriesTiming(), new SeriesGeometry());
}
