using System.Runtime.CompilerServices;

namespace ProtoLedger.Physics.Kernels;

/// <summary>One lane: the scalar twin of the vector forms.</summary>
internal readonly struct Lanes1(double value) : ILanes<Lanes1>
{
    private readonly double _value = value;

    public static int Width => 1;

    public static Lanes1 All(double value) => new(value);

    public static unsafe Lanes1 Load(double* source) => new(*source);

    public static unsafe void Store(Lanes1 value, double* destination) => *destination = value._value;

    public static Lanes1 operator +(Lanes1 left, Lanes1 right) => new(left._value + right._value);

    public static Lanes1 operator -(Lanes1 left, Lanes1 right) => new(left._value - right._value);

    public static Lanes1 operator *(Lanes1 left, Lanes1 right) => new(left._value * right._value);

    public static Lanes1 operator /(Lanes1 left, Lanes1 right) => new(left._value / right._value);

    public static Lanes1 operator -(Lanes1 value) => new(-value._value);

    public static Lanes1 MultiplyAdd(Lanes1 a, Lanes1 b, Lanes1 c) => new(Math.FusedMultiplyAdd(a._value, b._value, c._value));

    public static Lanes1 SelectLess(Lanes1 left, Lanes1 right, Lanes1 a, Lanes1 b) => left._value < right._value ? a : b;

    public static bool AnyLess(Lanes1 left, Lanes1 right) => left._value < right._value;

    public static Lanes1 Sqrt(Lanes1 value) => new(Math.Sqrt(value._value));

    public static Lanes1 AddToExponent(Lanes1 value, Lanes1 biased) =>
        new(BitConverter.Int64BitsToDouble(Bits(value) + (Bits(biased) << 52)));

    public static Lanes1 SelectOdd(Lanes1 biased, Lanes1 odd, Lanes1 even) => (Bits(biased) & 1) != 0 ? odd : even;

    public static Lanes1 FlipSignByBit1(Lanes1 biased, Lanes1 value) =>
        new(BitConverter.Int64BitsToDouble(Bits(value) ^ ((Bits(biased) & 2) << 62)));

    public static Lanes1 SplitExponent(Lanes1 value, out Lanes1 exponent)
    {
        var shifted = Bits(value) - Elementary.SqrtHalfBits;
        exponent = new(BitConverter.Int64BitsToDouble((shifted >> 52) + Elementary.BiasBits) - Elementary.Bias);
        return new(BitConverter.Int64BitsToDouble((shifted & 0x000FFFFFFFFFFFFF) + Elementary.SqrtHalfBits));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static long Bits(Lanes1 value) => BitConverter.DoubleToInt64Bits(value._value);
}
