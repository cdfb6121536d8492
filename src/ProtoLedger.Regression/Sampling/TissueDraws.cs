using System.Collections.Concurrent;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Sampling;

/// <summary>Draws of tissue parameters and of pulse efficiencies. A stream belongs to (tissue, parameter), so every version, scanner and edit meets the same draws and differences are paired.</summary>
internal sealed class TissueDraws(SamplePlan plan)
{
    private readonly ConcurrentDictionary<(string Name, int Dimension), double[]> normals = new();

    /// <summary>Number of draws.</summary>
    internal int Count => plan.Samples;

    /// <summary>Draws of a positive quantity, log-normal with the catalogue's mean and standard deviation.</summary>
    internal double[] LogNormal(string tissue, DrawnParameter parameter, MeasuredValue value)
    {
        // ln X is normal with s² = ln(1 + (sd/mean)²) and mean ln(mean) − s²/2.
        var ratio = value.Sd / value.Mean;
        var variance = Math.Log(1 + ratio * ratio);
        var (centre, spread) = (Math.Log(value.Mean) - variance / 2, Math.Sqrt(variance));
        return Array.ConvertAll(Normals("tissue:" + tissue, (int)parameter), z => Math.Exp(centre + spread * z));
    }

    /// <summary>Draws of an inversion efficiency: normal, kept within [0, 1].</summary>
    internal double[] Efficiency(string pulse, double mean, double sd) =>
        Array.ConvertAll(Normals("pulse:" + pulse, 0), z => Math.Clamp(mean + sd * z, 0, 1));

    private double[] Normals(string name, int dimension) => normals.GetOrAdd((name, dimension), key =>
    {
        var values = new double[plan.Samples];
        ScrambledSobol.Fill(ScrambledSobol.SeedOf(plan.Seed, key.Name), key.Dimension, values);
        for (var i = 0; i < values.Length; i++)
            values[i] = NormalQuantile.At(values[i]);
        return values;
    });
}
