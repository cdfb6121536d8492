using ProtoLedger.Physics.Acquisition;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>What closes the steady state of a series.</summary>
internal enum Closure
{
    /// <summary>Only the mean longitudinal magnetisation crosses a repetition time.</summary>
    Longitudinal,

    /// <summary>All of the magnetisation crosses: balanced gradient echo.</summary>
    Balanced,

    /// <summary>Coherences of all orders cross: gradient echo with RF spoiling.</summary>
    RfSpoiled,
}

/// <summary>A pulse of a preparation that enters the program as a map of the longitudinal magnetisation.</summary>
/// <param name="Preparation">The preparation, with its pulse.</param>
internal sealed record PulseMap(Preparation Preparation);

/// <summary>A series as the engine takes it.</summary>
internal sealed record CompiledSeries
{
    private double[]? _echoTimes;

    /// <summary>Structure of one period.</summary>
    public required ProgramPlan Plan { get; init; }

    /// <summary>ms, one a duration slot.</summary>
    public required double[] Durations { get; init; }

    /// <summary>Degrees, one an angle slot.</summary>
    public required double[] Angles { get; init; }

    /// <summary>One a map slot.</summary>
    public required IReadOnlyList<PulseMap> Maps { get; init; }

    /// <summary>How the steady state closes.</summary>
    public required Closure Closure { get; init; }

    /// <summary>Whether transverse magnetisation decays with T2* rather than T2.</summary>
    public required bool DecaysWithT2Star { get; init; }

    /// <summary>Whether a lane's chemical shift turns the phase of its echoes (gradient echoes).</summary>
    public required bool ShiftTurnsPhase { get; init; }

    /// <summary>The readout.</summary>
    public required Readout Readout { get; init; }

    /// <summary>Times of the samples after their excitation, ms.</summary>
    public double[] EchoTimes => _echoTimes ??= SeriesCompiler.EchoTimes(Readout);

    /// <summary>Which sample is the effective echo.</summary>
    public required int EffectiveEcho { get; init; }

    /// <summary>s/mm²; null where the readout is not diffusion-weighted.</summary>
    public double? DiffusionBValue { get; init; }
}
