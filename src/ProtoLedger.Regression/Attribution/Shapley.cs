using System.Numerics;
using ProtoLedger.Regression.Sampling;

namespace ProtoLedger.Regression.Attribution;

/// <summary>Values of every coalition of players, many observables at once.</summary>
/// <param name="coalition">Bit i set: player i plays its new value.</param>
/// <returns>One value for each observable; all calls return equally many.</returns>
internal delegate double[] CoalitionValue(UInt128 coalition);

/// <summary>Shapley values: the average, over all orders in which players could be changed, of what each change adds.</summary>
/// <remarks>Shapley, A value for n-person games, 1953. Shares add up to v(all) − v(none); a player that never adds anything gets 0; players that add the same get the same.</remarks>
internal static class Shapley
{
    /// <summary>Most players for which every coalition is evaluated: 4096 of them.</summary>
    internal const int ExactPlayers = 12;

    /// <summary>Most players altogether: one bit each.</summary>
    internal const int MostPlayers = 128;

    private const int SampledPairs = 64;

    /// <summary>Shares of n players in m observables.</summary>
    /// <param name="players">n, 1 … <see cref="MostPlayers"/>.</param>
    /// <param name="value">Evaluates a coalition; each is asked for once; may be called from several threads.</param>
    /// <param name="seed">Seed of the orders when they are sampled.</param>
    internal static ShapleyShares Compute(int players, CoalitionValue value, ulong seed)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(players, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(players, MostPlayers);
        return players <= ExactPlayers ? Exact(players, value) : Sampled(players, value, seed);
    }

    private static ShapleyShares Exact(int players, CoalitionValue value)
    {
        var values = new double[1 << players][];
        Parallel.For(0, values.Length, coalition => values[coalition] = value((UInt128)coalition));
        var observables = values[0].Length;
        var shares = new double[players, observables];
        // Weight of a coalition of s others: s! (n − s − 1)! / n! = 1 / (n · C(n − 1, s)).
        var weights = new double[players];
        var binomial = 1.0;
        for (var s = 0; s < players; s++)
        {
            weights[s] = 1 / (players * binomial);
            binomial = binomial * (players - 1 - s) / (s + 1);
        }

        for (var player = 0; player < players; player++)
        {
            for (var coalition = 0; coalition < values.Length; coalition++)
            {
                if ((coalition >> player & 1) != 0)
                    continue;
                var weight = weights[BitOperations.PopCount((uint)coalition)];
                var (without, with) = (values[coalition], values[coalition | 1 << player]);
                for (var k = 0; k < observables; k++)
                    shares[player, k] += weight * (with[k] - without[k]);
            }
        }

        return new(values[0], values[^1], shares, new double[players, observables], 0);
    }

    /// <summary>Random orders in pairs, each with its reverse; the standard error is that of the mean over pairs.</summary>
    private static ShapleyShares Sampled(int players, CoalitionValue value, ulong seed)
    {
        var orders = new int[SampledPairs][];
        for (var pair = 0; pair < SampledPairs; pair++)
            orders[pair] = Order(players, ScrambledSobol.Mix(seed + (ulong)pair));
        var wanted = new HashSet<UInt128>();
        foreach (var order in orders)
        {
            wanted.UnionWith(Prefixes(order));
            wanted.UnionWith(Prefixes([.. order.Reverse()]));
        }

        UInt128[] coalitions = [.. wanted];
        var computed = new double[coalitions.Length][];
        Parallel.For(0, coalitions.Length, i => computed[i] = value(coalitions[i]));
        var values = coalitions.Zip(computed).ToDictionary(entry => entry.First, entry => entry.Second);
        var all = players == MostPlayers ? UInt128.MaxValue : (UInt128.One << players) - 1;
        var observables = values[0].Length;
        var (sum, squares) = (new double[players, observables], new double[players, observables]);
        foreach (var order in orders)
        {
            var pairMean = new double[players, observables];
            Add(order, values, pairMean);
            Add([.. order.Reverse()], values, pairMean);
            for (var player = 0; player < players; player++)
            {
                for (var k = 0; k < observables; k++)
                {
                    var mean = pairMean[player, k] / 2;
                    sum[player, k] += mean;
                    squares[player, k] += mean * mean;
                }
            }
        }

        for (var player = 0; player < players; player++)
        {
            for (var k = 0; k < observables; k++)
            {
                var mean = sum[player, k] / SampledPairs;
                var variance = Math.Max(0, squares[player, k] / SampledPairs - mean * mean) * SampledPairs / (SampledPairs - 1);
                sum[player, k] = mean;
                squares[player, k] = Math.Sqrt(variance / SampledPairs);
            }
        }

        return new(values[0], values[all], sum, squares, 2 * SampledPairs);
    }

    private static IEnumerable<UInt128> Prefixes(int[] order)
    {
        var coalition = UInt128.Zero;
        yield return coalition;
        foreach (var player in order)
            yield return coalition |= UInt128.One << player;
    }

    private static void Add(int[] order, Dictionary<UInt128, double[]> values, double[,] sum)
    {
        var coalition = UInt128.Zero;
        var before = values[coalition];
        foreach (var player in order)
        {
            var after = values[coalition |= UInt128.One << player];
            for (var k = 0; k < after.Length; k++)
                sum[player, k] += after[k] - before[k];
            before = after;
        }
    }

    /// <summary>A permutation by Fisher and Yates from a seed.</summary>
    private static int[] Order(int players, ulong seed)
    {
        var order = Enumerable.Range(0, players).ToArray();
        for (var i = players - 1; i > 0; i--)
        {
            seed = ScrambledSobol.Mix(seed);
            var j = (int)(seed % (ulong)(i + 1));
            (order[i], order[j]) = (order[j], order[i]);
        }

        return order;
    }
}

/// <summary>Shares of players (first index) in observables (second index).</summary>
/// <param name="Old">Value of each observable when no player has moved.</param>
/// <param name="New">When all have.</param>
/// <param name="Shares">In the observables' units.</param>
/// <param name="StandardErrors">0 when exact.</param>
/// <param name="Orders">Orders averaged; 0 when exact.</param>
internal sealed record ShapleyShares(double[] Old, double[] New, double[,] Shares, double[,] StandardErrors, int Orders);
