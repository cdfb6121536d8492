using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace ProtoLedger.Physics.Kernels;

/// <summary>Two lanes in one vector of 128 bits.</summary>
internal readonly struct Lanes2(Vector128<double> value) : ILanes<Lanes2>
{
    private readonly Vector128<double> _value = value;

    public static int Width => 2;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 All(double value) => new(Vector128.Create(value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe Lanes2 Load(double* source) => new(Vector128.Load(source));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe void Store(Lanes2 value, double* destination) => value._value.Store(destination);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 operator +(Lanes2 left, Lanes2 right) => new(left._value + right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 operator -(Lanes2 left, Lanes2 right) => new(left._value - right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 operator *(Lanes2 left, Lanes2 right) => new(left._value * right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 operator /(Lanes2 left, Lanes2 right) => new(left._value / right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 operator -(Lanes2 value) => new(-value._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 MultiplyAdd(Lanes2 a, Lanes2 b, Lanes2 c) => new(Vector128.FusedMultiplyAdd(a._value, b._value, c._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 SelectLess(Lanes2 left, Lanes2 right, Lanes2 a, Lanes2 b) =>
        new(Vector128.ConditionalSelect(Vector128.LessThan(left._value, right._value), a._value, b._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool AnyLess(Lanes2 left, Lanes2 right) => Vector128.LessThanAny(left._value, right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 Sqrt(Lanes2 value) => new(Vector128.Sqrt(value._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 AddToExponent(Lanes2 value, Lanes2 biased) =>
        new((value._value.AsInt64() + Vector128.ShiftLeft(biased._value.AsInt64(), 52)).AsDouble());

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 SelectOdd(Lanes2 biased, Lanes2 odd, Lanes2 even) =>
        new(Vector128.ConditionalSelect(
            Vector128.Equals(biased._value.AsInt64() & Vector128.Create(1L), Vector128.Create(1L)).AsDouble(), odd._value, even._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 FlipSignByBit1(Lanes2 biased, Lanes2 value) =>
        new((value._value.AsInt64() ^ Vector128.ShiftLeft(biased._value.AsInt64() & Vector128.Create(2L), 62)).AsDouble());

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes2 SplitExponent(Lanes2 value, out Lanes2 exponent)
    {
        var shifted = value._value.AsInt64() - Vector128.Create(Elementary.SqrtHalfBits);
        var biased = Vector128.ShiftRightArithmetic(shifted, 52) + Vector128.Create(Elementary.BiasBits);
        exponent = new(biased.AsDouble() - Vector128.Create(Elementary.Bias));
        return new(((shifted & Vector128.Create(0x000FFFFFFFFFFFFF)) + Vector128.Create(Elementary.SqrtHalfBits)).AsDouble());
    }
}
