using BenchmarkDotNet.Attributes;
using ProtoLedger.Physics.Kernels;

namespace ProtoLedger.Benchmarks;

/// <summary>The own exponential against the platform's: the price of equal bits.</summary>
public class ElementaryBenchmarks
{
    private readonly double[] _input = [.. Enumerable.Range(0, 4096).Select(i => -i / 300.0)];
    private readonly double[] _output = new double[4096];

    /// <summary>The platform's scalar function.</summary>
    [Benchmark(Baseline = true)]
    public void PlatformExp()
    {
        for (var i = 0; i < _input.Length; i++)
            _output[i] = Math.Exp(_input[i]);
    }

    /// <summary>The scalar twin.</summary>
    [Benchmark]
    public void ScalarExp()
    {
        for (var i = 0; i < _input.Length; i++)
            _output[i] = Elementary.Exp(_input[i]);
    }

    /// <summary>512-bit vectors.</summary>
    [Benchmark]
    public unsafe void VectorExp()
    {
        fixed (double* input = _input, output = _output)
            for (var i = 0; i < _input.Length; i += Lanes8.Width)
                Lanes8.Store(Elementary.Exp(Lanes8.Load(input + i)), output + i);
    }
}
