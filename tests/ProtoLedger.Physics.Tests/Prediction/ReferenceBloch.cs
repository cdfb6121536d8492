using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.OdeSolvers;

namespace ProtoLedger.Physics.Tests.Prediction;

/// <summary>
/// Slow reference: an ensemble of isochromats spread over whole cycles, precession and relaxation integrated with MathNet's fourth-order Runge-Kutta,
/// pulses as rotation matrices. Written from the Bloch equation alone; no phase graph, no closed form.
/// </summary>
/// <param name="t1">ms.</param>
/// <param name="t2">ms.</param>
/// <param name="isochromats">Number, at least two for each dephasing of a train.</param>
internal sealed class ReferenceBloch(double t1, double t2, int isochromats)
{
    private const double LongestStep = 1;
    private const double LargestTurn = 0.02;

    private readonly Vector<double>[] _spins = [.. Enumerable.Range(0, isochromats).Select(_ => Vector<double>.Build.Dense([0, 0, 1]))];

    /// <summary>Voxel mean.</summary>
    internal Vector<double> Mean => _spins.Aggregate((a, b) => a + b) / isochromats;

    /// <summary>Component along −y: where an excitation about +x tips +z.</summary>
    internal double Signed => -Mean[1];

    /// <summary>Right-handed rotation about an axis in the transverse plane.</summary>
    internal void Rotate(double degrees, double axisDegrees)
    {
        var (a, p) = (degrees * Math.PI / 180, axisDegrees * Math.PI / 180);
        var (c, s) = (Math.Cos(a), Math.Sin(a));
        var (x, y) = (Math.Cos(p), Math.Sin(p));
        var matrix = Matrix<double>.Build.DenseOfArray(new[,]
        {
            { c + x * x * (1 - c), x * y * (1 - c), y * s },
            { x * y * (1 - c), c + y * y * (1 - c), -x * s },
            { -y * s, x * s, c },
        });
        for (var i = 0; i < _spins.Length; i++)
            _spins[i] = matrix * _spins[i];
    }

    /// <summary>Free precession and relaxation.</summary>
    /// <param name="duration">ms.</param>
    /// <param name="cycles">Turns of dephasing from one side of the voxel to the other.</param>
    /// <param name="offResonance">kHz, the same for all.</param>
    internal void Wait(double duration, double cycles = 0, double offResonance = 0)
    {
        if (duration <= 0)
            return;
        for (var i = 0; i < _spins.Length; i++)
        {
            var omega = 2 * Math.PI * (offResonance + cycles * i / isochromats / duration);
            var steps = 2 + (int)Math.Max(duration / Math.Min(LongestStep, t2 / 20), Math.Abs(omega) * duration / LargestTurn);
            _spins[i] = RungeKutta.FourthOrder(_spins[i], 0, duration, steps, (_, m) => Vector<double>.Build.Dense(
                [-omega * m[1] - m[0] / t2, omega * m[0] - m[1] / t2, (1 - m[2]) / t1]))[^1];
        }
    }

    /// <summary>Transverse magnetisation is lost, the longitudinal one is averaged.</summary>
    internal void Spoil()
    {
        var z = Mean[2];
        for (var i = 0; i < _spins.Length; i++)
            _spins[i] = Vector<double>.Build.Dense([0, 0, z]);
    }

    /// <summary>Mz → factor · Mz, transverse magnetisation spoiled.</summary>
    internal void Multiply(double factor)
    {
        Spoil();
        for (var i = 0; i < _spins.Length; i++)
            _spins[i] = Vector<double>.Build.Dense([0, 0, factor * _spins[i][2]]);
    }

    /// <summary>Recovery of averaged magnetisation after a spoil: one isochromat stands for all.</summary>
    internal void Recover(double duration)
    {
        Spoil();
        var steps = 2 + (int)duration;
        var end = RungeKutta.FourthOrder(_spins[0], 0, duration, steps, (_, m) => Vector<double>.Build.Dense([0, 0, (1 - m[2]) / t1]))[^1];
        Array.Fill(_spins, end);
    }
}
