namespace ProtoLedger.Regression.Sampling;

/// <summary>Inverse of the standard normal distribution function.</summary>
/// <remarks>Wichura, Algorithm AS 241 (PPND16), Applied Statistics 1988;37:477; relative error about 1e-16.</remarks>
internal static class NormalQuantile
{
    private static ReadOnlySpan<double> A => [3.3871328727963666080, 133.14166789178437745, 1971.5909503065514427, 13731.693765509461125, 45921.953931549871457, 67265.770927008700853, 33430.575583588128105, 2509.0809287301226727];

    private static ReadOnlySpan<double> B => [1, 42.313330701600911252, 687.18700749205790830, 5394.1960214247511077, 21213.794301586595867, 39307.895800092710610, 28729.085735721942674, 5226.4952788528545610];

    private static ReadOnlySpan<double> C => [1.42343711074968357734, 4.63033784615654529590, 5.76949722146069140550, 3.64784832476320460504, 1.27045825245236838258, 0.241780725177450611770, 0.0227238449892691845833, 0.000774545014278341407640];

    private static ReadOnlySpan<double> D => [1, 2.05319162663775882187, 1.67638483018380384940, 0.689767334985100004550, 0.148103976427480074590, 0.0151986665636164571966, 0.000547593808499534494600, 0.00000000105075007164441684324];

    private static ReadOnlySpan<double> E => [6.65790464350110377720, 5.46378491116411436990, 1.78482653991729133580, 0.296560571828504891230, 0.0265321895265761230930, 0.00124266094738807843860, 0.0000271155556874348757815, 0.000000201033439929228813265];

    private static ReadOnlySpan<double> F => [1, 0.599832206555887937690, 0.136929880922735805310, 0.0148753612908506148525, 0.000786869131145613259100, 0.0000184631831751005468180, 0.000000142151175831644588870, 0.00000000000000204426310338993978564];

    /// <summary>z with probability <paramref name="p"/> below it.</summary>
    /// <param name="p">In (0, 1).</param>
    internal static double At(double p)
    {
        var q = p - 0.5;
        if (Math.Abs(q) <= 0.425)
        {
            var r = 0.180625 - q * q;
            return q * Polynomial(A, r) / Polynomial(B, r);
        }

        var tail = Math.Sqrt(-Math.Log(q < 0 ? p : 1 - p));
        var z = tail <= 5
            ? Polynomial(C, tail - 1.6) / Polynomial(D, tail - 1.6)
            : Polynomial(E, tail - 5) / Polynomial(F, tail - 5);
        return q < 0 ? -z : z;
    }

    private static double Polynomial(ReadOnlySpan<double> coefficients, double x)
    {
        var sum = 0.0;
        for (var i = coefficients.Length - 1; i >= 0; i--)
            sum = sum * x + coefficients[i];
        return sum;
    }
}
