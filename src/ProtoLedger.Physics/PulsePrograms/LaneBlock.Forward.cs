using System.Runtime.CompilerServices;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.PulsePrograms;

internal static unsafe partial class LaneBlock<T>
{
    /// <summary>Below this a transverse factor is taken as nothing: what it would be divided out of is smaller still.</summary>
    private const double Nothing = 1e-290;

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static void ThroughForward(TrainPlan train, in Coefficients c, out T slope, out T offset, out T signal)
    {
        var sine = c.Sine[train.ExcitationAngle];
        var cosine = c.Cosine[train.ExcitationAngle];
        var zero = T.All(0);
        var e1 = c.E1[train.FirstInterval];
        var e2 = c.E2[train.FirstInterval];

        // What was tipped: samples, and what a flip-back returns.
        c.P[train.Tipped.StartSlot] = c.M[train.Tipped.StartRephasingSlot] = sine * e2;
        c.Z[0] = zero;
        CarryForward(train, train.Tipped, c, recovers: false, sine);
        var returned = train.FlipBackAngle < 0 ? zero : -c.Sine[train.FlipBackAngle] * c.P[train.Tipped.EndSlot];
        signal = train.EffectiveIndex < 0 ? zero : c.Samples[train.FirstSample + train.EffectiveIndex];

        // What stayed along z, then what recovers.
        var kept = train.FlipBackAngle < 0 ? T.All(1) : c.Cosine[train.FlipBackAngle];
        c.P[train.Stayed.StartSlot] = c.M[train.Stayed.StartRephasingSlot] = zero;
        c.Z[0] = cosine * e1;
        CarryForward(train, train.Stayed, c, recovers: false, zero);
        slope = T.MultiplyAdd(c.Z[0], kept, returned);

        c.P[train.Stayed.StartSlot] = c.M[train.Stayed.StartRephasingSlot] = zero;
        c.Z[0] = T.All(1) - e1;
        CarryForward(train, train.Stayed, c, recovers: true, zero);
        offset = c.Z[0] * kept;
    }

    /// <summary>Carries the states through the pulses; what was tipped is also read at the samples.</summary>
    [MethodImpl(MethodImplOptions.NoInlining)]
    private static void CarryForward(TrainPlan train, ForwardRun run, in Coefficients c, bool recovers, T sine)
    {
        var tipped = ReferenceEquals(run, train.Tipped);
        var reads = tipped ? run.Samples : [];
        var read = 0;
        for (; read < reads.Length && reads[read].AfterPulse < 0; read++)
            c.Samples[train.FirstSample + read] = sine * c.E2[reads[read].Time];
        for (var i = 0; i < run.Pulses.Length; i++)
        {
            ref readonly var span = ref run.Pulses[i];
            Prepare(span, c);
            RotateForward(span, c);
            if (recovers && span.RecoverZ >= 0)
                c.Z[0] += T.All(1) - c.E1[span.RecoverTime];
            if (span.FoldP >= 0)
                c.P[span.FoldP] = tipped ? c.M[span.FoldM] : -c.M[span.FoldM];
            for (; read < reads.Length && reads[read].AfterPulse == i; read++)
            {
                var rest = c.E2[reads[read].Time];
                var whole = T.SelectLess(rest, T.All(Nothing), T.All(1), rest);
                c.Samples[train.FirstSample + read] = T.SelectLess(rest, T.All(Nothing), T.All(0), c.P[reads[read].Slot] / whole);
            }
        }
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static void RotateForward(in PulseSpan span, in Coefficients c)
    {
        if (span.Count == 0)
            return;
        var e2 = c.E2[span.RecoverTime];
        var e1 = c.E1[span.RecoverTime];
        var s2 = c.SquaredHalfSine[span.Angle];
        var sine = c.Sine[span.Angle];
        var half = T.All(0.5) * sine * e1;
        var cosine = c.Cosine[span.Angle] * e1;
        var p = c.P + span.P;
        var m = c.M + span.M;
        var z = c.Z + span.Z;
        var stride = span.Stride;
        for (var k = 0; k < span.Count; k++)
        {
            var a = *p;
            var b = *m;
            var s = *z;
            var d = a - b;
            var u = T.MultiplyAdd(sine, s, s2 * d);
            *p = (a - u) * e2;
            *m = (b + u) * e2;
            *z = T.MultiplyAdd(half, d, cosine * s);
            p += stride;
            m += stride;
            z += stride;
        }
    }
}
