using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Physics.Tests;

/// <summary>One-lane predictions, and tissues with the recommended values of the literature table behind the shipped catalogue.</summary>
internal static class Signals
{
    public static readonly SeriesGeometry Geometry = new();

    public static readonly Tissue White15 = new("white matter 1.5 T", 660, 78, 64, 0.69, 0.72);
    public static readonly Tissue Grey15 = new("grey matter 1.5 T", 1150, 92, 82, 0.80, 0.88);
    public static readonly Tissue Fluid15 = new("cerebrospinal fluid 1.5 T", 4300, 2100, 500, 1.00, 3.0);
    public static readonly Tissue White3 = new("white matter 3 T", 850, 72, 50, 0.69, 0.72);
    public static readonly Tissue Grey3 = new("grey matter 3 T", 1480, 88, 58, 0.80, 0.88);
    public static readonly Tissue Fluid3 = new("cerebrospinal fluid 3 T", 4350, 2000, 400, 1.00, 3.0);
    public static readonly Tissue Lesion3 = new("lesion 3 T", 1400, 140, 75, 0.85, 1.2);
    public static readonly Tissue Muscle3 = new("muscle 3 T", 1250, 34, 23, 0.79, 1.5);
    public static readonly Tissue Fat15 = new("fat 1.5 T", 290, 85, 25, 0.90, 0.05, IsFat: true);
    public static readonly Tissue Fat3 = new("fat 3 T", 375, 90, 18, 0.90, 0.05, IsFat: true);

    public static Series Of(Readout readout, params Preparation[] preparations) => new(preparations, readout, new SeriesTiming(), Geometry);

    public static Inversion Invert(double inversionTime, RfPulse? pulse = null, double? slab = null) =>
        new(inversionTime, InversionTimeEnd.Excitation, pulse ?? EfficiencyInversion.Default, slab);

    public static double Signed(Series series, Tissue tissue, FieldPoint? point = null, double field = 3) => Table(series, tissue, point, field).Signed[0];

    public static double Magnitude(Series series, Tissue tissue, FieldPoint? point = null, double field = 3) => Table(series, tissue, point, field).Magnitude[0];

    public static double BeforeExcitation(Series series, Tissue tissue, FieldPoint? point = null, double field = 3) =>
        Table(series, tissue, point, field).LongitudinalBeforeExcitation[0];

    public static double NullTime(Series series, Tissue tissue, double field = 3) =>
        NullTimes.Find(series, 0, new PredictionSetting(field), LaneTable.FromGrid([tissue], [new FieldPoint()]))[0]
        ?? throw new InvalidOperationException("There is no null.");

    private static SignalTable Table(Series series, Tissue tissue, FieldPoint? point, double field) =>
        SignalPredictor.Predict(series, new PredictionSetting(field), LaneTable.FromGrid([tissue], [point ?? new FieldPoint()]));
}
