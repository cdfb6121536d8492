using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Regression.Prediction;

/// <summary>Observables that need every echo of a train or the train without relaxation.</summary>
internal static class TrainObservables
{
    private const double Endless = 1e6;

    /// <summary>Width of the point-spread function, pixels; 1.2067 without a train.</summary>
    internal static ObservableValues BlurWidth(SignalCells cells, ObservableRequest request)
    {
        var context = cells.Context;
        var lines = context.Acquisition.Geometry.MatrixPhase;
        var effective = context.Acquisition.Readout switch
        {
            EchoTrain train => (int)Math.Round(train.EchoTime / train.EchoSpacing) - 1,
            SpoiledGradientEchoTrain train => train.CentreIndex,
            _ => -1,
        };
        if (effective < 0)
            return ObservableValues.Missing("The series reads one line of k-space after each excitation: relaxation does not blur it.");
        var table = SignalPredictor.Predict(context.Acquisition, context.Setting, cells.Lanes(request.Tissue!, request.Point), PredictionOutputs.AllEchoes);
        var echoes = table.EchoTimes.Count;
        var values = new double[cells.Draws];
        Parallel.For(0, values.Length, draw =>
        {
            var weights = PointSpread.FromTrain(table.EchoMagnitudes.AsSpan(draw * echoes, echoes), effective, lines);
            values[draw] = weights.Any(w => w > 0) ? PointSpread.Width(weights) : double.NaN;
        });
        return ObservableValues.Of(values);
    }

    /// <summary>Echo time of a plain spin echo with the same T2 contrast, ms.</summary>
    internal static ObservableValues EquivalentEchoTime(SignalCells cells, ObservableRequest request)
    {
        var context = cells.Context;
        if (context.Acquisition.Readout is not EchoTrain)
            return ObservableValues.Missing("The series is no train of spin echoes.");
        var lanes = cells.Lanes(request.Tissue!, request.Point);
        var relaxing = SignalPredictor.Predict(context.Acquisition, context.Setting, lanes);
        var endless = new LaneTable(1);
        (endless.T1[0], endless.T2[0], endless.B1Scale[0], endless.OffResonanceHz[0]) = (Endless, Endless, lanes.B1Scale[0], lanes.OffResonanceHz[0]);
        var plain = context.Acquisition with { Preparations = [], Timing = context.Acquisition.Timing with { State = StartState.FirstShot } };
        var whole = SignalPredictor.Predict(plain, context.Setting, endless).Signed[0];
        var values = new double[cells.Draws];
        for (var i = 0; i < values.Length; i++)
        {
            var available = relaxing.LongitudinalBeforeExcitation[i] * lanes.ProtonDensity[i];
            values[i] = Math.Abs(available) < 1e-6 ? double.NaN : ContrastEquivalentEchoTime.Of(relaxing.Signed[i] / available, whole, lanes.T2[i]);
        }

        return values.Any(double.IsNaN)
            ? ObservableValues.Missing($"{request.Tissue} is nulled: nothing is left whose decay could be compared.")
            : ObservableValues.Of(values);
    }
}
