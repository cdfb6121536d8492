namespace ProtoLedger.Physics.Pulses;

/// <summary>
/// Cayley-Klein parameters of one rotation per lane: U = [[a, −b*], [b, a*]] with |a|² + |b|² = 1.
/// For a right-handed rotation by φ about the unit vector n: a = cos(φ/2) − i n_z sin(φ/2), b = −i (n_x + i n_y) sin(φ/2).
/// </summary>
/// <remarks>
/// With M+ = Mx + i My the rotation is M+ → (a*)² M+ − b² (M+)* + 2 a* b Mz, Mz → (|a|² − |b|²) Mz − 2 Re(a b (M+)*),
/// as in Pauly, Le Roux, Nishimura, Macovski, IEEE Trans Med Imaging 1991;10:53 (from memory; the tests hold it against rotation matrices).
/// The four spans have one length and do not overlap.
/// </remarks>
public readonly ref struct CayleyKleinLanes
{
    /// <summary>Groups four spans of equal length.</summary>
    /// <exception cref="ArgumentException">Lengths differ.</exception>
    public CayleyKleinLanes(Span<double> aReal, Span<double> aImaginary, Span<double> bReal, Span<double> bImaginary)
    {
        if (aImaginary.Length != aReal.Length || bReal.Length != aReal.Length || bImaginary.Length != aReal.Length)
            throw new ArgumentException($"The four parts have {aReal.Length}, {aImaginary.Length}, {bReal.Length} and {bImaginary.Length} values; they must have the same number.");
        AReal = aReal;
        AImaginary = aImaginary;
        BReal = bReal;
        BImaginary = bImaginary;
    }

    /// <summary>Real part of a.</summary>
    public Span<double> AReal { get; }

    /// <summary>Imaginary part of a.</summary>
    public Span<double> AImaginary { get; }

    /// <summary>Real part of b.</summary>
    public Span<double> BReal { get; }

    /// <summary>Imaginary part of b.</summary>
    public Span<double> BImaginary { get; }

    /// <summary>Number of lanes.</summary>
    public int Length => AReal.Length;
}
