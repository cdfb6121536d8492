namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Collects the values of a program and, where its structure is not known yet, its steps.</summary>
/// <param name="writesSteps">Whether steps are wanted.</param>
internal sealed class ProgramWriter(bool writesSteps)
{
    private readonly List<PulseStep>? _steps = writesSteps ? [] : null;
    private readonly List<PulseMap> _maps = [];
    private double[] _durations = new double[8];
    private double[] _angles = new double[4];
    private int _durationCount;
    private int _angleCount;

    internal PulseStep[] Steps => [.. _steps!];

    /// <summary>One a slot; slots that were not given out follow and mean nothing.</summary>
    internal double[] Durations => _durations;

    /// <inheritdoc cref="Durations"/>
    internal double[] Angles => _angles;

    internal IReadOnlyList<PulseMap> Maps => _maps;

    internal bool WritesSteps => _steps is not null;

    /// <summary>Adds a duration, ms, and returns its slot.</summary>
    internal int Duration(double time) => Add(ref _durations, ref _durationCount, time);

    /// <summary>Adds an angle, degrees, and returns its slot.</summary>
    internal int Angle(double degrees) => Add(ref _angles, ref _angleCount, degrees);

    internal void Wait(double time) => Step(StepKind.Wait, Duration(time));

    internal void Map(PulseMap map)
    {
        Step(StepKind.Map, _maps.Count);
        _maps.Add(map);
    }

    internal void Step(StepKind kind, int slot = 0) => _steps?.Add(new PulseStep(kind, slot));

    /// <summary>Refocusing periods of a train: half interval, dephasing, pulse, half interval, dephasing, and the sample where one is wanted.</summary>
    /// <param name="count">Number of pulses.</param>
    /// <param name="halfInterval">Duration slot.</param>
    /// <param name="firstAngle">Angle slot of the first pulse.</param>
    /// <param name="scheduled">Whether further pulses have the following slots, or all the same one.</param>
    /// <param name="samples">Whether echoes are sampled.</param>
    internal void Refocus(int count, int halfInterval, int firstAngle, bool scheduled, bool samples)
    {
        for (var i = 0; WritesSteps && i < count; i++)
        {
            Step(StepKind.Wait, halfInterval);
            Step(StepKind.Dephase);
            Step(StepKind.Refocus, scheduled ? firstAngle + i : firstAngle);
            Step(StepKind.Wait, halfInterval);
            Step(StepKind.Dephase);
            if (samples)
                Step(StepKind.Sample);
        }
    }

    private static int Add(ref double[] values, ref int count, double value)
    {
        if (count == values.Length)
            Array.Resize(ref values, 2 * count);
        values[count] = value;
        return count++;
    }
}
