namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>What a block does to the mean longitudinal magnetisation.</summary>
internal enum BlockKind
{
    /// <summary>Recovery; the index is a time.</summary>
    Relax,

    /// <summary>Multiplier and recovery of a pulse; the index is that of the map.</summary>
    Map,

    /// <summary>A rotation whose transverse magnetisation is spoiled unused; the index is an angle.</summary>
    Flip,

    /// <summary>A train; the index is that of the train.</summary>
    Train,
}

/// <summary>A block of a program.</summary>
/// <param name="Kind">What it does.</param>
/// <param name="Index">See <see cref="BlockKind"/>.</param>
internal readonly record struct Block(BlockKind Kind, int Index);

/// <summary>A pulse program's structure, resolved once and used for any durations, angles and lanes.</summary>
internal sealed class ProgramPlan
{
    private ProgramPlan(PlanTables tables, Block[] blocks, TrainPlan[] trains, PulseStep[] steps)
    {
        Times = tables.Times;
        Decays = tables.Decays(TimeUse.BackwardT1, TimeUse.BackwardT2, TimeUse.BackwardRatio);
        ForwardDecays = tables.Decays(TimeUse.ForwardT1, TimeUse.ForwardT2, TimeUse.None);
        Pairs = tables.Pairs;
        Blocks = blocks;
        Trains = trains;
        AngleCount = 1 + steps.Where(s => s.Kind is StepKind.Excite or StepKind.Refocus).Select(s => s.Slot).DefaultIfEmpty(-1).Max();
        MapCount = 1 + steps.Where(s => s.Kind is StepKind.Map).Select(s => s.Slot).DefaultIfEmpty(-1).Max();
        SampleCount = steps.Count(s => s.Kind == StepKind.Sample);
        DephasingSlots = trains.Select(t => t.DephasingSlots).DefaultIfEmpty(0).Max();
        StoredSlots = trains.Select(t => t.StoredSlots).DefaultIfEmpty(0).Max();
    }

    public TimeSum[] Times { get; }

    /// <summary>Relaxation factors that every run needs.</summary>
    public Decay[] Decays { get; }

    /// <summary>Relaxation factors that runs in the forward direction need.</summary>
    public Decay[] ForwardDecays { get; }

    public (int Angle, int Time)[] Pairs { get; }

    public Block[] Blocks { get; }

    public TrainPlan[] Trains { get; }

    public int AngleCount { get; }

    public int MapCount { get; }

    public int SampleCount { get; }

    public int DephasingSlots { get; }

    public int StoredSlots { get; }

    /// <summary>Resolves a structure.</summary>
    /// <param name="steps">One period.</param>
    /// <param name="effectiveSample">Which of its samples, from 0, is the effective one.</param>
    /// <param name="pruned">False keeps every state (textbook form).</param>
    internal static ProgramPlan Build(PulseStep[] steps, int effectiveSample, bool pruned = true)
    {
        var tables = new PlanTables();
        var blocks = new List<Block>();
        var trains = new List<TrainPlan>();
        var samples = 0;
        var waits = new List<int>();
        for (var i = 0; i < steps.Length; i++)
        {
            if (steps[i].Kind == StepKind.Wait)
            {
                waits.Add(steps[i].Slot);
                continue;
            }

            if (steps[i].Kind == StepKind.Spoil)
                continue;
            Relax();
            switch (steps[i].Kind)
            {
                case StepKind.Map:
                    blocks.Add(new Block(BlockKind.Map, steps[i].Slot));
                    break;
                case StepKind.Excite:
                    var end = Array.FindIndex(steps, i, s => s.Kind == StepKind.Spoil);
                    var train = steps[i..(end < 0 ? steps.Length : end)];
                    if (train.Length == 1)
                    {
                        blocks.Add(new Block(BlockKind.Flip, steps[i].Slot));
                        break;
                    }

                    blocks.Add(new Block(BlockKind.Train, trains.Count));
                    trains.Add(new TrainPlanner(train, tables, pruned).Plan(samples, effectiveSample));
                    samples += trains[^1].SampleCount;
                    i += train.Length - 1;
                    break;
                default:
                    throw new ArgumentException($"A {steps[i].Kind} needs an excitation before it.");
            }
        }

        Relax();
        return new ProgramPlan(tables, [.. blocks], [.. trains], steps);

        void Relax()
        {
            if (waits.Count > 0)
                blocks.Add(new Block(BlockKind.Relax, tables.Time(waits, TimeUse.BackwardT1 | TimeUse.ForwardT1)));
            waits.Clear();
        }
    }
}
