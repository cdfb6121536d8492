using System.Collections.Concurrent;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>What determines the structure of a program; everything else is a duration, an angle or a map.</summary>
/// <param name="Preparations">One letter and number an event, in order of time; a bar stands for the readout.</param>
/// <param name="Readout">Kind of readout.</param>
/// <param name="Echoes">Number of echoes or excitations.</param>
/// <param name="Effective">The effective one.</param>
/// <param name="Scheduled">Whether each refocusing pulse has its own angle.</param>
/// <param name="FlipsBack">Whether a flip-back pulse ends the train.</param>
/// <param name="Pruned">False for the textbook form.</param>
internal readonly record struct PlanKey(
    string Preparations, Type Readout, int Echoes, int Effective, bool Scheduled, bool FlipsBack, bool Pruned);

/// <summary>Resolved structures, kept for the life of the process: there are as many as kinds of series, not as many as series.</summary>
internal static class PlanCache
{
    private static readonly ConcurrentDictionary<PlanKey, ProgramPlan> Plans = new();

    internal static bool TryGet(in PlanKey key, out ProgramPlan? plan) => Plans.TryGetValue(key, out plan);

    internal static ProgramPlan Add(in PlanKey key, PulseStep[] steps)
    {
        var plan = ProgramPlan.Build(steps, key.Effective, key.Pruned);
        Plans.TryAdd(key, plan);
        return plan;
    }
}
