namespace ProtoLedger.Physics.Kernels;

/// <summary>A few lanes of doubles that are computed together. Kernels are written once over this interface; every width gives the same bits.</summary>
/// <remarks>
/// Only exactly rounded operations (+ − × ÷ and the written-out fused multiply-add) and integer operations on bits are here,
/// so equal bits follow from equal order of operations, whatever instructions the machine has.
/// </remarks>
internal interface ILanes<TSelf>
    where TSelf : unmanaged, ILanes<TSelf>
{
    /// <summary>Number of lanes.</summary>
    static abstract int Width { get; }

    /// <summary>The same value in each lane.</summary>
    static abstract TSelf All(double value);

    /// <summary>Reads <see cref="Width"/> values.</summary>
    static abstract unsafe TSelf Load(double* source);

    /// <summary>Writes <see cref="Width"/> values.</summary>
    static abstract unsafe void Store(TSelf value, double* destination);

    static abstract TSelf operator +(TSelf left, TSelf right);

    static abstract TSelf operator -(TSelf left, TSelf right);

    static abstract TSelf operator *(TSelf left, TSelf right);

    static abstract TSelf operator /(TSelf left, TSelf right);

    static abstract TSelf operator -(TSelf value);

    /// <summary>a · b + c, rounded once.</summary>
    static abstract TSelf MultiplyAdd(TSelf a, TSelf b, TSelf c);

    /// <summary>left &lt; right ? a : b. A lane with NaN takes b.</summary>
    static abstract TSelf SelectLess(TSelf left, TSelf right, TSelf a, TSelf b);

    /// <summary>Whether left &lt; right in any lane.</summary>
    static abstract bool AnyLess(TSelf left, TSelf right);

    /// <summary>√value, exactly rounded.</summary>
    static abstract TSelf Sqrt(TSelf value);

    /// <summary>Adds the integer in the low bits of <paramref name="biased"/> (see <see cref="Elementary"/>) to the exponent of <paramref name="value"/>.</summary>
    static abstract TSelf AddToExponent(TSelf value, TSelf biased);

    /// <summary>Chooses by the lowest bit of <paramref name="biased"/>.</summary>
    static abstract TSelf SelectOdd(TSelf biased, TSelf odd, TSelf even);

    /// <summary>Flips the sign where bit 1 of <paramref name="biased"/> is set.</summary>
    static abstract TSelf FlipSignByBit1(TSelf biased, TSelf value);

    /// <summary>Splits positive normal numbers: value = m · 2^e, m in [√½, √2).</summary>
    static abstract TSelf SplitExponent(TSelf value, out TSelf exponent);
}
