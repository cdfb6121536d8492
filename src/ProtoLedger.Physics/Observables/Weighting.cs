namespace ProtoLedger.Physics.Observables;

/// <summary>Weighting of a series: derivative of the signal by the logarithm of a tissue value, over a reference signal.</summary>
public static class Weighting
{
    /// <summary>(∂S/∂ln p) / |S_ref|, no unit: relative change of brightness for a relative change of p (T1, T2, proton density or diffusion coefficient).</summary>
    /// <param name="derivative">∂S/∂ln p of the signed signal, as <see cref="Prediction.SignalDerivatives"/> gives it.</param>
    /// <param name="signed">The signed signal itself: where it is negative a magnitude image answers with the other sign.</param>
    /// <param name="reference">Signal of the reference tissue, not 0.</param>
    /// <remarks>Definition of this product (logarithmic derivative, error propagation); proton density gives |S| / |S_ref|.</remarks>
    public static double Of(double derivative, double signed, double reference) => (signed < 0 ? -derivative : derivative) / Math.Abs(reference);
}
