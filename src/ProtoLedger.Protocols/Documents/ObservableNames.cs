namespace ProtoLedger.Protocols.Documents;

/// <summary>Names of the observables that an expectation may limit, and which tissues each one needs.</summary>
public static class ObservableNames
{
    /// <summary>All names, in the order in which pages list them.</summary>
    public static IReadOnlyList<string> All { get; } =
    [
        "signedSignal", "signal", "contrastDifference", "contrastRatio", "residualRatio", "contrastToNoise",
        "nullTime", "nullDistance", "nullWindow", "weightingT1", "weightingT2", "weightingProtonDensity",
        "weightingDiffusion", "contrastEquivalentEchoTime", "blurWidth", "fatWaterShift", "fatWaterPhase",
        "relativeNoise", "relativeRfPower", "scanTime", "slicesFit",
    ];

    private static readonly HashSet<string> Pairs = ["contrastDifference", "contrastRatio", "residualRatio", "contrastToNoise", "nullWindow"];

    private static readonly HashSet<string> Tissueless =
        ["fatWaterShift", "fatWaterPhase", "relativeNoise", "relativeRfPower", "scanTime", "slicesFit"];

    /// <summary>True when the observable speaks of a tissue.</summary>
    /// <param name="name">One of <see cref="All"/>.</param>
    public static bool NeedsTissue(string name) => !Tissueless.Contains(name);

    /// <summary>True when the observable compares a tissue with a reference tissue.</summary>
    /// <param name="name">One of <see cref="All"/>.</param>
    public static bool NeedsReference(string name) => Pairs.Contains(name);
}
