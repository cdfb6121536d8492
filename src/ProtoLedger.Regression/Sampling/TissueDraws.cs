using System.Collections.Concurrent;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Sampling;

/// <summary>Draws of tissue parameters and of pulse efficiencies. A stream belongs to (tissue, parameter), so every version, scanner and edit meets the same draws and differences are paired.</summary>
internal sealed class TissueDraws(SamplePlan plan)
{
    private readonly ConcurrentDictionary<(string Name, int Dimension), double[]> normals = new();
    private readonly ConcurrentDictionary<(string Tissue, DrawnParameter Parameter, double Mean, double Sd), double[]> scaled = new();

    /// <summary>Number of draws.</summary>
    internal int Count => plan.Samples;

    /// <summary>Draws of a positive quantity, log-normal with a mean and a standard deviation, both in its unit.</summary>
    internal double[] LogNormal(string tissue, DrawnParameter parameter, double mean, double sd)
    {
        // ln X is normal with s² = ln(1 + (sd/mean)²) and mean ln(mean) − s²/2.
        var ratio = sd / mean;
        var variance = Math.Log(1 + ratio * ratio);
        var (centre, spread) = (Math.Log(mean) - variance / 2, Math.Sqrt(variance));
        return scaled.GetOrAdd((tissue, parameter, mean, sd), _ =>
            Array.ConvertAll(Normals("tissue:" + tissue, (int)parameter), z => Math.Exp(centre + spread * z)));
    }

    /// <summary>Draws of the deviation of an inversion's efficiency from its mean: normal; the engine keeps the sum within [0, 1].</summary>
    internal double[] EfficiencyOffset(string pulse, double sd) => Array.ConvertAll(Normals("pulse:" + pulse, 0), z => sd * z);

    private double[] Normals(string name, int dimension) => normals.GetOrAdd((name, dimension), key =>
    {
        var values = new double[plan.Samples];
        ScrambledSobol.Fill(ScrambledSobol.SeedOf(plan.Seed, key.Name), key.Dimension, values);
        for (var i = 0; i < values.Length; i++)
            values[i] = NormalQuantile.At(values[i]);
        return values;
    });
}
