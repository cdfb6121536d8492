using ProtoLedger.Regression.Attribution;

namespace ProtoLedger.Regression.Tests.Attribution;

public sealed class ShapleyTests
{
    // Three observables of five players with interactions of all orders; nothing of the product enters.
    private static double[] Game(UInt128 coalition)
    {
        var x = Enumerable.Range(0, 5).Select(i => (double)(uint)(coalition >> i & 1)).ToArray();
        return [
            Math.Exp(-(1 + x[0]) * (1 + 0.5 * x[1])) * (1 - 2 * x[2]) + x[3] * x[4],
            Math.Sin(x[0] + 2 * x[1] + 3 * x[2] + 4 * x[3] + 5 * x[4]),
            x[0] * x[1] * x[2] * x[3] * x[4] - x[2],
        ];
    }

    [Fact]
    public void Compute_FivePlayers_EqualsTheAverageOverAllOrders()
    {
        var shares = Shapley.Compute(5, Game, 1);
        var oracle = new double[5, 3];
        var orders = Permutations([0, 1, 2, 3, 4]).ToList();
        foreach (var order in orders)
        {
            var coalition = UInt128.Zero;
            foreach (var player in order)
            {
                var (before, after) = (Game(coalition), Game(coalition | UInt128.One << player));
                coalition |= UInt128.One << player;
                for (var k = 0; k < 3; k++)
                    oracle[player, k] += (after[k] - before[k]) / orders.Count;
            }
        }

        Assert.Equal(120, orders.Count);
        for (var player = 0; player < 5; player++)
        {
            for (var k = 0; k < 3; k++)
                Assert.Equal(oracle[player, k], shares.Shares[player, k], 1e-13);
        }
    }

    [Fact]
    public void Compute_PlayerThatNeverAdds_GetsNothing()
    {
        var shares = Shapley.Compute(3, c => [(double)(uint)(c & 1) * (1 + (double)(uint)(c >> 1 & 1))], 1);
        Assert.Equal(0, shares.Shares[2, 0]);
        Assert.Equal(2, shares.Shares[0, 0] + shares.Shares[1, 0], 1e-15);
    }

    [Fact]
    public void Compute_PureInteraction_IsSplitEqually()
    {
        var shares = Shapley.Compute(2, c => [c == 3 ? 10 : 0], 1);
        Assert.Equal(5, shares.Shares[0, 0]);
        Assert.Equal(5, shares.Shares[1, 0]);
    }

    [Fact]
    public void Compute_ManyPlayers_SampledSharesAddUpAndStandWithinTheirErrors()
    {
        // Quadratic game: exact shares are a_i + Σ_j b_ij / 2, from the definition.
        const int n = 20;
        var a = Enumerable.Range(0, n).Select(i => Math.Sin(i + 1)).ToArray();
        static double B(int i, int j) => Math.Cos(i * j + 1);
        double[] Value(UInt128 c)
        {
            var sum = 0.0;
            for (var i = 0; i < n; i++)
            {
                if ((c >> i & 1) == 0)
                    continue;
                sum += a[i];
                for (var j = 0; j < i; j++)
                    sum += (c >> j & 1) != 0 ? B(i, j) : 0;
            }

            return [sum];
        }

        var shares = Shapley.Compute(n, Value, 3);
        var total = 0.0;
        for (var i = 0; i < n; i++)
        {
            var exact = a[i] + Enumerable.Range(0, n).Where(j => j != i).Sum(j => B(Math.Max(i, j), Math.Min(i, j))) / 2;
            total += shares.Shares[i, 0];
            Assert.InRange(shares.Shares[i, 0] - exact, -4 * shares.StandardErrors[i, 0] - 1e-12, 4 * shares.StandardErrors[i, 0] + 1e-12);
        }

        Assert.Equal(shares.New[0] - shares.Old[0], total, 1e-10);
        Assert.Equal(128, shares.Orders);
    }

    private static IEnumerable<int[]> Permutations(int[] items) => items.Length <= 1
        ? [items]
        : items.SelectMany(first => Permutations([.. items.Where(i => i != first)]).Select(rest => (int[])[first, .. rest]));
}
