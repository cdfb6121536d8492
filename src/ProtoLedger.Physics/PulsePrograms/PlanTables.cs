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

/// <summary>The distinct times, angles and coefficient pairs of a program: each is computed once for a block of lanes.</summary>
internal sealed class PlanTables
{
    private readonly List<TimeSum> _times = [];
    private readonly List<TimeUse> _uses = [];
    private readonly List<(int Angle, int Time)> _pairs = [];

    internal TimeSum[] Times => [.. _times];

    internal TimeUse[] Uses => [.. _uses];

    internal (int Angle, int Time)[] Pairs => [.. _pairs];

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
