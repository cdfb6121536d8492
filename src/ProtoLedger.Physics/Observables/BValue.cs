namespace ProtoLedger.Physics.Observables;

/// <summary>Diffusion weighting of a pair of gradient lobes, one each side of the refocusing pulse.</summary>
public static class BValue
{
    private const int Steps = 4096;

    /// <summary>b of two equal trapezoidal lobes, s/mm²: ∫ k(t)² dt with k the integral of 2π γ̄ G, integrated numerically.</summary>
    /// <param name="amplitude">Of the flat top, mT/m.</param>
    /// <param name="duration">Flat top plus one ramp, ms: amplitude · duration is the area of a lobe.</param>
    /// <param name="separation">Start of the first lobe to start of the second, ms, ≥ duration plus ramp.</param>
    /// <param name="ramp">Of each ramp, ms, in [0, duration]; 0 is a rectangle.</param>
    /// <remarks>Source: Stejskal, Tanner, J Chem Phys 1965;42:288 (from memory); Simpson's rule on each straight piece, exact for its polynomials. Crushers do not count.</remarks>
    public static double Trapezoids(double amplitude, double duration, double separation, double ramp = 0)
    {
        if (!(ramp >= 0 && ramp <= duration))
            throw new ArgumentOutOfRangeException(nameof(ramp), ramp, $"A ramp lies between 0 and the lobe's duration, {duration} ms.");
        if (!(separation >= duration + ramp))
            throw new ArgumentOutOfRangeException(nameof(separation), separation, $"Lobes of {duration + ramp} ms overlap at this separation.");

        // Radians per mm: 2π · Hz/T · mT/m · ms = 2π γ̄ · 1e-3 T/(1e3 mm) · 1e-3 s.
        var scale = 2 * Math.PI * Proton.HzPerTesla * 1e-9 * amplitude;
        double[] times = [0, ramp, duration, duration + ramp, separation, separation + ramp, separation + duration, separation + duration + ramp];
        double[] gradients = [0, 1, 1, 0, 0, -1, -1, 0];
        if (ramp == 0)
            gradients = [1, 1, 1, 0, -1, -1, -1, 0];
        double k = 0, b = 0;
        for (var piece = 0; piece + 1 < times.Length; piece++)
            b += Piece(times[piece + 1] - times[piece], gradients[piece], ramp == 0 ? gradients[piece] : gradients[piece + 1], ref k);
        return scale * scale * b * 1e-3;
    }

    /// <summary>∫ k² over a piece on which the gradient is linear; moves k to the end of the piece.</summary>
    private static double Piece(double length, double from, double to, ref double k)
    {
        var start = k;
        double At(double t) => start + from * t + (length == 0 ? 0 : (to - from) * t * t / (2 * length));
        k = At(length);
        var sum = 0.0;
        for (var i = 0; i < Steps; i++)
        {
            var (low, middle, high) = (At(length * i / Steps), At(length * (i + 0.5) / Steps), At(length * (i + 1) / Steps));
            sum += low * low + 4 * middle * middle + high * high;
        }

        return sum * length / (6 * Steps);
    }
}
