using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Regression.Prediction;

/// <summary>Turns requests into values: asks for every signal first, predicts them in one batch, then reads.</summary>
internal sealed class ObservableComputer
{
    /// <summary>Chemical shift of fat from water, ppm; both −3.4 and −3.5 are in use.</summary>
    internal const double FatShiftPpm = -3.5;

    private readonly SignalCells cells;
    private readonly List<ObservableRequest> requests = [];
    private readonly Dictionary<ObservableRequest, ObservableValues> missing = [];
    private readonly Dictionary<(string Tissue, FieldPoint Point), SignalDerivatives> derivatives = [];
    private readonly Dictionary<ObservableRequest, ObservableValues> nulls = [];

    internal ObservableComputer(SeriesContext context, int[] draws) => cells = new(context, draws);

    internal SignalCells Cells => cells;

    private SeriesContext Context => cells.Context;

    private Series Series => cells.Context.Acquisition;

    /// <summary>Asks for an observable.</summary>
    internal void Need(ObservableRequest request)
    {
        requests.Add(request);
        foreach (var tissue in (string?[])[request.Tissue, request.Reference])
        {
            if (tissue is null)
                continue;
            // Null times run the engine themselves, but at the same lanes: a tissue that is unknown is unknown there too.
            var because = Runs(request.Name) ? cells.Tissue(tissue).Because : cells.Need(tissue, request.Point);
            if (because is not null)
                missing[request] = ObservableValues.Missing(because);
        }
    }

    /// <summary>Predicts every signal asked for.</summary>
    internal void Predict()
    {
        try
        {
            cells.Predict();
        }
        catch (ArgumentException refused)
        {
            foreach (var request in requests.Where(r => r.Tissue is not null))
                missing[request] = ObservableValues.Missing(refused.Message);
        }
    }

    /// <summary>The values of an observable asked for.</summary>
    internal ObservableValues Read(ObservableRequest request)
    {
        if (missing.TryGetValue(request, out var values))
            return values;
        try
        {
            return Compute(request);
        }
        catch (ArgumentException refused)
        {
            return ObservableValues.Missing(refused.Message);
        }
    }

    private static bool Runs(string name) => name is "nullTime" or "nullDistance" or "nullWindow" or "blurWidth" or "contrastEquivalentEchoTime"
        || name.StartsWith("weighting", StringComparison.Ordinal);

    private ObservableValues Compute(ObservableRequest request) => request.Name switch
    {
        "signal" => new(Signed(request), Magnitude(request), null),
        "signedSignal" => ObservableValues.Of(Signed(request)),
        "contrastDifference" => Pair(request, (a, b) => a - b, Contrast.Difference),
        "contrastRatio" or "residualRatio" => Pair(request, (a, b) => a / b, Contrast.Ratio),
        "contrastToNoise" => Pair(request, (a, b) => ToNoise(a - b), (a, b) => ToNoise(Contrast.Difference(a, b))),
        "nullTime" => Null(request),
        "nullDistance" => Distance(request),
        "nullWindow" => NullObservables.Window(cells, request),
        "weightingT1" => Weigh(request, d => d.ByLogT1),
        "weightingT2" => Weigh(request, d => d.ByLogT2),
        "weightingProtonDensity" => Weigh(request, d => d.ByLogProtonDensity),
        "weightingDiffusion" => Weigh(request, d => d.ByLogDiffusion),
        "contrastEquivalentEchoTime" => TrainObservables.EquivalentEchoTime(cells, request),
        "blurWidth" => TrainObservables.BlurWidth(cells, request),
        _ => Scalar(request.Name),
    };

    private ObservableValues Null(ObservableRequest request)
    {
        var key = request with { Name = "nullTime" };
        if (!nulls.TryGetValue(key, out var times))
            nulls[key] = times = NullObservables.Times(cells, key);
        return times;
    }

    /// <summary>ms; positive where the inversion time is set too long.</summary>
    private ObservableValues Distance(ObservableRequest request)
    {
        var times = Null(request);
        return times.Because is not null
            ? times
            : ObservableValues.Of(Array.ConvertAll(times.Shown, time => NullWindow.Distance(NullObservables.InversionTime(Series, NullObservables.LastInversion(Series)), time)));
    }

    private ObservableValues Scalar(string name)
    {
        var (signed, shown) = name switch
        {
            "fatWaterShift" => Both(FatWater.ShiftPixels(FatShiftPpm, Context.FieldStrength, Series.Geometry.PixelBandwidth)),
            "fatWaterPhase" => Both(Series.Readout is SpinEcho or EchoTrain or DiffusionSpinEcho
                ? 0
                : FatWater.PhaseDegrees(FatShiftPpm, Context.FieldStrength, Series.Readout.EchoTime)),
            "relativeNoise" => Both(RelativeNoise.Of(Series)),
            "relativeRfPower" => Both(RfPowerIndex(Context)),
            "scanTime" => Both(ScanTime.Seconds(Series)),
            "slicesFit" => Both(SliceFit.Of(Series).Fits ? 1 : 0),
            _ => (double.NaN, double.NaN),
        };
        if (double.IsNaN(signed))
            return ObservableValues.Missing($"There is no observable \"{name}\".");
        return new(Filled(signed), Filled(shown), null);
    }

    /// <summary>B0² times the mean square of B1+, over that of one rectangular 90° pulse of 1 ms in each second at 1.5 T.</summary>
    internal static double RfPowerIndex(SeriesContext context) =>
        context.FieldStrength * context.FieldStrength * RelativeRfPower.MeanSquare(context.Acquisition) / (1.5 * 1.5 * 62.5);

    private static (double Signed, double Shown) Both(double value) => (value, Math.Abs(value));

    private double[] Filled(double value)
    {
        var values = new double[cells.Draws];
        Array.Fill(values, value);
        return values;
    }

    private double[] Signed(ObservableRequest request) => cells.Signed(Tissue(request), request.Point).ToArray();

    private double[] Magnitude(ObservableRequest request) => cells.Magnitude(Tissue(request), request.Point).ToArray();

    private double ToNoise(double difference) => ContrastToNoise.PerRootTime(difference, RelativeNoise.Of(Series), ScanTime.Seconds(Series));

    private ObservableValues Pair(ObservableRequest request, Func<double, double, double> signed, Func<double, double, double> shown)
    {
        var (tissue, reference) = (Tissue(request), Reference(request));
        var a = cells.Signed(tissue, request.Point);
        var b = cells.Signed(reference, request.Point);
        var c = cells.Magnitude(tissue, request.Point);
        var d = cells.Magnitude(reference, request.Point);
        var (ofSigned, ofShown) = (new double[a.Length], new double[a.Length]);
        for (var i = 0; i < a.Length; i++)
        {
            ofSigned[i] = signed(a[i], b[i]);
            ofShown[i] = shown(c[i], d[i]);
        }

        return new(ofSigned, ofShown, null);
    }

    private ObservableValues Weigh(ObservableRequest request, Func<SignalDerivatives, double[]> choose)
    {
        var derivative = Derivatives(Tissue(request), request.Point);
        var reference = request.Reference is { } other ? Derivatives(other, request.Point).Signed : derivative.Signed;
        var chosen = choose(derivative);
        var values = new double[chosen.Length];
        for (var i = 0; i < values.Length; i++)
            values[i] = Weighting.Of(chosen[i], derivative.Signed[i], reference[i]);
        return ObservableValues.Of(values);
    }

    private SignalDerivatives Derivatives(string tissue, FieldPoint point)
    {
        if (!derivatives.TryGetValue((tissue, point), out var found))
            derivatives[(tissue, point)] = found = SignalDerivatives.Of(Series, Context.Setting, cells.Lanes(tissue, point));
        return found;
    }

    private static string Tissue(ObservableRequest request) =>
        request.Tissue ?? throw new ArgumentException($"The observable {request.Name} needs a tissue.");

    private static string Reference(ObservableRequest request) =>
        request.Reference ?? throw new ArgumentException($"The observable {request.Name} needs a reference tissue.");
}
