namespace ProtoLedger.Regression.Evaluation;

/// <summary>The prediction of one protocol version on one scanner.</summary>
/// <param name="ModelId">Model that computed it.</param>
/// <param name="InputHash">What it was computed from: <see cref="EvaluationInput.Hash"/>.</param>
/// <param name="Observables">n keys in ordinal order of their text form; the values below stand against them.</param>
/// <param name="Nominal">n values at the catalogue's means; NaN where not predictable.</param>
/// <param name="Low">n 5 % quantiles over the tissue draws; equal to the nominal value where no tissue enters.</param>
/// <param name="High">n 95 % quantiles.</param>
/// <param name="Expectations">In the order of the expectations document.</param>
/// <param name="NotPredictable">What cannot be predicted, and why.</param>
/// <param name="Assumptions">Every default that the documents leave open, in words.</param>
/// <param name="WeakSources">Catalogue values that entered on recalled or estimated evidence.</param>
public sealed record EvaluationResult(
    string ModelId,
    string InputHash,
    IReadOnlyList<ObservableKey> Observables,
    double[] Nominal,
    double[] Low,
    double[] High,
    IReadOnlyList<ExpectationOutcome> Expectations,
    IReadOnlyList<MissingPrediction> NotPredictable,
    IReadOnlyList<string> Assumptions,
    IReadOnlyList<WeakSource> WeakSources)
{
    /// <summary>Position of a key in <see cref="Observables"/>, or −1.</summary>
    public int IndexOf(ObservableKey key)
    {
        var (low, high) = (0, Observables.Count - 1);
        while (low <= high)
        {
            var middle = (low + high) / 2;
            var order = Observables[middle].CompareTo(key);
            if (order == 0)
                return middle;
            if (order < 0)
                low = middle + 1;
            else
                high = middle - 1;
        }

        return -1;
    }
}

/// <summary>A number that cannot be predicted.</summary>
/// <param name="Observable">Which.</param>
/// <param name="Because">In words, such as "the catalogue holds no T2* of disc annulus at 0.55 T".</param>
public sealed record MissingPrediction(ObservableKey Observable, string Because);

/// <summary>A catalogue value of weak evidence that entered a prediction.</summary>
/// <param name="Tissue">Catalogue name.</param>
/// <param name="Parameter">T1, T2, T2star, protonDensity or apparentDiffusionCoefficient.</param>
/// <param name="Evidence">recalled or estimated.</param>
/// <param name="Source">What the catalogue says.</param>
public sealed record WeakSource(string Tissue, string Parameter, string Evidence, string Source);
