using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Lanes in, signals out, as pointers to columns of doubles.</summary>
internal unsafe struct EngineArguments
{
    /// <summary>Number of lanes.</summary>
    public int Count;

    /// <summary>T1, ms.</summary>
    public double* T1;

    /// <summary>The transverse constant that the program uses, ms.</summary>
    public double* T2;

    /// <summary>B1+ scale.</summary>
    public double* B1;

    /// <summary>Columns of the maps, <see cref="MapStride"/> apart: multiplier and recovery of the first, of the second, and so on.</summary>
    public double* Maps;

    /// <summary>Distance of the map columns.</summary>
    public int MapStride;

    /// <summary>From which state the prediction starts.</summary>
    public StartState Start;

    /// <summary>Repetitions before the sampled one, for <see cref="StartState.AfterDummies"/>.</summary>
    public int Dummies;

    /// <summary>Out: signed signal at the effective sample, in units of M0.</summary>
    public double* Signed;

    /// <summary>Out: longitudinal magnetisation before the excitation of the effective sample.</summary>
    public double* Before;

    /// <summary>Out: longitudinal magnetisation at the end of the effective train.</summary>
    public double* End;

    /// <summary>Out: longitudinal magnetisation at the start of the period.</summary>
    public double* Period;

    /// <summary>Out: every sample, one column a sample, <see cref="SampleStride"/> apart; null where only the effective one is asked for.</summary>
    public double* Samples;

    /// <summary>Distance of the sample columns.</summary>
    public int SampleStride;
}
