using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.PulsePrograms;

internal static unsafe partial class LaneBlock<T>
{
    /// <summary>Coefficients and states of one block of lanes, in the thread's workspace.</summary>
    internal readonly ref struct Coefficients
    {
        private readonly ProgramPlan _plan;

        internal Coefficients(ProgramPlan plan, T* memory)
        {
            _plan = plan;
            var times = plan.Times.Length;
            var angles = plan.AngleCount;
            E1 = memory;
            E2 = E1 + times;
            SquaredHalfSine = E2 + times;
            Sine = SquaredHalfSine + angles;
            MinusSine = Sine + angles;
            Cosine = MinusSine + angles;
            MinusHalfSineRatio = Cosine + angles;
            CosineRatio = MinusHalfSineRatio + plan.Pairs.Length;
            BeforeA = CosineRatio + plan.Pairs.Length;
            BeforeB = BeforeA + plan.Trains.Length;
            Samples = BeforeB + plan.Trains.Length;
            P = Samples + plan.SampleCount;
            M = P + plan.DephasingSlots;
            Z = M + plan.DephasingSlots;
        }

        /// <summary>exp(−t/T1) and exp(−t/T2), one a time.</summary>
        public readonly T* E1, E2;

        /// <summary>Of each angle times B1+.</summary>
        public readonly T* SquaredHalfSine, Sine, MinusSine, Cosine;

        /// <summary>−½ sin α and cos α times exp(−t/T1) / exp(−t/T2), one a pair.</summary>
        public readonly T* MinusHalfSineRatio, CosineRatio;

        /// <summary>Map from the start of the period to before each train.</summary>
        public readonly T* BeforeA, BeforeB;

        /// <summary>Each sample over the longitudinal magnetisation before its excitation.</summary>
        public readonly T* Samples;

        /// <summary>Dephasing, rephasing and stored states.</summary>
        public readonly T* P, M, Z;

        internal static int Size(ProgramPlan plan) =>
            2 * plan.Times.Length + 4 * plan.AngleCount + 2 * plan.Pairs.Length + 2 * plan.Trains.Length + plan.SampleCount
            + 2 * plan.DephasingSlots + plan.StoredSlots;

        internal void Compute(
            ProgramPlan plan, ReadOnlySpan<double> times, ReadOnlySpan<double> angles, T rate1, T rate2, T b1, bool forward)
        {
            for (var i = 0; i < times.Length; i++)
            {
                var use = plan.Uses[i];
                var minusTime = T.All(-times[i]);
                if ((use & (TimeUse.BackwardT1 | TimeUse.BackwardRatio)) != 0)
                    E1[i] = Elementary.Exp(minusTime * rate1);
                if ((use & (TimeUse.BackwardT2 | TimeUse.BackwardRatio)) != 0)
                    E2[i] = Elementary.Exp(minusTime * rate2);
            }

            if (forward)
                ComputeForward(times, rate1, rate2);

            for (var i = 0; i < angles.Length; i++)
            {
                Elementary.SinCos(T.All(angles[i] * (Math.PI / 360)) * b1, out var sine, out var cosine);
                var squared = sine * sine;
                SquaredHalfSine[i] = squared;
                Sine[i] = T.All(2) * sine * cosine;
                MinusSine[i] = -Sine[i];
                Cosine[i] = T.MultiplyAdd(T.All(-2), squared, T.All(1));
            }

            for (var i = 0; i < plan.Pairs.Length; i++)
            {
                var (angle, time) = plan.Pairs[i];
                var ratio = time < 0 ? T.All(1) : Elementary.Exp(T.All(-times[time]) * (rate1 - rate2));
                MinusHalfSineRatio[i] = T.All(-0.5) * Sine[angle] * ratio;
                CosineRatio[i] = Cosine[angle] * ratio;
            }
        }

        /// <summary>Factors that only runs in the forward direction need.</summary>
        internal void ComputeForward(ReadOnlySpan<double> times, T rate1, T rate2)
        {
            for (var i = 0; i < times.Length; i++)
            {
                var minusTime = T.All(-times[i]);
                if ((_plan.Uses[i] & TimeUse.ForwardT1) != 0)
                    E1[i] = Elementary.Exp(minusTime * rate1);
                if ((_plan.Uses[i] & TimeUse.ForwardT2) != 0)
                    E2[i] = Elementary.Exp(minusTime * rate2);
            }
        }
    }
}
