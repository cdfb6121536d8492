namespace ProtoLedger.Regression.Sampling;

/// <summary>A tissue parameter that is drawn; its number is its dimension of the sequence.</summary>
internal enum DrawnParameter
{
    T1 = 0,
    T2 = 1,
    ProtonDensity = 2,
    T2Star = 3,
    ApparentDiffusionCoefficient = 4,
}
