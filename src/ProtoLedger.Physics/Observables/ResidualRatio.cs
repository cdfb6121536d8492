namespace ProtoLedger.Physics.Observables;

/// <summary>What a suppression leaves of fluid or fat, relative to a reference tissue, before and after an edit.</summary>
/// <param name="Before">|residual| / |reference| before.</param>
/// <param name="After">|residual| / |reference| after.</param>
/// <param name="ReferenceChange">|reference| after over before, minus 1.</param>
/// <param name="ReferenceMoved">True where the reference itself moved by more than <see cref="Threshold"/>: the ratio then tells of both tissues.</param>
public readonly record struct ResidualRatio(double Before, double After, double ReferenceChange, bool ReferenceMoved)
{
    /// <summary>Relative change of the reference that counts as moved.</summary>
    public const double Threshold = 0.05;

    /// <summary>Compares two states.</summary>
    /// <param name="residualBefore">Signal of what is suppressed, before.</param>
    /// <param name="referenceBefore">Signal of the reference tissue, before; not 0.</param>
    /// <param name="residualAfter">After.</param>
    /// <param name="referenceAfter">After; not 0.</param>
    public static ResidualRatio Between(double residualBefore, double referenceBefore, double residualAfter, double referenceAfter)
    {
        var change = Math.Abs(referenceAfter) / Math.Abs(referenceBefore) - 1;
        return new ResidualRatio(
            Contrast.Ratio(residualBefore, referenceBefore), Contrast.Ratio(residualAfter, referenceAfter), change, Math.Abs(change) > Threshold);
    }
}
