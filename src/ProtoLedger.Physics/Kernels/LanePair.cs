using System.Runtime.CompilerServices;

namespace ProtoLedger.Physics.Kernels;

/// <summary>Two groups of lanes side by side: hides the latency of one behind the work on the other.</summary>
internal readonly struct LanePair<TLanes>(TLanes low, TLanes high) : ILanes<LanePair<TLanes>>
    where TLanes : unmanaged, ILanes<TLanes>
{
    private readonly TLanes _low = low;
    private readonly TLanes _high = high;

    public static int Width => 2 * TLanes.Width;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> All(double value) => new(TLanes.All(value), TLanes.All(value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe LanePair<TLanes> Load(double* source) => new(TLanes.Load(source), TLanes.Load(source + TLanes.Width));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe void Store(LanePair<TLanes> value, double* destination)
    {
        TLanes.Store(value._low, destination);
        TLanes.Store(value._high, destination + TLanes.Width);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> operator +(LanePair<TLanes> left, LanePair<TLanes> right) => new(left._low + right._low, left._high + right._high);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> operator -(LanePair<TLanes> left, LanePair<TLanes> right) => new(left._low - right._low, left._high - right._high);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> operator *(LanePair<TLanes> left, LanePair<TLanes> right) => new(left._low * right._low, left._high * right._high);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> operator /(LanePair<TLanes> left, LanePair<TLanes> right) => new(left._low / right._low, left._high / right._high);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> operator -(LanePair<TLanes> value) => new(-value._low, -value._high);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> MultiplyAdd(LanePair<TLanes> a, LanePair<TLanes> b, LanePair<TLanes> c) =>
        new(TLanes.MultiplyAdd(a._low, b._low, c._low), TLanes.MultiplyAdd(a._high, b._high, c._high));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> SelectLess(LanePair<TLanes> left, LanePair<TLanes> right, LanePair<TLanes> a, LanePair<TLanes> b) =>
        new(TLanes.SelectLess(left._low, right._low, a._low, b._low), TLanes.SelectLess(left._high, right._high, a._high, b._high));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool AnyLess(LanePair<TLanes> left, LanePair<TLanes> right) => TLanes.AnyLess(left._low, right._low) || TLanes.AnyLess(left._high, right._high);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> Sqrt(LanePair<TLanes> value) => new(TLanes.Sqrt(value._low), TLanes.Sqrt(value._high));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> AddToExponent(LanePair<TLanes> value, LanePair<TLanes> biased) =>
        new(TLanes.AddToExponent(value._low, biased._low), TLanes.AddToExponent(value._high, biased._high));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> SelectOdd(LanePair<TLanes> biased, LanePair<TLanes> odd, LanePair<TLanes> even) =>
        new(TLanes.SelectOdd(biased._low, odd._low, even._low), TLanes.SelectOdd(biased._high, odd._high, even._high));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> FlipSignByBit1(LanePair<TLanes> biased, LanePair<TLanes> value) =>
        new(TLanes.FlipSignByBit1(biased._low, value._low), TLanes.FlipSignByBit1(biased._high, value._high));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static LanePair<TLanes> SplitExponent(LanePair<TLanes> value, out LanePair<TLanes> exponent)
    {
        var low = TLanes.SplitExponent(value._low, out var lowExponent);
        var high = TLanes.SplitExponent(value._high, out var highExponent);
        exponent = new(lowExponent, highExponent);
        return new(low, high);
    }
}
