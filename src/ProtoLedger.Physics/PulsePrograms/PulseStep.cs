namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>What a step of a pulse program does.</summary>
internal enum StepKind : byte
{
    /// <summary>Relaxation for the duration in the slot.</summary>
    Wait,

    /// <summary>Rotation about +x by the angle in the slot, times B1+: excitation, and flip-back when it comes last before a spoil.</summary>
    Excite,

    /// <summary>Rotation about +y by the angle in the slot, times B1+: refocusing under the condition of Carr, Purcell, Meiboom and Gill.</summary>
    Refocus,

    /// <summary>Longitudinal magnetisation times the multiplier plus the recovery of the slot's columns, transverse magnetisation spoiled: a pulse known by its response.</summary>
    Map,

    /// <summary>One unit of gradient dephasing: every coherence moves up by one order.</summary>
    Dephase,

    /// <summary>All coherence, transverse and stored, is lost; the mean longitudinal magnetisation stays.</summary>
    Spoil,

    /// <summary>The signed signal is sampled.</summary>
    Sample,
}

/// <summary>One step: its kind and the slot of its duration, angle or map.</summary>
/// <param name="Kind">What it does.</param>
/// <param name="Slot">Index into the durations, angles or map columns of the program; 0 where there is none.</param>
internal readonly record struct PulseStep(StepKind Kind, int Slot = 0);
