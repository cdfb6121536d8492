using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Prediction;

/// <summary>What is predicted for every series at the nominal point, whether an expectation speaks of it or not.</summary>
internal static class StandardObservables
{
    internal static IReadOnlyList<ObservableKey> Of(SeriesContext context, IEnumerable<string> furtherTissues)
    {
        var held = context.Catalogue.Tissues.Where(t => t.AgeGroup == context.AgeGroup).Select(t => t.Name).ToHashSet();
        var regional = TissueRoles.Of(context.BodyRegion).Where(held.Contains).ToArray();
        var tissues = regional.Concat(furtherTissues).Distinct().ToArray();
        var keys = new List<ObservableKey>();
        void Add(string name, string? tissue = null, string? reference = null) =>
            keys.Add(new(context.SeriesId, name, tissue, reference, ObservableKey.NominalCondition));

        foreach (var tissue in tissues)
        {
            Add("signal", tissue);
            Add("signedSignal", tissue);
        }

        if (tissues.Length > 0)
            AddAgainst(context, tissues[0], tissues, Add);
        AddPairs(regional, Add);
        var series = context.Acquisition;
        foreach (var name in (string[])["fatWaterShift", "relativeNoise", "relativeRfPower", "scanTime"])
            Add(name);
        if (series.Geometry.Dimensions == 2)
            Add("slicesFit");
        if (series.Readout is SpoiledGradientEcho or BalancedGradientEcho)
            Add("fatWaterPhase");
        return keys;
    }

    private static void AddAgainst(SeriesContext context, string reference, string[] tissues, Action<string, string?, string?> add)
    {
        var series = context.Acquisition;
        foreach (var tissue in tissues.Where(t => t != reference))
        {
            add("contrastRatio", tissue, reference);
            add("contrastDifference", tissue, reference);
        }

        foreach (var name in (string[])["weightingT1", "weightingT2", "weightingProtonDensity"])
            add(name, reference, null);
        if (context.NeedsDiffusion)
            add("weightingDiffusion", reference, null);
        if (series.Readout is EchoTrain)
            add("contrastEquivalentEchoTime", reference, null);
        if (series.Readout is EchoTrain or SpoiledGradientEchoTrain)
            add("blurWidth", reference, null);
        if (Nulled(context, tissues) is not { } nulled)
            return;
        add("nullTime", nulled, null);
        add("nullDistance", nulled, null);
        if (nulled != reference)
            add("residualRatio", nulled, reference);
    }

    private static void AddPairs(string[] tissues, Action<string, string?, string?> add)
    {
        for (var i = 1; i < tissues.Length; i++)
        {
            for (var j = 1; j < i; j++)
                add("contrastRatio", tissues[i], tissues[j]);
            add("contrastToNoise", tissues[i], tissues[0]);
        }
    }

    /// <summary>The tissue that an inversion is meant to null: fluid for a long inversion time, fat for a short one.</summary>
    internal static string? Nulled(SeriesContext context, IEnumerable<string> tissues)
    {
        var index = NullObservables.LastInversion(context.Acquisition);
        if (index < 0)
            return null;
        var fat = context.Catalogue.Tissues.Where(t => t.IsFat).Select(t => t.Name).ToHashSet();
        var single = context.Acquisition.Preparations.Count(p => p is Inversion) < 2;
        // Fluid null times lie above 1.2 s at every field, fat null times below 0.4 s (common practice, no source).
        return context.Acquisition.Preparations[index] is SpectralInversion || (single && NullObservables.InversionTime(context.Acquisition, index) < 500)
            ? tissues.FirstOrDefault(fat.Contains)
            : single && NullObservables.InversionTime(context.Acquisition, index) > 1200 ? tissues.FirstOrDefault(TissueRoles.IsFluid) : null;
    }
}
