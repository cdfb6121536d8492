using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Physics.Tests;

/// <summary>Short forms for building series and lanes in tests.</summary>
internal static class Predictions
{
    internal static PredictionSetting Ideal { get; } = new(3, PulseModelling.Ideal);

    internal static EfficiencyInversion Perfect => EfficiencyInversion.Perfect;

    internal static Series Series(Readout readout, params Preparation[] preparations) =>
        new(preparations, readout, new SeriesTiming(), new SeriesGeometry());

    internal static Series FirstShot(Readout readout) =>
        Series(readout) with { Timing = new SeriesTiming(State: StartState.FirstShot) };

    internal static Inversion Inversion(double time, RfPulse? pulse = null) => new(time, InversionTimeEnd.Excitation, pulse ?? Perfect);

    internal static LaneTable Lane(double t1, double t2, double b1 = 1) =>
        LaneTable.FromGrid([new Tissue("lane", t1, t2, t2, 1, 1)], [new FieldPoint(b1)]);

    internal static double Signed(Series series, LaneTable lanes) => SignalPredictor.Predict(series, Ideal, lanes).Signed[0];

    internal static double[] Echoes(Series series, LaneTable lanes) =>
        SignalPredictor.Predict(series, Ideal, lanes, PredictionOutputs.AllEchoes).Echoes;

    internal static double Before(Series series, LaneTable lanes) => SignalPredictor.Predict(series, Ideal, lanes).LongitudinalBeforeExcitation[0];

    /// <summary>Relative comparison as the check values are printed: six digits.</summary>
    internal static void Close(double expected, double actual, double relative = 1e-5) =>
        Assert.True(Math.Abs(actual - expected) <= relative * Math.Abs(expected), $"expected {expected}, got {actual}");
}
