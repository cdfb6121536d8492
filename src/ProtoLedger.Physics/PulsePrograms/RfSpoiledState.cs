using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Steady state of a gradient echo with RF spoiling: phase of pulse n is δ n (n + 1) / 2, one unit of dephasing each repetition time.</summary>
/// <remarks>
/// In the frame of the pulse, with order k turned by k θ, θ growing by δ each time, the states p (order k), m (conjugate of order −k) and z of a steady
/// state obey constant relations: pulse, then p(k+1) = E2 e^{ikδ} p′(k), m(k−1) = E2 e^{ikδ} m′(k), z(k) = E1 e^{ikδ} z′(k), and z(0) recovers.
/// Eliminating z gives p′ = (1 − h) p + h m, m′ = h p + (1 − h) m with h = s² + ½ S² E1 e^{ikδ} / (1 − E1 C e^{ikδ}); the ratio ρ = m / p then follows
/// downwards from the cut-off order as a continued fraction: ρ(k) = g (1 − h) / (1 − g h), g = E2² e^{i(2k+1)δ} (h(k+1) + (1 − h(k+1)) ρ(k+1)).
/// Each order contributes at most E2² of what the one above it does, so cutting at K leaves an error below E2^{2K}. Derived from the phase-graph
/// equations of Weigel, J Magn Reson Imaging 2015;41:266.
/// </remarks>
internal static class RfSpoiledState<T>
    where T : unmanaged, ILanes<T>
{
    /// <summary>Computes a block of lanes.</summary>
    /// <param name="repetition">TR, ms.</param>
    /// <param name="echo">TE, ms; dephasing comes after it.</param>
    /// <param name="angle">Degrees.</param>
    /// <param name="phases">Cosine and sine of kδ for k = 0, 1, …, as many as <see cref="SpoilingPhases"/> gives for the longest T2.</param>
    /// <param name="rate1">1/T1, 1/ms.</param>
    /// <param name="rate2">1/T2, 1/ms.</param>
    /// <param name="b1">B1+ scale.</param>
    internal static BalancedSignal<T> Solve(double repetition, double echo, double angle, SpoilingPhases phases, T rate1, T rate2, T b1)
    {
        var one = T.All(1);
        var zero = T.All(0);
        Elementary.SinCos(T.All(angle * (Math.PI / 360)) * b1, out var sineHalf, out var cosineHalf);
        var s2 = sineHalf * sineHalf;
        var sine = T.All(2) * sineHalf * cosineHalf;
        var cosine = one - T.All(2) * s2;
        var e1 = Elementary.Exp(T.All(-repetition) * rate1);
        var e2 = Elementary.Exp(T.All(-repetition) * rate2);
        var e2Squared = e2 * e2;
        var coupling = T.All(0.5) * sine * sine * e1;
        var turned = e1 * cosine;

        // Lanes with shorter T2 start at a lower order, whatever lanes stand beside them: until then their ratio stays 0.
        var cutOff = T.All(SpoilingPhases.OrdersPerRatio / repetition) / rate2;
        Complex<T> ratio = new(zero, zero);
        var above = Mixing(phases, phases.Highest, s2, coupling, turned);
        Complex<T> g = new(zero, zero);
        for (var k = phases.Highest - 1; k >= 0; k--)
        {
            var rest = new Complex<T>(one - above.Real, -above.Imaginary);
            g = phases.At<T>(2 * k + 1) * (above + rest * ratio) * e2Squared;
            if (k == 0)
                break;
            above = Mixing(phases, k, s2, coupling, turned);
            rest = new Complex<T>(one - above.Real, -above.Imaginary);
            var product = g * above;
            ratio = (g * rest).Over(new Complex<T>(one - product.Real, -product.Imaginary));
            var order = T.All(k);
            ratio = new Complex<T>(T.SelectLess(order, cutOff, ratio.Real, zero), T.SelectLess(order, cutOff, ratio.Imaginary, zero));
        }

        // Order 0: x = c² conj(g x) + s² g x − i S z, linear in z.
        var open = one - g.Real;
        var q = g.Real - g.Imaginary * g.Imaginary / open;
        var imaginary = -sine / (one + cosine * q);
        var real = -g.Imaginary * imaginary / open;
        var before = (one - e1) / (one - e1 * (cosine - sine * imaginary * q));
        var after = cosine * before - sine * imaginary * q * before;

        var decay = Elementary.Exp(T.All(-echo) * rate2);
        var recovery = Elementary.Exp(T.All(-echo) * rate1);
        return new BalancedSignal<T>(
            -imaginary * before * decay, real * before * decay, before, T.MultiplyAdd(after, recovery, one - recovery));
    }

    private static Complex<T> Mixing(SpoilingPhases phases, int order, T s2, T coupling, T turned)
    {
        var phase = phases.At<T>(order);
        var ratio = phase.Over(new Complex<T>(T.All(1) - turned * phase.Real, -(turned * phase.Imaginary)));
        return new Complex<T>(T.MultiplyAdd(coupling, ratio.Real, s2), coupling * ratio.Imaginary);
    }
}

/// <summary>Complex numbers, one a lane.</summary>
/// <param name="Real">Real part.</param>
/// <param name="Imaginary">Imaginary part.</param>
internal readonly record struct Complex<T>(T Real, T Imaginary)
    where T : unmanaged, ILanes<T>
{
    public static Complex<T> operator +(Complex<T> a, Complex<T> b) => new(a.Real + b.Real, a.Imaginary + b.Imaginary);

    public static Complex<T> operator *(Complex<T> a, Complex<T> b) =>
        new(a.Real * b.Real - a.Imaginary * b.Imaginary, a.Real * b.Imaginary + a.Imaginary * b.Real);

    public static Complex<T> operator *(Complex<T> a, T b) => new(a.Real * b, a.Imaginary * b);

    internal Complex<T> Over(Complex<T> divisor)
    {
        var scale = T.All(1) / (divisor.Real * divisor.Real + divisor.Imaginary * divisor.Imaginary);
        return new(
            (Real * divisor.Real + Imaginary * divisor.Imaginary) * scale,
            (Imaginary * divisor.Real - Real * divisor.Imaginary) * scale);
    }
}
