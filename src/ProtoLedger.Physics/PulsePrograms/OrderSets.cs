namespace ProtoLedger.Physics.PulsePrograms;

/// <summary>For each order, whether its dephasing (P), rephasing (M) and stored (Z) state is meant.</summary>
internal sealed class OrderSets(int orders)
{
    public bool[] P { get; } = new bool[orders + 1];

    public bool[] M { get; } = new bool[orders + 1];

    public bool[] Z { get; } = new bool[orders + 1];

    internal static OrderSets UpTo(int orders, int highest)
    {
        var sets = new OrderSets(orders);
        for (var k = 0; k <= highest; k++)
            sets.Set(k);
        return sets;
    }

    internal bool Any(int order) => P[order] || M[order] || Z[order];

    internal void Set(int order) => P[order] = M[order] = Z[order] = true;

    internal void Keep(OrderSets other)
    {
        for (var k = 0; k < P.Length; k++)
        {
            P[k] &= other.P[k];
            M[k] &= other.M[k];
            Z[k] &= other.Z[k];
        }
    }

    internal OrderSets Copy()
    {
        var copy = new OrderSets(orders);
        P.CopyTo(copy.P, 0);
        M.CopyTo(copy.M, 0);
        Z.CopyTo(copy.Z, 0);
        return copy;
    }

    /// <summary>After one unit of dephasing: P moves up, M moves down, and what M brings to order 0 is P's order 0 too.</summary>
    internal OrderSets Dephased()
    {
        var after = new OrderSets(orders);
        Array.Copy(P, 0, after.P, 1, P.Length - 1);
        Array.Copy(M, 1, after.M, 0, M.Length - 1);
        Z.CopyTo(after.Z, 0);
        after.P[0] = after.M[0];
        return after;
    }

    /// <summary>The states before one unit of dephasing that lead to these.</summary>
    /// <param name="folds">Whether P's order 0 goes back to M's order 1.</param>
    internal OrderSets DephasedBackward(bool folds)
    {
        var before = new OrderSets(orders);
        Array.Copy(P, 1, before.P, 0, P.Length - 1);
        Array.Copy(M, 0, before.M, 1, M.Length - 1);
        Z.CopyTo(before.Z, 0);
        before.M[1] |= folds;
        before.M[0] = false;
        return before;
    }
}
