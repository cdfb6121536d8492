using System.Runtime.Intrinsics;
using ProtoLedger.Physics.PulsePrograms;

namespace ProtoLedger.Physics.Prediction;

/// <summary>Refuses lanes whose values are out of range or lack what the readout needs; messages name column, lane, value and limit.</summary>
internal static class LaneChecks
{
    private const double LongestTime = 1e6;
    private const double LargestScale = 4;
    private const double LargestOffResonance = 1e5;

    internal static void Require(LaneTable lanes, CompiledSeries program)
    {
        Within("T1", lanes.T1, 0, LongestTime, "ms", open: true);
        Within("T2", lanes.T2, 0, LongestTime, "ms", open: true);
        Within("protonDensity", lanes.ProtonDensity, 0, 1e6, "", open: false);
        Within("b1Scale", lanes.B1Scale, 0, LargestScale, "", open: true);
        Within("offResonanceHz", lanes.OffResonanceHz, -LargestOffResonance, LargestOffResonance, "Hz", open: false);
        Within("unpreparedInflow", lanes.UnpreparedInflow, 0, 1, "", open: false);
        Within("inversionEfficiencyOffset", lanes.InversionEfficiencyOffset, -1, 1, "", open: false);
        if (program.DecaysWithT2Star && program.Closure != Closure.RfSpoiled)
            Known("T2star", lanes.T2Star, LongestTime, "ms", open: true, "a gradient echo decays with it");
        if (program.DiffusionBValue > 0)
            Known("apparentDiffusionCoefficient", lanes.ApparentDiffusionCoefficient, 1000, "10⁻³ mm²/s", open: false, "a diffusion-weighted readout needs it");
    }

    private static void Known(string name, double[] column, double high, string unit, bool open, string why)
    {
        for (var i = 0; i < column.Length; i++)
            if (double.IsNaN(column[i]))
                throw new ArgumentException($"{name}: unknown for lane {i}, and {why}.");
        Within(name, column, 0, high, unit, open);
    }

    private static void Within(string name, double[] column, double low, double high, string unit, bool open)
    {
        // A pass that finds nothing is the rule: it takes several lanes at once and an open lower bound is the next number above it.
        var lowest = open ? Math.BitIncrement(low) : low;
        var checkedLanes = 0;
        for (; checkedLanes <= column.Length - Vector512<double>.Count; checkedLanes += Vector512<double>.Count)
        {
            var values = Vector512.LoadUnsafe(ref column[checkedLanes]);
            if (!Vector512.GreaterThanOrEqualAll(values, Vector512.Create(lowest)) || !Vector512.LessThanOrEqualAll(values, Vector512.Create(high)))
                break;
        }

        for (var i = checkedLanes; i < column.Length; i++)
            if (!(column[i] >= low && column[i] <= high && (!open || column[i] > low)))
                throw new ArgumentException($"{name}: {column[i]} {unit} in lane {i} must lie in {(open ? '(' : '[')}{low}, {high}].");
    }
}
