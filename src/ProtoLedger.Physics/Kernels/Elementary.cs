using System.Runtime.CompilerServices;

namespace ProtoLedger.Physics.Kernels;

/// <summary>Own exponential, sine, cosine and logarithm: the same bits for one value and for vectors, under every instruction set.</summary>
/// <remarks>
/// The platform's own functions differ between their scalar and vector forms and between instruction sets, and predictions are signed and hashed.
/// Each function is a fixed sequence of exactly rounded operations; error at most 2 units in the last place of the platform's scalar function.
/// </remarks>
public static class Elementary
{
    /// <summary>1.5 · 2^52: adding it rounds to an integer, which then stands in the low bits.</summary>
    internal const double Bias = 6755399441055744.0;

    /// <summary>Bits of <see cref="Bias"/>.</summary>
    internal const long BiasBits = 0x4338000000000000;

    /// <summary>Bits of the double next below √½ that keeps mantissas in [√½, √2).</summary>
    internal const long SqrtHalfBits = 0x3FE6A09E667F3BCD;

    /// <summary>eˣ. 0 below −708 (no subnormal results), +∞ above 709.78.</summary>
    public static double Exp(double x) => Scalar(Exp(new Lanes1(x)));

    /// <summary>sin x for |x| ≤ 10⁵ radians.</summary>
    public static double Sin(double x)
    {
        SinCos(new Lanes1(x), out var sine, out _);
        return Scalar(sine);
    }

    /// <summary>cos x for |x| ≤ 10⁵ radians.</summary>
    public static double Cos(double x)
    {
        SinCos(new Lanes1(x), out _, out var cosine);
        return Scalar(cosine);
    }

    /// <summary>Natural logarithm of a positive normal number.</summary>
    public static double Log(double x) => Scalar(Log(new Lanes1(x)));

    /// <summary>Exponential of each lane.</summary>
    /// <remarks>x = n ln 2 + r, |r| ≤ ½ ln 2; Taylor polynomial of degree 13 in r (remainder below 5·10⁻¹⁸), exponent by integer addition.</remarks>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static T Exp<T>(T x)
        where T : unmanaged, ILanes<T>
    {
        var biased = T.MultiplyAdd(x, T.All(1.4426950408889634), T.All(Bias));
        var n = biased - T.All(Bias);
        var r = T.MultiplyAdd(n, T.All(-0.6931471805599453), x);
        r = T.MultiplyAdd(n, T.All(-2.3190468138462996e-17), r);

        var p = T.All(1.0 / 6227020800);
        p = T.MultiplyAdd(p, r, T.All(1.0 / 479001600));
        p = T.MultiplyAdd(p, r, T.All(1.0 / 39916800));
        p = T.MultiplyAdd(p, r, T.All(1.0 / 3628800));
        p = T.MultiplyAdd(p, r, T.All(1.0 / 362880));
        p = T.MultiplyAdd(p, r, T.All(1.0 / 40320));
        p = T.MultiplyAdd(p, r, T.All(1.0 / 5040));
        p = T.MultiplyAdd(p, r, T.All(1.0 / 720));
        p = T.MultiplyAdd(p, r, T.All(1.0 / 120));
        p = T.MultiplyAdd(p, r, T.All(1.0 / 24));
        p = T.MultiplyAdd(p, r, T.All(1.0 / 6));
        p = T.MultiplyAdd(p, r, T.All(0.5));
        p = T.MultiplyAdd(p, r, T.All(1));
        p = T.MultiplyAdd(p, r, T.All(1));

        var result = T.AddToExponent(p, biased);
        result = T.SelectLess(x, T.All(-708), T.All(0), result);
        return T.SelectLess(T.All(709.782712893384), x, T.All(double.PositiveInfinity), result);
    }

    /// <summary>Sine and cosine of each lane, radians, |x| ≤ 10⁵.</summary>
    /// <remarks>
    /// x = n π/2 + r, |r| ≤ π/4, with π/2 in three parts. Polynomials: minimax coefficients published with the FreeBSD math library
    /// (k_sin.c and k_cos.c, Sun Microsystems 1993), errors below 2⁻⁵⁸.
    /// </remarks>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static void SinCos<T>(T x, out T sine, out T cosine)
        where T : unmanaged, ILanes<T>
    {
        var biased = T.MultiplyAdd(x, T.All(0.6366197723675814), T.All(Bias));
        var n = biased - T.All(Bias);
        var r = T.MultiplyAdd(n, T.All(-1.5707963267948966), x);
        r = T.MultiplyAdd(n, T.All(-6.123233995736766e-17), r);
        r = T.MultiplyAdd(n, T.All(1.4973849048591833e-33), r);
        var z = r * r;

        var s = T.All(1.58969099521155010221e-10);
        s = T.MultiplyAdd(s, z, T.All(-2.50507602534068634195e-08));
        s = T.MultiplyAdd(s, z, T.All(2.75573137070700676789e-06));
        s = T.MultiplyAdd(s, z, T.All(-1.98412698298579493134e-04));
        s = T.MultiplyAdd(s, z, T.All(8.33333333332248946124e-03));
        s = T.MultiplyAdd(s, z, T.All(-1.66666666666666324348e-01));
        s = T.MultiplyAdd(s * z, r, r);

        var c = T.All(-1.13596475577881948265e-11);
        c = T.MultiplyAdd(c, z, T.All(2.08757232129817482790e-09));
        c = T.MultiplyAdd(c, z, T.All(-2.75573143513906633035e-07));
        c = T.MultiplyAdd(c, z, T.All(2.48015872894767294178e-05));
        c = T.MultiplyAdd(c, z, T.All(-1.38888888888741095749e-03));
        c = T.MultiplyAdd(c, z, T.All(4.16666666666666019037e-02));
        var half = T.All(0.5) * z;
        var w = T.All(1) - half;
        c = w + T.MultiplyAdd(z * z, c, (T.All(1) - w) - half);

        // Quadrant n: sine takes the cosine polynomial where n is odd; signs follow bit 1 of n and of n + 1.
        sine = T.FlipSignByBit1(biased, T.SelectOdd(biased, c, s));
        cosine = T.FlipSignByBit1(biased + T.All(1), T.SelectOdd(biased, s, c));
    }

    /// <summary>Natural logarithm of each lane; positive normal numbers.</summary>
    /// <remarks>
    /// x = m · 2^e, f = m − 1, s = f / (2 + f), log m = f − f²/2 + s (f²/2 + R(s²)); coefficients of R published with the FreeBSD math library
    /// (e_log.c, Sun Microsystems 1993).
    /// </remarks>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static T Log<T>(T x)
        where T : unmanaged, ILanes<T>
    {
        var m = T.SplitExponent(x, out var e);
        var f = m - T.All(1);
        var s = f / (T.All(2) + f);
        var z = s * s;
        var p = T.All(1.479819860511658591e-01);
        p = T.MultiplyAdd(p, z, T.All(1.531383769920937332e-01));
        p = T.MultiplyAdd(p, z, T.All(1.818357216161805012e-01));
        p = T.MultiplyAdd(p, z, T.All(2.222219843214978396e-01));
        p = T.MultiplyAdd(p, z, T.All(2.857142874366239149e-01));
        p = T.MultiplyAdd(p, z, T.All(3.999999999940941908e-01));
        p = T.MultiplyAdd(p, z, T.All(6.666666666666735130e-01));
        var half = T.All(0.5) * f * f;
        var tail = T.MultiplyAdd(s, T.MultiplyAdd(p, z, half), e * T.All(1.90821492927058770002e-10));
        return T.MultiplyAdd(e, T.All(6.93147180369123816490e-01), f - (half - tail));
    }

    private static unsafe double Scalar(Lanes1 value)
    {
        double result;
        Lanes1.Store(value, &result);
        return result;
    }
}
