using System.Runtime.CompilerServices;
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
            Ratio = E2 + times;
            SquaredHalfSine = Ratio + times;
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

        /// <summary>exp(−t/T1) / exp(−t/T2), one a time.</summary>
        public readonly T* Ratio;

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
            3 * plan.Times.Length + 4 * plan.AngleCount + 2 * plan.Pairs.Length + 2 * plan.Trains.Length + plan.SampleCount
            + 2 * plan.DephasingSlots + plan.StoredSlots;

        [MethodImpl(MethodImplOptions.NoInlining)]
        internal void ComputeDecays(Decay[] decays, ReadOnlySpan<double> times, T rate1, T rate2)
        {
            // E1, E2 and the ratios stand one behind the other; so do the rates.
            var count = times.Length;
            var rates = stackalloc T[3];
            (rates[0], rates[1], rates[2]) = (rate1, rate2, rate1 - rate2);
            foreach (ref readonly var decay in decays.AsSpan())
            {
                var target = E1 + (int)decay.Rate * count;
                target[decay.Time] = decay.BaseTime < 0
                    ? Elementary.Exp(T.All(-times[decay.Time]) * rates[(int)decay.Rate])
                    : Power(target[decay.BaseTime], decay.Power);
            }
        }

        [MethodImpl(MethodImplOptions.NoInlining)]
        internal void ComputeAngles(ReadOnlySpan<double> angles, T b1)
        {
            for (var i = 0; i < angles.Length; i++)
            {
                Elementary.SinCos(T.All(angles[i] * (Math.PI / 360)) * b1, out var sine, out var cosine);
                var squared = sine * sine;
                var whole = T.All(2) * sine * cosine;
                SquaredHalfSine[i] = squared;
                Sine[i] = whole;
                MinusSine[i] = -whole;
                Cosine[i] = T.MultiplyAdd(T.All(-2), squared, T.All(1));
            }
        }

        [MethodImpl(MethodImplOptions.NoInlining)]
        internal void ComputePairs()
        {
            var pairs = _plan.Pairs;
            for (var i = 0; i < pairs.Length; i++)
            {
                var (angle, time) = pairs[i];
                var ratio = time < 0 ? T.All(1) : Ratio[time];
                MinusHalfSineRatio[i] = T.All(-0.5) * Sine[angle] * ratio;
                CosineRatio[i] = Cosine[angle] * ratio;
            }
        }

        private static T Power(T value, int exponent)
        {
            var result = T.All(1);
            for (; exponent > 0; exponent >>= 1)
            {
                result = (exponent & 1) != 0 ? result * value : result;
                value *= value;
            }

            return result;
        }
    }
}
