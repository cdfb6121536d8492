using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.Prediction;

/// <summary>What is predicted for: one lane is one tissue in one field point, or one draw of uncertain values. A structure of arrays.</summary>
/// <remarks>
/// The columns are plain arrays of <see cref="Count"/> values that the caller fills; nothing is copied.
/// <see cref="SignalPredictor"/> checks every value before it computes and names column, lane, value and limit.
/// </remarks>
public sealed class LaneTable
{
    /// <summary>Makes lanes with T1, T2 unset (0), T2* and ADC unknown, proton density 1, at the nominal field point.</summary>
    /// <param name="count">Number of lanes, ≥ 0.</param>
    public LaneTable(int count)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(count);
        Count = count;
        T1 = new double[count];
        T2 = new double[count];
        T2Star = Filled(count, double.NaN);
        ProtonDensity = Filled(count, 1);
        ApparentDiffusionCoefficient = Filled(count, double.NaN);
        IsFat = new bool[count];
        B1Scale = Filled(count, 1);
        OffResonanceHz = new double[count];
        UnpreparedInflow = new double[count];
        InversionEfficiencyOffset = new double[count];
    }

    /// <summary>Number of lanes.</summary>
    public int Count { get; }

    /// <summary>ms, &gt; 0.</summary>
    public double[] T1 { get; }

    /// <summary>ms, &gt; 0.</summary>
    public double[] T2 { get; }

    /// <summary>ms, &gt; 0; NaN where it is unknown, and a gradient echo then refuses the lane.</summary>
    public double[] T2Star { get; }

    /// <summary>Relative to cerebrospinal fluid, ≥ 0; 1 gives signals in units of M0.</summary>
    public double[] ProtonDensity { get; }

    /// <summary>10⁻³ mm²/s, ≥ 0; NaN where it is unknown, and a diffusion-weighted readout then refuses the lane.</summary>
    public double[] ApparentDiffusionCoefficient { get; }

    /// <summary>Whether the lane's signal comes from the six-peak fat spectrum.</summary>
    public bool[] IsFat { get; }

    /// <summary>Actual over nominal flip angle, in (0, 4].</summary>
    public double[] B1Scale { get; }

    /// <summary>Hz; 0 is on resonance. Moves water and fat alike.</summary>
    public double[] OffResonanceHz { get; }

    /// <summary>Fraction, in [0, 1], of spins that missed the preparations.</summary>
    public double[] UnpreparedInflow { get; }

    /// <summary>Added to the efficiency of every inversion that is given as one; the sum is kept within [0, 1].</summary>
    public double[] InversionEfficiencyOffset { get; }

    /// <summary>Makes one lane for each pair of tissue and field point.</summary>
    /// <param name="tissues">n ≥ 1 tissues.</param>
    /// <param name="points">m ≥ 1 field points.</param>
    /// <returns>n · m lanes; lane of tissue i and point j is i · m + j.</returns>
    public static LaneTable FromGrid(IReadOnlyList<Tissue> tissues, IReadOnlyList<FieldPoint> points)
    {
        ArgumentNullException.ThrowIfNull(tissues);
        ArgumentNullException.ThrowIfNull(points);
        var table = new LaneTable(tissues.Count * points.Count);
        for (var i = 0; i < tissues.Count; i++)
            for (var j = 0; j < points.Count; j++)
                table.Set(i * points.Count + j, tissues[i], points[j]);
        return table;
    }

    /// <summary>Fills one lane.</summary>
    /// <param name="lane">In [0, <see cref="Count"/>).</param>
    /// <param name="tissue">The tissue.</param>
    /// <param name="point">The field point; null is the nominal one.</param>
    public void Set(int lane, Tissue tissue, FieldPoint? point = null)
    {
        ArgumentNullException.ThrowIfNull(tissue);
        T1[lane] = tissue.T1;
        T2[lane] = tissue.T2;
        T2Star[lane] = tissue.T2Star ?? double.NaN;
        ProtonDensity[lane] = tissue.ProtonDensity;
        ApparentDiffusionCoefficient[lane] = tissue.ApparentDiffusionCoefficient ?? double.NaN;
        IsFat[lane] = tissue.IsFat;
        B1Scale[lane] = point?.B1Scale ?? 1;
        OffResonanceHz[lane] = point?.OffResonanceHz ?? 0;
        UnpreparedInflow[lane] = point?.UnpreparedInflow ?? 0;
    }

    /// <summary>Makes a table of chosen lanes, in the order given; a lane may occur more than once.</summary>
    /// <param name="lanes">Lane numbers, each in [0, <see cref="Count"/>).</param>
    public LaneTable Select(ReadOnlySpan<int> lanes)
    {
        var table = new LaneTable(lanes.Length);
        for (var i = 0; i < lanes.Length; i++)
        {
            var from = lanes[i];
            table.T1[i] = T1[from];
            table.T2[i] = T2[from];
            table.T2Star[i] = T2Star[from];
            table.ProtonDensity[i] = ProtonDensity[from];
            table.ApparentDiffusionCoefficient[i] = ApparentDiffusionCoefficient[from];
            table.IsFat[i] = IsFat[from];
            table.B1Scale[i] = B1Scale[from];
            table.OffResonanceHz[i] = OffResonanceHz[from];
            table.UnpreparedInflow[i] = UnpreparedInflow[from];
            table.InversionEfficiencyOffset[i] = InversionEfficiencyOffset[from];
        }

        return table;
    }

    private static double[] Filled(int count, double value)
    {
        var column = new double[count];
        Array.Fill(column, value);
        return column;
    }
}
