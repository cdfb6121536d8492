namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Finds, for one train, which states are reachable and which can still reach what is asked for.</summary>
/// <param name="steps">From the excitation to before the spoil.</param>
/// <param name="tables">Times and coefficient pairs of the whole program, to which this planner adds.</param>
/// <param name="pruned">False keeps every state (textbook form).</param>
internal sealed class TrainPlanner(PulseStep[] steps, PlanTables tables, bool pruned)
{
    private readonly int _dephasings = steps.Count(s => s.Kind == StepKind.Dephase);
    private readonly int _bodyEnd = steps.Length > 1 && steps[^1].Kind == StepKind.Excite ? steps.Length - 1 : steps.Length;

    private int Orders => _dephasings + 1;

    internal TrainPlan Plan(int firstSample, int effectiveSample)
    {
        if (steps[0].Kind != StepKind.Excite)
            throw new ArgumentException("A train starts with an excitation.");
        if (steps[1.._bodyEnd].Any(s => s.Kind is StepKind.Excite or StepKind.Map or StepKind.Spoil))
            throw new ArgumentException("Between excitation and spoil a train has waits, dephasing, refocusing pulses and samples only.");

        var samples = Positions(StepKind.Sample);
        var pulses = Positions(StepKind.Refocus);
        var effective = effectiveSample - firstSample;
        var hasEffective = effective >= 0 && effective < samples.Length;
        return new TrainPlan
        {
            ExcitationAngle = steps[0].Slot,
            FlipBackAngle = _bodyEnd < steps.Length ? steps[^1].Slot : -1,
            FirstInterval = tables.Time(Waits(0, pulses.Length > 0 ? pulses[0] : _bodyEnd), TimeUse.BackwardT1 | TimeUse.ForwardT1 | TimeUse.ForwardT2),
            LastInterval = pulses.Length > 0 ? tables.Time(Waits(pulses[^1], _bodyEnd), TimeUse.BackwardT1) : -1,
            Duration = tables.Time(Waits(0, _bodyEnd), _bodyEnd < steps.Length ? TimeUse.BackwardT2 : TimeUse.None),
            DephasingSlots = 2 * _dephasings + 2,
            StoredSlots = Orders,
            End = pruned ? Backward(Channel.Stayed, _bodyEnd) : null,
            FlipBack = pruned && _bodyEnd < steps.Length ? Backward(Channel.Tipped, _bodyEnd) : null,
            EffectiveSample = pruned && hasEffective ? Backward(Channel.Tipped, samples[effective]) : null,
            EffectiveSampleTime = hasEffective ? tables.Time(Waits(0, samples[effective]), TimeUse.BackwardT2) : -1,
            Tipped = Forward(Channel.Tipped),
            Stayed = Forward(Channel.Stayed),
            FirstSample = firstSample,
            SampleCount = samples.Length,
            EffectiveIndex = hasEffective ? effective : -1,
        };
    }

    private int[] Positions(StepKind kind) => [.. Enumerable.Range(1, _bodyEnd - 1).Where(i => steps[i].Kind == kind)];

    private IEnumerable<int> Waits(int from, int to) => steps[from..to].Where(s => s.Kind == StepKind.Wait).Select(s => s.Slot);

    /// <summary>Waits from a step back to the pulse before it, or on to the pulse after it.</summary>
    private IEnumerable<int> IntervalAfter(int position)
    {
        var next = Array.FindIndex(steps, position + 1, s => s.Kind == StepKind.Refocus);
        return Waits(position, next < 0 || next > _bodyEnd ? _bodyEnd : next);
    }

    private IEnumerable<int> IntervalBefore(int position) => Waits(Math.Max(0, Array.FindLastIndex(steps, position - 1, s => s.Kind == StepKind.Refocus)), position);

    private int SlotP(int dephasings, int order) => _dephasings - dephasings + order;

    private static int SlotM(int dephasings, int order) => dephasings + order;

    /// <summary>States that can be non-zero before each step.</summary>
    private OrderSets[] Reachable(Channel channel)
    {
        var sets = new OrderSets[_bodyEnd + 1];
        var now = new OrderSets(Orders);
        if (!pruned)
        {
            for (var i = 1; i <= _bodyEnd; i++)
                sets[i] = OrderSets.UpTo(Orders, steps[..i].Count(s => s.Kind == StepKind.Dephase));
            return sets;
        }

        now.P[0] = now.M[0] = channel == Channel.Tipped;
        now.Z[0] = channel == Channel.Stayed;
        for (var i = 1; i <= _bodyEnd; i++)
        {
            sets[i] = now.Copy();
            if (i == _bodyEnd)
                break;
            switch (steps[i].Kind)
            {
                case StepKind.Wait:
                    now.Z[0] |= channel == Channel.Stayed;
                    break;
                case StepKind.Refocus:
                    for (var k = 0; k < Orders; k++)
                        now.P[k] = now.M[k] = now.Z[k] = now.Any(k);
                    break;
                case StepKind.Dephase:
                    now = now.Dephased();
                    break;
            }
        }

        return sets;
    }

    private BackwardRun Backward(Channel channel, int from)
    {
        var reachable = Reachable(channel);
        var dephasings = steps[..from].Count(s => s.Kind == StepKind.Dephase);
        var startSlot = channel == Channel.Tipped ? SlotP(dephasings, 0) : 0;
        var form = new OrderSets(Orders);
        if (channel == Channel.Tipped)
            form.P[0] = true;
        else
            form.Z[0] = true;

        var spans = new List<PulseSpan>();
        var span = PulseSpan.Empty;
        for (var i = from - 1; i >= 1; i--)
        {
            switch (steps[i].Kind)
            {
                case StepKind.Dephase:
                    var before = dephasings - 1;
                    var folds = form.P[0] && _dephasings > 0 && reachable[i].M[1];
                    if (folds)
                    {
                        if (!form.M[0])
                            AddZero(spans, ref span, m: SlotM(dephasings, 0));
                        if (span.FoldP >= 0)
                            Flush(spans, ref span);
                        (span.FoldP, span.FoldM) = (SlotP(dephasings, 0), SlotM(dephasings, 0));
                    }

                    form = form.DephasedBackward(folds);
                    form.Keep(reachable[i]);
                    dephasings = before;
                    break;
                case StepKind.Refocus:
                    var alive = new List<int>();
                    for (var k = 0; k < Orders; k++)
                        if (form.Any(k) && reachable[i].Any(k))
                            alive.Add(k);
                    Cover(spans, ref span, alive, dephasings, form);

                    form = new OrderSets(Orders);
                    for (var k = 0; k < span.Count; k++)
                        form.Set(alive[0] + k * span.Stride);
                    span.Angle = steps[i].Slot;
                    span.Pair = tables.Pair(steps[i].Slot, IsLastPulse(i) ? null : IntervalAfter(i));
                    if (channel == Channel.Stayed)
                    {
                        span.RecoverZ = 0;
                        span.RecoverTime = tables.Time(IntervalBefore(i), TimeUse.BackwardT1 | TimeUse.BackwardT2);
                    }

                    Flush(spans, ref span);
                    break;
            }
        }

        if (span.FoldP >= 0 || span.ZeroM >= 0 || span.ZeroP >= 0)
            Flush(spans, ref span);
        if (channel == Channel.Tipped && !form.P[0])
            throw new ArgumentException("A sample or a flip-back stands where no echo can form.");
        return new BackwardRun(
            startSlot, channel == Channel.Tipped ? SlotP(0, 0) : 0, channel == Channel.Tipped && form.M[0] ? SlotM(0, 0) : -1, [.. spans]);
    }

    private ForwardRun Forward(Channel channel)
    {
        var reachable = Reachable(channel);
        var needed = Needed(channel);
        var spans = new List<PulseSpan>();
        var reads = new List<SampleRead>();
        var valid = new OrderSets(Orders);
        valid.P[0] = valid.M[0] = valid.Z[0] = true;
        var dephasings = 0;
        for (var i = 1; i < _bodyEnd; i++)
        {
            switch (steps[i].Kind)
            {
                case StepKind.Dephase:
                    dephasings++;
                    valid = valid.Dephased();
                    if (valid.M[0])
                    {
                        var span = spans.Count > 0 && spans[^1].FoldP < 0 ? spans[^1] : PulseSpan.Empty;
                        if (spans.Count == 0 || spans[^1].FoldP >= 0)
                            spans.Add(span);
                        (span.FoldP, span.FoldM) = (SlotP(dephasings, 0), SlotM(dephasings, 0));
                        spans[^1] = span;
                    }

                    break;
                case StepKind.Sample:
                    reads.Add(Array.Exists(steps[..i], s => s.Kind == StepKind.Refocus)
                        ? new SampleRead(spans.Count - 1, SlotP(dephasings, 0), tables.Time(IntervalAfter(i), TimeUse.ForwardT2))
                        : new SampleRead(-1, SlotP(dephasings, 0), tables.Time(Waits(0, i), TimeUse.ForwardT2)));
                    break;
                case StepKind.Refocus:
                    var pulse = PulseSpan.Empty;
                    var alive = new List<int>();
                    for (var k = 0; k < Orders; k++)
                        if (reachable[i].Any(k) && needed[i + 1].Any(k))
                            alive.Add(k);
                    Cover(spans, ref pulse, alive, dephasings, valid);
                    for (var k = 0; k < pulse.Count; k++)
                        valid.Set(alive[0] + k * pulse.Stride);

                    pulse.Angle = steps[i].Slot;
                    pulse.Pair = tables.Pair(steps[i].Slot, IntervalAfter(i));
                    if (channel == Channel.Stayed)
                        pulse.RecoverZ = 0;
                    pulse.RecoverTime = tables.Time(IntervalAfter(i), TimeUse.ForwardT1 | TimeUse.ForwardT2);
                    spans.Add(pulse);
                    break;
            }
        }

        return new ForwardRun(SlotP(0, 0), SlotM(0, 0), SlotP(dephasings, 0), [.. spans], [.. reads]);
    }

    /// <summary>States before each step that can still reach a sample or the end.</summary>
    private OrderSets[] Needed(Channel channel)
    {
        var sets = new OrderSets[_bodyEnd + 1];
        var now = new OrderSets(Orders);
        if (!pruned)
        {
            Array.Fill(sets, OrderSets.UpTo(Orders, _dephasings));
            return sets;
        }

        if (channel == Channel.Stayed)
            now.Z[0] = true;
        else
            now.P[0] = _bodyEnd < steps.Length;
        sets[_bodyEnd] = now.Copy();
        for (var i = _bodyEnd - 1; i >= 1; i--)
        {
            switch (steps[i].Kind)
            {
                case StepKind.Sample:
                    now.P[0] |= channel == Channel.Tipped;
                    break;
                case StepKind.Refocus:
                    for (var k = 0; k < Orders; k++)
                        now.P[k] = now.M[k] = now.Z[k] = now.Any(k);
                    break;
                case StepKind.Dephase:
                    now = now.DephasedBackward(now.P[0] && _dephasings > 0);
                    break;
            }

            sets[i] = now.Copy();
        }

        return sets;
    }

    private bool IsLastPulse(int position) => Array.FindIndex(steps, position + 1, s => s.Kind == StepKind.Refocus) < 0;

    /// <summary>Lets a pulse act on a regular range of orders that holds all of <paramref name="alive"/>; states in it that nothing filled yet start at zero.</summary>
    private void Cover(List<PulseSpan> spans, ref PulseSpan span, List<int> alive, int dephasings, OrderSets filled)
    {
        SetRange(ref span, alive, dephasings);
        for (var k = 0; k < span.Count; k++)
        {
            var order = alive[0] + k * span.Stride;
            if (!filled.P[order])
                AddZero(spans, ref span, p: SlotP(dephasings, order));
            if (!filled.M[order])
                AddZero(spans, ref span, m: SlotM(dephasings, order));
            if (!filled.Z[order])
                AddZero(spans, ref span, z: order);
        }
    }

    private void SetRange(ref PulseSpan span, List<int> alive, int dephasings)
    {
        if (alive.Count == 0)
            return;
        span.Stride = alive.Count > 1 && alive.Zip(alive.Skip(1), (a, b) => b - a).All(d => d % 2 == 0) ? 2 : 1;
        span.Count = (alive[^1] - alive[0]) / span.Stride + 1;
        (span.P, span.M, span.Z) = (SlotP(dephasings, alive[0]), SlotM(dephasings, alive[0]), alive[0]);
    }

    /// <summary>Asks for a slot to be zero before the pulse; a span has room for one slot of each kind, further ones go into spans without a pulse.</summary>
    private static void AddZero(List<PulseSpan> spans, ref PulseSpan span, int p = -1, int m = -1, int z = -1)
    {
        if ((p < 0 || span.ZeroP < 0) && (m < 0 || span.ZeroM < 0) && (z < 0 || span.ZeroZ < 0))
        {
            (span.ZeroP, span.ZeroM, span.ZeroZ) = (Math.Max(p, span.ZeroP), Math.Max(m, span.ZeroM), Math.Max(z, span.ZeroZ));
            return;
        }

        var extra = PulseSpan.Empty;
        (extra.ZeroP, extra.ZeroM, extra.ZeroZ) = (p, m, z);
        spans.Add(extra);
    }

    private static void Flush(List<PulseSpan> spans, ref PulseSpan span)
    {
        spans.Add(span);
        span = PulseSpan.Empty;
    }

    private enum Channel
    {
        Tipped,
        Stayed,
    }
}
