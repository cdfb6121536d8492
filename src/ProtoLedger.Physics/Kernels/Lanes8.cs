using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace ProtoLedger.Physics.Kernels;

/// <summary>Eight lanes in one vector of 512 bits.</summary>
internal readonly struct Lanes8(Vector512<double> value) : ILanes<Lanes8>
{
    private readonly Vector512<double> _value = value;

    public static int Width => 8;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 All(double value) => new(Vector512.Create(value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe Lanes8 Load(double* source) => new(Vector512.Load(source));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe void Store(Lanes8 value, double* destination) => value._value.Store(destination);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator +(Lanes8 left, Lanes8 right) => new(left._value + right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator -(Lanes8 left, Lanes8 right) => new(left._value - right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator *(Lanes8 left, Lanes8 right) => new(left._value * right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator /(Lanes8 left, Lanes8 right) => new(left._value / right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 operator -(Lanes8 value) => new(-value._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 MultiplyAdd(Lanes8 a, Lanes8 b, Lanes8 c) => new(Vector512.FusedMultiplyAdd(a._value, b._value, c._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 SelectLess(Lanes8 left, Lanes8 right, Lanes8 a, Lanes8 b) =>
        new(Vector512.ConditionalSelect(Vector512.LessThan(left._value, right._value), a._value, b._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool AnyLess(Lanes8 left, Lanes8 right) => Vector512.LessThanAny(left._value, right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 Sqrt(Lanes8 value) => new(Vector512.Sqrt(value._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 AddToExponent(Lanes8 value, Lanes8 biased) =>
        new((value._value.AsInt64() + Vector512.ShiftLeft(biased._value.AsInt64(), 52)).AsDouble());

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 SelectOdd(Lanes8 biased, Lanes8 odd, Lanes8 even) =>
        new(Vector512.ConditionalSelect(
            Vector512.Equals(biased._value.AsInt64() & Vector512.Create(1L), Vector512.Create(1L)).AsDouble(), odd._value, even._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 FlipSignByBit1(Lanes8 biased, Lanes8 value) =>
        new((value._value.AsInt64() ^ Vector512.ShiftLeft(biased._value.AsInt64() & Vector512.Create(2L), 62)).AsDouble());

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes8 SplitExponent(Lanes8 value, out Lanes8 exponent)
    {
        var shifted = value._value.AsInt64() - Vector512.Create(Elementary.SqrtHalfBits);
        var biased = Vector512.ShiftRightArithmetic(shifted, 52) + Vector512.Create(Elementary.BiasBits);
        exponent = new(biased.AsDouble() - Vector512.Create(Elementary.Bias));
        return new(((shifted & Vector512.Create(0x000FFFFFFFFFFFFF)) + Vector512.Create(Elementary.SqrtHalfBits)).AsDouble());
    }
}
