using System.Collections.Concurrent;
using System.Numerics;

namespace ProtoLedger.Regression.Attribution;

/// <summary>Joins changes that are not valid apart into one player, and gives the values of every coalition of players.</summary>
internal sealed class Coupling
{
    private readonly Func<IReadOnlyList<int>, double[]?> evaluate;
    private readonly ConcurrentDictionary<UInt128, double[]?> known = new();
    private List<UInt128> players;

    /// <param name="changes">Number of changes, 1 … 128.</param>
    /// <param name="evaluate">Values when these changes are made; null where they are not valid apart from the others.</param>
    private Coupling(int changes, Func<IReadOnlyList<int>, double[]?> evaluate)
    {
        this.evaluate = evaluate;
        players = [.. Enumerable.Range(0, changes).Select(i => UInt128.One << i)];
    }

    /// <summary>Changes of each player.</summary>
    internal IReadOnlyList<IReadOnlyList<int>> Players => [.. players.Select(Members)];

    /// <summary>Finds the players: joins changes until every coalition that attribution asks for is valid.</summary>
    internal static (Coupling Coupling, ShapleyShares Shares) Attribute(int changes, Func<IReadOnlyList<int>, double[]?> evaluate, ulong seed)
    {
        var coupling = new Coupling(changes, evaluate);
        while (true)
        {
            var invalid = new ConcurrentBag<UInt128>();
            double[] Value(UInt128 coalition)
            {
                var mask = coupling.Union(coalition);
                if (coupling.Value(mask) is { } values)
                    return values;
                invalid.Add(mask);
                return coupling.Value(UInt128.Zero) ?? [];
            }

            var shares = Shapley.Compute(coupling.players.Count, Value, seed);
            if (invalid.IsEmpty || coupling.players.Count == 1)
                return (coupling, shares);
            coupling.Join(invalid.MinBy(mask => (Count(mask), mask)));
        }
    }

    private double[]? Value(UInt128 mask) => known.GetOrAdd(mask, m => evaluate(Members(m)));

    /// <summary>An invalid coalition becomes one player together with the fewest others that make it valid.</summary>
    private void Join(UInt128 invalid)
    {
        var outside = players.Where(p => (p & invalid) == 0).ToArray();
        var supplement = Supplements(outside).First(s => (invalid | s) == All() || Value(invalid | s) is not null);
        var joined = invalid | supplement;
        players = [.. players.Where(p => (p & joined) == 0), joined];
    }

    /// <summary>Unions of one, two or three of the players, then all of them.</summary>
    private static IEnumerable<UInt128> Supplements(UInt128[] outside)
    {
        foreach (var a in outside)
            yield return a;
        for (var i = 0; i < outside.Length; i++)
        {
            for (var j = 0; j < i; j++)
                yield return outside[i] | outside[j];
        }

        for (var i = 0; i < outside.Length; i++)
        {
            for (var j = 0; j < i; j++)
            {
                for (var k = 0; k < j; k++)
                    yield return outside[i] | outside[j] | outside[k];
            }
        }

        yield return outside.Aggregate(UInt128.Zero, (all, one) => all | one);
    }

    private UInt128 All() => players.Aggregate(UInt128.Zero, (all, one) => all | one);

    private UInt128 Union(UInt128 coalition)
    {
        var mask = UInt128.Zero;
        for (var i = 0; i < players.Count; i++)
        {
            if ((coalition >> i & 1) != 0)
                mask |= players[i];
        }

        return mask;
    }

    private static IReadOnlyList<int> Members(UInt128 mask) => [.. Enumerable.Range(0, 128).Where(i => (mask >> i & 1) != 0)];

    private static int Count(UInt128 mask) => BitOperations.PopCount((ulong)mask) + BitOperations.PopCount((ulong)(mask >> 64));
}
