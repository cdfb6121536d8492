namespace ProtoLedger.Reports.Pictures;

/// <summary>Normal draws in pairs from a seed: SplitMix64 (Steele, Lea and Flood, OOPSLA 2014) and the transformation of Box and Muller (1958).</summary>
internal sealed class NoiseDraws(ulong seed)
{
    private ulong state = seed;

    /// <summary>Two independent draws of mean 0 and variance 1.</summary>
    public (double First, double Second) Next()
    {
        var radius = Math.Sqrt(-2 * Math.Log(1 - Uniform()));
        var (sin, cos) = Math.SinCos(2 * Math.PI * Uniform());
        return (radius * cos, radius * sin);
    }

    private double Uniform() => (Bits() >> 11) * (1.0 / (1UL << 53));

    private ulong Bits()
    {
        unchecked
        {
            state += 0x9E3779B97F4A7C15;
            var z = state;
            z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
            z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
            return z ^ (z >> 31);
        }
    }
}
