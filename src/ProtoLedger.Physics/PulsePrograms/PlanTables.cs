namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Which relaxation factors of a time are needed.</summary>
[Flags]
internal enum TimeUse
{
    None = 0,
    BackwardT1 = 1,
    BackwardT2 = 2,
    BackwardRatio = 4,
    ForwardT1 = 8,
    ForwardT2 = 16,
}

/// <summary>Which rate a relaxation factor decays with.</summary>
internal enum DecayRate : byte
{
    /// <summary>1/T1.</summary>
    T1,

    /// <summary>1/T2.</summary>
    T2,

    /// <summary>1/T1 − 1/T2: the ratio of the two factors.</summary>
    Ratio,
}

/// <summary>One relaxation factor exp(−time · rate), or a power of a factor that was computed before it.</summary>
/// <param name="Rate">The rate.</param>
/// <param name="Time">Index of the time.</param>
/// <param name="BaseTime">Index of the time of the factor that is raised to <paramref name="Power"/>; −1 where the exponential is computed.</param>
/// <param name="Power">≥ 2 where there is a base.</param>
internal readonly record struct Decay(DecayRate Rate, int Time, int BaseTime, int Power);

/// <summary>The distinct times, angles and coefficient pairs of a program: each is computed once for a block of lanes.</summary>
internal sealed class PlanTables
{
    private readonly List<TimeSum> _times = [];
    private readonly List<TimeUse> _uses = [];
    private readonly List<(int Angle, int Time)> _pairs = [];

    internal TimeSum[] Times => [.. _times];

    /// <summary>Factors that the uses ask for, each after the one that it is a power of.</summary>
    internal Decay[] Decays(TimeUse t1, TimeUse t2, TimeUse ratio)
    {
        var decays = new List<Decay>();
        foreach (var (rate, use) in new[] { (DecayRate.T1, t1), (DecayRate.T2, t2), (DecayRate.Ratio, ratio) })
        {
            var wanted = Enumerable.Range(0, _times.Count).Where(i => (_uses[i] & use) != 0).OrderBy(i => _times[i].Terms.Sum(t => t.Count));
            foreach (var time in wanted)
            {
                var known = decays.FindLastIndex(d => d.Rate == rate && Power(_times[time], _times[d.Time]) > 1);
                decays.Add(known < 0 || rate == DecayRate.Ratio
                    ? new Decay(rate, time, -1, 1)
                    : new Decay(rate, time, decays[known].Time, Power(_times[time], _times[decays[known].Time])));
            }
        }

        return [.. decays];
    }

    internal (int Angle, int Time)[] Pairs => [.. _pairs];

    /// <summary>How many times one time is another, where both are multiples of the same duration; otherwise 0.</summary>
    private static int Power(TimeSum time, TimeSum part) =>
        time.Terms is [var (slot, count)] && part.Terms is [var (partSlot, partCount)] && slot == partSlot && count % partCount == 0
            ? count / partCount
            : 0;

    internal int Time(IEnumerable<int> slots, TimeUse use)
    {
        var sum = TimeSum.Of(slots);
        var index = _times.IndexOf(sum);
        if (index < 0)
        {
            index = _times.Count;
            _times.Add(sum);
            _uses.Add(TimeUse.None);
        }

        _uses[index] |= use;
        return index;
    }

    /// <summary>Coefficients of a refocusing pulse with the relaxation ratio of the interval after it, or without (time −1).</summary>
    internal int Pair(int angle, IEnumerable<int>? interval)
    {
        var pair = (angle, interval is null ? -1 : Time(interval, TimeUse.BackwardRatio));
        var index = _pairs.IndexOf(pair);
        if (index >= 0)
            return index;
        _pairs.Add(pair);
        return _pairs.Count - 1;
    }
}
