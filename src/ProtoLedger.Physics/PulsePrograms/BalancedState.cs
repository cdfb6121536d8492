using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>Steady state of a balanced gradient echo with alternating RF phase: the whole magnetisation crosses, a 3 × 3 affine fixed point.</summary>
/// <remarks>
/// Frame of the pulse: rotation by α about +x, then relaxation and precession by θ = 2π Δf TR + π. Eliminating x and y from
/// M = E · P(θ) · R(α) · M + (1 − E1) z gives the closed form below (derived from the Bloch equations; on resonance it is that of
/// Freeman and Hill, J Magn Reson 1971;4:366).
/// </remarks>
internal static class BalancedState<T>
    where T : unmanaged, ILanes<T>
{
    /// <summary>Computes a block of lanes.</summary>
    /// <param name="repetition">TR, ms.</param>
    /// <param name="echo">TE, ms.</param>
    /// <param name="angle">Degrees.</param>
    /// <param name="rate1">1/T1, 1/ms.</param>
    /// <param name="rate2">1/T2, 1/ms.</param>
    /// <param name="b1">B1+ scale.</param>
    /// <param name="frequency">Off-resonance, kHz.</param>
    internal static BalancedSignal<T> Solve(double repetition, double echo, double angle, T rate1, T rate2, T b1, T frequency)
    {
        var one = T.All(1);
        Elementary.SinCos(T.All(angle * (Math.PI / 180)) * b1, out var sine, out var cosine);
        Elementary.SinCos(T.All(2 * Math.PI * repetition) * frequency, out var minusSin, out var minusCos);
        var (sinTheta, cosTheta) = (-minusSin, -minusCos);
        var e1 = Elementary.Exp(T.All(-repetition) * rate1);
        var e2 = Elementary.Exp(T.All(-repetition) * rate2);

        var open = one - e2 * cosTheta;
        var q = e2 * (cosTheta - e2) / open;
        var turned = one - q * cosine;
        var before = (one - e1) / (one - e1 * (cosine - q * sine * sine / turned));
        var y = -sine * before / turned;
        var x = -e2 * sinTheta * y / open;
        var z = T.MultiplyAdd(q * y, sine, cosine * before);

        Elementary.SinCos(T.All(2 * Math.PI * echo) * frequency, out var sinEcho, out var cosEcho);
        var decay = Elementary.Exp(T.All(-echo) * rate2);
        var recovery = Elementary.Exp(T.All(-echo) * rate1);
        return new BalancedSignal<T>(
            -(x * sinEcho + y * cosEcho) * decay,
            (x * cosEcho - y * sinEcho) * decay,
            before,
            T.MultiplyAdd(z, recovery, one - recovery));
    }
}

/// <summary>Steady-state signal of a gradient echo whose transverse magnetisation crosses the repetition time.</summary>
/// <param name="Signed">Component along the direction into which the excitation tips +z.</param>
/// <param name="Quadrature">Component across it.</param>
/// <param name="Before">Longitudinal magnetisation before the pulse.</param>
/// <param name="End">Longitudinal magnetisation at the echo.</param>
internal readonly record struct BalancedSignal<T>(T Signed, T Quadrature, T Before, T End);
