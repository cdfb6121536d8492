namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>
/// One excitation and everything up to the next spoil, resolved into the states that matter.
/// </summary>
/// <remarks>
/// Rotations about +x and +y keep two sets of real numbers apart (channels): what the excitation tipped (echoes), and what stayed
/// or recovered along z. Within each, a plan lists for every refocusing pulse the orders that are reachable and can still contribute.
/// Slots: order k of the dephasing states at a time with d dephasings behind it stands at D − d + k, of the rephasing states at d + k,
/// of the stored states at k; a dephasing therefore moves nothing.
/// </remarks>
internal sealed class TrainPlan
{
    /// <summary>Angle slot of the excitation.</summary>
    public required int ExcitationAngle { get; init; }

    /// <summary>Angle slot of the flip-back pulse, or −1.</summary>
    public required int FlipBackAngle { get; init; }

    /// <summary>Excitation to first refocusing pulse (or to the end), index into the times.</summary>
    public required int FirstInterval { get; init; }

    /// <summary>Last refocusing pulse to the end, index into the times; −1 without refocusing pulses.</summary>
    public required int LastInterval { get; init; }

    /// <summary>Excitation to end.</summary>
    public required int Duration { get; init; }

    /// <summary>Number of slots of the dephasing, rephasing and stored states.</summary>
    public required int DephasingSlots { get; init; }

    /// <inheritdoc cref="DephasingSlots"/>
    public required int StoredSlots { get; init; }

    /// <summary>Longitudinal end value pulled back to the start, or null when every state is carried forward instead.</summary>
    public required BackwardRun? End { get; init; }

    /// <summary>What a flip-back pulse returns to z, pulled back to the start.</summary>
    public required BackwardRun? FlipBack { get; init; }

    /// <summary>The effective sample pulled back to the start, where this train has it.</summary>
    public required BackwardRun? EffectiveSample { get; init; }

    /// <summary>Excitation to effective sample, index into the times; −1 where this train does not have it.</summary>
    public required int EffectiveSampleTime { get; init; }

    /// <summary>Forward run of what was tipped, through all samples.</summary>
    public required ForwardRun Tipped { get; init; }

    /// <summary>Forward run of what stayed along z.</summary>
    public required ForwardRun Stayed { get; init; }

    /// <summary>First of this train's samples in the program.</summary>
    public required int FirstSample { get; init; }

    /// <summary>Number of this train's samples.</summary>
    public required int SampleCount { get; init; }

    /// <summary>Effective sample, counted within this train; −1 where it is elsewhere.</summary>
    public required int EffectiveIndex { get; init; }
}

/// <summary>A number at a later time as a linear form on earlier states, pulled back pulse by pulse; relaxation by T2 is scaled out.</summary>
/// <param name="StartSlot">Slot where the form starts with weight 1: dephasing order 0 (tipped) or stored order 0 (stayed).</param>
/// <param name="ResultSlot">Slot of the same kind that holds the form on the state after the excitation.</param>
/// <param name="ResultRephasingSlot">Rephasing slot that is part of the form too, or −1.</param>
/// <param name="Pulses">From the last pulse to the first.</param>
internal sealed record BackwardRun(int StartSlot, int ResultSlot, int ResultRephasingSlot, PulseSpan[] Pulses);

/// <summary>States carried forward, relaxation included.</summary>
/// <param name="StartSlot">Slot of dephasing order 0 after the excitation.</param>
/// <param name="StartRephasingSlot">Slot of rephasing order 0 after the excitation.</param>
/// <param name="EndSlot">Slot of dephasing order 0 at the end.</param>
/// <param name="Pulses">From the first pulse to the last.</param>
/// <param name="Samples">Samples before the first pulse come first, with pulse −1.</param>
internal sealed record ForwardRun(int StartSlot, int StartRephasingSlot, int EndSlot, PulseSpan[] Pulses, SampleRead[] Samples);

/// <summary>A sample on the way forward.</summary>
/// <param name="AfterPulse">Index into the pulses after which it is read; −1 before the first.</param>
/// <param name="Slot">Dephasing slot that is read.</param>
/// <param name="Time">Index of a time: excitation to sample where it comes before the first pulse, otherwise sample to the end of the interval (whose relaxation is taken back).</param>
internal readonly record struct SampleRead(int AfterPulse, int Slot, int Time);

/// <summary>One refocusing pulse on a range of orders, and the bookkeeping between it and the pulse before it. Slots of −1 mean none.</summary>
internal struct PulseSpan
{
    /// <summary>Angle slot.</summary>
    public int Angle;

    /// <summary>Index of the coefficient pair (angle, interval after the pulse).</summary>
    public int Pair;

    /// <summary>First slots of the range.</summary>
    public int P, M, Z;

    /// <summary>Number of orders; may be 0.</summary>
    public int Count;

    /// <summary>Distance of the orders: 1, or 2 where only every second order is alive.</summary>
    public int Stride;

    /// <summary>Slots set to zero before anything else.</summary>
    public int ZeroP, ZeroM, ZeroZ;

    /// <summary>Backward: M[FoldM] += σ P[FoldP] before the pulse. Forward: P[FoldP] = σ M[FoldM] after it.</summary>
    public int FoldP, FoldM;

    /// <summary>Stored order 0 where it recovers in the interval (before the pulse when going backward, after it when going forward).</summary>
    public int RecoverZ;

    /// <summary>Time of that interval.</summary>
    public int RecoverTime;

    public static PulseSpan Empty => new()
    {
        Stride = 1, ZeroP = -1, ZeroM = -1, ZeroZ = -1, FoldP = -1, FoldM = -1, RecoverZ = -1, RecoverTime = -1,
    };
}
