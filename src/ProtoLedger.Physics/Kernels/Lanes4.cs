using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace ProtoLedger.Physics.Kernels;

/// <summary>Four lanes in one vector of 256 bits.</summary>
internal readonly struct Lanes4(Vector256<double> value) : ILanes<Lanes4>
{
    private readonly Vector256<double> _value = value;

    public static int Width => 4;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 All(double value) => new(Vector256.Create(value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe Lanes4 Load(double* source) => new(Vector256.Load(source));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe void Store(Lanes4 value, double* destination) => value._value.Store(destination);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator +(Lanes4 left, Lanes4 right) => new(left._value + right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator -(Lanes4 left, Lanes4 right) => new(left._value - right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator *(Lanes4 left, Lanes4 right) => new(left._value * right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator /(Lanes4 left, Lanes4 right) => new(left._value / right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 operator -(Lanes4 value) => new(-value._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 MultiplyAdd(Lanes4 a, Lanes4 b, Lanes4 c) => new(Vector256.FusedMultiplyAdd(a._value, b._value, c._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 SelectLess(Lanes4 left, Lanes4 right, Lanes4 a, Lanes4 b) =>
        new(Vector256.ConditionalSelect(Vector256.LessThan(left._value, right._value), a._value, b._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static bool AnyLess(Lanes4 left, Lanes4 right) => Vector256.LessThanAny(left._value, right._value);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 Sqrt(Lanes4 value) => new(Vector256.Sqrt(value._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 AddToExponent(Lanes4 value, Lanes4 biased) =>
        new((value._value.AsInt64() + Vector256.ShiftLeft(biased._value.AsInt64(), 52)).AsDouble());

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 SelectOdd(Lanes4 biased, Lanes4 odd, Lanes4 even) =>
        new(Vector256.ConditionalSelect(
            Vector256.Equals(biased._value.AsInt64() & Vector256.Create(1L), Vector256.Create(1L)).AsDouble(), odd._value, even._value));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 FlipSignByBit1(Lanes4 biased, Lanes4 value) =>
        new((value._value.AsInt64() ^ Vector256.ShiftLeft(biased._value.AsInt64() & Vector256.Create(2L), 62)).AsDouble());

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lanes4 SplitExponent(Lanes4 value, out Lanes4 exponent)
    {
        var shifted = value._value.AsInt64() - Vector256.Create(Elementary.SqrtHalfBits);
        var biased = Vector256.ShiftRightArithmetic(shifted, 52) + Vector256.Create(Elementary.BiasBits);
        exponent = new(biased.AsDouble() - Vector256.Create(Elementary.Bias));
        return new(((shifted & Vector256.Create(0x000FFFFFFFFFFFFF)) + Vector256.Create(Elementary.SqrtHalfBits)).AsDouble());
    }
}
