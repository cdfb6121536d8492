using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.Pulses;

/// <summary>What a stretch of a sequence does to longitudinal magnetisation: M → Multiplier · M + Recovery, over M0 = 1.</summary>
/// <param name="Multiplier">Share of the magnetisation that is kept, signed.</param>
/// <param name="Recovery">What the stretch adds.</param>
public readonly record struct LongitudinalMap(double Multiplier, double Recovery)
{
    /// <summary>Free recovery for a time: e = exp(−t/T1), M → e M + 1 − e.</summary>
    public static LongitudinalMap Wait(double timeMs, double t1)
    {
        var kept = Elementary.Exp(-timeMs / t1);
        return new LongitudinalMap(kept, 1 - kept);
    }

    /// <summary>This stretch, then another.</summary>
    public LongitudinalMap Then(LongitudinalMap next) => new(next.Multiplier * Multiplier, next.Multiplier * Recovery + next.Recovery);

    /// <summary>The stretch played n times in a row, n ≥ 0.</summary>
    public LongitudinalMap Repeat(int times)
    {
        var result = new LongitudinalMap(1, 0);
        for (var i = 0; i < times; i++)
            result = result.Then(this);
        return result;
    }

    /// <summary>Magnetisation after the stretch.</summary>
    public double Apply(double magnetisation) => Multiplier * magnetisation + Recovery;

    /// <summary>Magnetisation that the stretch gives back unchanged: Recovery / (1 − Multiplier).</summary>
    public double FixedPoint => Recovery / (1 - Multiplier);
}
