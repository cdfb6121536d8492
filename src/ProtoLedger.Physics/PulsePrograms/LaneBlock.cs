using System.Runtime.CompilerServices;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Runs a program for one block of lanes: coefficients, trains, affine steady state.</summary>
/// <remarks>
/// A period maps the mean longitudinal magnetisation z to a · z + b. In the steady state z = b / (1 − a), since nothing else crosses a repetition
/// time. Signals are linear in the magnetisation before their excitation: what recovers within a train never reaches an echo, by parity of the orders.
/// States: see <see cref="TrainPlan"/>; the rotation of an order (p, m, z) about the refocusing axis is d = p − m, u = sin²(α/2) d + sin(α) z,
/// p − u, m + u, ½ sin(α) d + cos(α) z, from the matrices of Weigel, J Magn Reson Imaging 2015;41:266, in these two channels.
/// Methods that must not be inlined are marked: the compiler has one inlining budget a method, and the operators of the lanes have to fit in it.
/// </remarks>
internal static unsafe partial class LaneBlock<T>
    where T : unmanaged, ILanes<T>
{
    /// <summary>Above this, the ratio of the relaxation factors that is scaled out would leave the range of a double: such lanes are carried forward instead.</summary>
    private const double LargestScaling = 250;

    [MethodImpl(MethodImplOptions.NoInlining)]
    internal static void Run(ProgramPlan plan, ReadOnlySpan<double> times, ReadOnlySpan<double> angles, in EngineArguments arguments, int lane)
    {
        var memory = (T*)Workspace.Rent(sizeof(T) * Coefficients.Size(plan));
        var c = new Coefficients(plan, memory);
        var one = T.All(1);
        var rate1 = one / T.Load(arguments.T1 + lane);
        var rate2 = one / T.Load(arguments.T2 + lane);
        c.ComputeDecays(plan.Decays, times, rate1, rate2);
        c.ComputeAngles(angles, T.Load(arguments.B1 + lane));
        c.ComputePairs();
        if (NeedsForward(plan, arguments))
            c.ComputeDecays(plan.ForwardDecays, times, rate1, rate2);

        var a = one;
        var b = T.All(0);
        T beforeA = one, beforeB = b, endA = one, endB = b, effective = b;
        foreach (var block in plan.Blocks)
        {
            switch (block.Kind)
            {
                case BlockKind.Relax:
                    var e = c.E1[block.Index];
                    a *= e;
                    b = T.MultiplyAdd(b, e, one - e);
                    break;
                case BlockKind.Map:
                    var columns = arguments.Maps + 2L * block.Index * arguments.MapStride + lane;
                    var multiplier = T.Load(columns);
                    a *= multiplier;
                    b = T.MultiplyAdd(b, multiplier, T.Load(columns + arguments.MapStride));
                    break;
                case BlockKind.Flip:
                    a *= c.Cosine[block.Index];
                    b *= c.Cosine[block.Index];
                    break;
                case BlockKind.Train:
                    var train = plan.Trains[block.Index];
                    c.BeforeA[block.Index] = a;
                    c.BeforeB[block.Index] = b;
                    Through(plan, train, c, times, rate1, rate2, arguments.Samples != null, out var slope, out var offset, out var signal);
                    if (train.EffectiveIndex >= 0)
                        (beforeA, beforeB, effective) = (a, b, signal);
                    a *= slope;
                    b = T.MultiplyAdd(b, slope, offset);
                    if (train.EffectiveIndex >= 0)
                        (endA, endB) = (a, b);
                    break;
            }
        }

        var z = Start(arguments, a, b);
        var before = T.MultiplyAdd(beforeA, z, beforeB);
        T.Store(effective * before, arguments.Signed + lane);
        T.Store(before, arguments.Before + lane);
        T.Store(T.MultiplyAdd(endA, z, endB), arguments.End + lane);
        T.Store(z, arguments.Period + lane);
        if (arguments.Samples != null)
            StoreSamples(plan, c, z, arguments, lane);
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static void StoreSamples(ProgramPlan plan, in Coefficients c, T z, in EngineArguments arguments, int lane)
    {
        for (var t = 0; t < plan.Trains.Length; t++)
        {
            var train = plan.Trains[t];
            var before = T.MultiplyAdd(c.BeforeA[t], z, c.BeforeB[t]);
            for (var s = train.FirstSample; s < train.FirstSample + train.SampleCount; s++)
                T.Store(c.Samples[s] * before, arguments.Samples + (long)s * arguments.SampleStride + lane);
        }
    }

    private static bool NeedsForward(ProgramPlan plan, in EngineArguments arguments) =>
        arguments.Samples != null || (plan.Trains.Length > 0 && plan.Trains[0].End is null);

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static T Start(in EngineArguments arguments, T a, T b)
    {
        if (arguments.Start == StartState.Steady)
            return b / (T.All(1) - a);
        var z = T.All(1);
        for (var i = 0; arguments.Start == StartState.AfterDummies && i < arguments.Dummies; i++)
            z = T.MultiplyAdd(a, z, b);
        return z;
    }

    /// <summary>Map of the longitudinal magnetisation through a train, and the signal over the magnetisation before it.</summary>
    [MethodImpl(MethodImplOptions.NoInlining)]
    private static void Through(
        ProgramPlan plan, TrainPlan train, in Coefficients c, ReadOnlySpan<double> times, T rate1, T rate2, bool samples, out T slope, out T offset, out T signal)
    {
        var limit = T.All(LargestScaling);
        var scaling = T.All(times[train.Duration]) * (rate2 - rate1);
        var extreme = T.AnyLess(limit, scaling);
        if (extreme && !samples && train.End is not null)
            c.ComputeDecays(plan.ForwardDecays, times, rate1, rate2);
        if (extreme || samples || train.End is null)
            ThroughForward(train, c, out slope, out offset, out signal);
        else
            slope = offset = signal = T.All(0);
        if (train.End is null)
            return;
        ThroughBackward(train, c, out var backwardSlope, out var backwardOffset, out var backwardSignal);
        slope = T.SelectLess(limit, scaling, slope, backwardSlope);
        offset = T.SelectLess(limit, scaling, offset, backwardOffset);
        signal = T.SelectLess(limit, scaling, signal, backwardSignal);
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static void ThroughBackward(TrainPlan train, in Coefficients c, out T slope, out T offset, out T signal)
    {
        var sine = c.Sine[train.ExcitationAngle];
        var cosine = c.Cosine[train.ExcitationAngle];
        var flipBack = train.FlipBackAngle;
        var end = PullBackLongitudinal(train, c, out offset);
        if (flipBack >= 0)
        {
            end *= c.Cosine[flipBack];
            offset *= c.Cosine[flipBack];
        }

        slope = end * cosine;
        if (train.FlipBack is not null)
        {
            var returned = PullBackSignal(train.FlipBack, c) * c.E2[train.Duration];
            slope = T.MultiplyAdd(-c.Sine[flipBack] * returned, sine, slope);
        }

        signal = train.EffectiveSample is null
            ? T.All(0)
            : PullBackSignal(train.EffectiveSample, c) * c.E2[train.EffectiveSampleTime] * sine;
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static T PullBackSignal(BackwardRun run, in Coefficients c)
    {
        c.P[run.StartSlot] = T.All(1);
        var rotation = default(BackwardRotation);
        var pair = -1;
        foreach (ref readonly var span in run.Pulses.AsSpan())
        {
            Prepare(span, c);
            if (span.FoldP >= 0)
                c.M[span.FoldM] += c.P[span.FoldP];
            if (span.Pair != pair && span.Count > 0)
                rotation = new BackwardRotation(c, span.Angle, pair = span.Pair);
            rotation.Apply(c.P + span.P, c.M + span.M, c.Z + span.Z, span.Count, span.Stride);
        }

        return run.ResultRephasingSlot < 0 ? c.P[run.ResultSlot] : c.P[run.ResultSlot] + c.M[run.ResultRephasingSlot];
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static T PullBackLongitudinal(TrainPlan train, in Coefficients c, out T offset)
    {
        if (train.LastInterval < 0)
        {
            offset = T.All(1) - c.E1[train.FirstInterval];
            return c.E1[train.FirstInterval];
        }

        c.Z[0] = c.E1[train.LastInterval];
        var sum = T.All(1) - c.Z[0];
        var power = T.All(1);
        var rotation = default(BackwardRotation);
        var pair = -1;
        var interval = -1;
        var recovery = sum;
        foreach (ref readonly var span in train.End!.Pulses.AsSpan())
        {
            Prepare(span, c);
            if (span.FoldP >= 0)
                c.M[span.FoldM] -= c.P[span.FoldP];
            if (span.Pair != pair && span.Count > 0)
                rotation = new BackwardRotation(c, span.Angle, pair = span.Pair);
            rotation.Apply(c.P + span.P, c.M + span.M, c.Z + span.Z, span.Count, span.Stride);
            if (span.RecoverZ < 0)
                continue;

            // The form after this pulse in true scale is its scaled value times the T2 factors of the intervals behind it.
            if (interval >= 0)
                power *= c.E2[interval];
            if (span.RecoverTime != interval)
                recovery = T.All(1) - c.E1[interval = span.RecoverTime];
            sum = T.MultiplyAdd(c.Z[0] * power, recovery, sum);
        }

        offset = sum;
        return c.Z[0] * power * c.E1[train.FirstInterval];
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Prepare(in PulseSpan span, in Coefficients c)
    {
        if (span.ZeroP >= 0)
            c.P[span.ZeroP] = T.All(0);
        if (span.ZeroM >= 0)
            c.M[span.ZeroM] = T.All(0);
        if (span.ZeroZ >= 0)
            c.Z[span.ZeroZ] = T.All(0);
    }

    /// <summary>
    /// Transpose of a rotation and the interval after it, T2 scaled out: the form on the states before from the form on the states after.
    /// </summary>
    private readonly struct BackwardRotation(in Coefficients c, int angle, int pair)
    {
        private readonly T _squaredHalfSine = c.SquaredHalfSine[angle];
        private readonly T _minusSine = c.MinusSine[angle];
        private readonly T _minusHalf = c.MinusHalfSineRatio[pair];
        private readonly T _cosine = c.CosineRatio[pair];

        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        internal void Apply(T* p, T* m, T* z, int count, nint stride)
        {
            for (; count > 0; count--)
            {
                var a = *p;
                var b = *m;
                var s = *z;
                var d = a - b;
                var u = T.MultiplyAdd(_minusHalf, s, _squaredHalfSine * d);
                *p = a - u;
                *m = b + u;
                *z = T.MultiplyAdd(_minusSine, d, _cosine * s);
                p += stride;
                m += stride;
                z += stride;
            }
        }
    }
}
