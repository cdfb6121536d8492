using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Regression.Prediction;

/// <summary>Signals of a series for pairs of tissue and field point (cells), each over the same draws, predicted in one batch of lanes.</summary>
/// <remarks>First every cell is asked for, then <see cref="Predict"/> runs once, then signals are read.</remarks>
internal sealed class SignalCells
{
    private readonly int[] draws;
    private readonly double[]? efficiencyOffset;
    private readonly Dictionary<(string Tissue, FieldPoint Point), int> cells = [];
    private readonly List<(PlausibleTissue Tissue, FieldPoint Point)> order = [];
    private readonly Dictionary<string, (PlausibleTissue? Tissue, string? Because)> tissues = [];
    private SignalTable? signals;

    /// <param name="context">The series.</param>
    /// <param name="draws">Numbers of the draws, −1 for the means.</param>
    internal SignalCells(SeriesContext context, int[] draws)
    {
        Context = context;
        this.draws = draws;
        efficiencyOffset = EfficiencyOffsets(context, draws);
    }

    internal SeriesContext Context { get; }

    /// <summary>Number of draws in each cell.</summary>
    internal int Draws => draws.Length;

    /// <summary>Whether any cell counts spins that missed the preparations.</summary>
    internal bool HasInflow => order.Any(cell => cell.Point.UnpreparedInflow > 0);

    internal IReadOnlyList<Assumption> Assumptions => signals?.Assumptions ?? [];

    /// <summary>The tissue, or why it cannot be predicted.</summary>
    internal (PlausibleTissue? Tissue, string? Because) Tissue(string name)
    {
        if (!tissues.TryGetValue(name, out var found))
            tissues[name] = found = PlausibleTissue.Find(Context, name);
        return found;
    }

    /// <summary>Every tissue that was asked for and found.</summary>
    internal IEnumerable<PlausibleTissue> Tissues => tissues.Values.Where(t => t.Tissue is not null).Select(t => t.Tissue!);

    /// <summary>Asks for a cell; the reason where it cannot be predicted. Inflow counts for tissues that flow alone.</summary>
    internal string? Need(string tissue, FieldPoint point)
    {
        var (found, because) = Tissue(tissue);
        if (found is null)
            return because;
        if (cells.TryAdd((tissue, Effective(tissue, point)), order.Count))
            order.Add((found, Effective(tissue, point)));
        return null;
    }

    /// <summary>Predicts every cell asked for.</summary>
    /// <exception cref="ArgumentException">The engine refuses the series or a lane.</exception>
    internal void Predict()
    {
        if (order.Count == 0)
            return;
        var lanes = new LaneTable(order.Count * draws.Length);
        for (var cell = 0; cell < order.Count; cell++)
            Fill(lanes, cell * draws.Length, order[cell].Tissue, order[cell].Point);
        signals = SignalPredictor.Predict(Context.Acquisition, Context.Setting, lanes);
    }

    /// <summary>Signed signals of a cell, one for each draw.</summary>
    internal ReadOnlySpan<double> Signed(string tissue, FieldPoint point) => signals!.Signed.AsSpan(Start(tissue, point), draws.Length);

    /// <summary>Magnitudes of a cell, one for each draw.</summary>
    internal ReadOnlySpan<double> Magnitude(string tissue, FieldPoint point) => signals!.Magnitude.AsSpan(Start(tissue, point), draws.Length);

    /// <summary>Lanes of one tissue at one point, one for each draw, for the computations that run the engine themselves.</summary>
    internal LaneTable Lanes(string tissue, FieldPoint point)
    {
        var lanes = new LaneTable(draws.Length);
        Fill(lanes, 0, Tissue(tissue).Tissue!, Effective(tissue, point));
        return lanes;
    }

    private static FieldPoint Effective(string tissue, FieldPoint point) =>
        point.UnpreparedInflow > 0 && !TissueRoles.Flows(tissue) ? point with { UnpreparedInflow = 0 } : point;

    private int Start(string tissue, FieldPoint point) => cells[(tissue, Effective(tissue, point))] * draws.Length;

    private void Fill(LaneTable lanes, int start, PlausibleTissue tissue, FieldPoint point)
    {
        tissue.Fill(lanes, start, draws, point);
        efficiencyOffset?.CopyTo(lanes.InversionEfficiencyOffset, start);
    }

    /// <summary>The lane table holds one offset for every inversion of a series; where two pulses differ the larger spread is taken.</summary>
    private static double[]? EfficiencyOffsets(SeriesContext context, int[] draws)
    {
        var pulse = context.Acquisition.Preparations.OfType<Inversion>().Select(i => i.Pulse).OfType<EfficiencyInversion>().MaxBy(p => p.EfficiencySd);
        if (pulse is null || pulse.EfficiencySd == 0)
            return null;
        var offsets = context.Draws.EfficiencyOffset(pulse.Name, pulse.EfficiencySd);
        return Array.ConvertAll(draws, draw => draw < 0 ? 0 : offsets[draw]);
    }
}
