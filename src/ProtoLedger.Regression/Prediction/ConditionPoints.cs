using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Regression.Prediction;

/// <summary>Points at which a condition is predicted.</summary>
internal static class ConditionPoints
{
    /// <summary>The nominal point: B1+ scale 1, on resonance, no inflow.</summary>
    internal static FieldPoint Nominal { get; } = new();

    /// <summary>Centre and corners of the off-resonance and B1+ ranges, each without inflow and at every listed fraction; no point twice.</summary>
    internal static IReadOnlyList<FieldPoint> Of(FieldCondition condition, double fieldStrength)
    {
        var (off, b1) = (ConditionMapping.OffResonance(condition, fieldStrength), condition.B1Scale);
        var points = new List<FieldPoint>();
        foreach (var inflow in condition.UnpreparedInflow.Prepend(0).Distinct())
        {
            points.Add(new(Middle(b1), Middle(off), inflow));
            foreach (var scale in (double[])[b1.Low, b1.High])
            {
                foreach (var hz in (double[])[off.Low, off.High])
                    points.Add(new(scale, hz, inflow));
            }
        }

        return [.. points.Distinct()];
    }

    private static double Middle(ValueRange range) => (range.Low + range.High) / 2;
}
