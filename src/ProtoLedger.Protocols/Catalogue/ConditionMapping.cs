using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Catalogue;

/// <summary>Named field conditions at the field strength of a scanner.</summary>
public static class ConditionMapping
{
    /// <summary>Range of off-resonance, Hz: scaled with B0 where the condition names the field at which it was stated.</summary>
    /// <param name="condition">The condition.</param>
    /// <param name="fieldStrength">T, of the scanner.</param>
    public static ValueRange OffResonance(FieldCondition condition, double fieldStrength)
    {
        var scale = condition.OffResonanceField is { } stated ? fieldStrength / stated : 1;
        return new ValueRange(condition.OffResonance.Low * scale, condition.OffResonance.High * scale);
    }
}
