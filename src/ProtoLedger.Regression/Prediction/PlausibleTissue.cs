using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Sampling;

namespace ProtoLedger.Regression.Prediction;

/// <summary>A tissue at one field with its draws, or the reason why the catalogue cannot say.</summary>
internal sealed class PlausibleTissue
{
    private readonly SeriesContext context;
    private readonly TissueDistribution values;
    private readonly Relaxivity? enhancement;

    private PlausibleTissue(SeriesContext context, TissueDistribution values)
    {
        this.context = context;
        this.values = values;
        enhancement = context.ContrastConcentration is > 0 && TissueRoles.Enhances(values.Mean.Name) ? Relaxivity.Generic(context.FieldStrength) : null;
    }

    internal string Name => values.Mean.Name;

    internal string Title => values.Title;

    /// <summary>The tissue, or why it cannot be predicted.</summary>
    internal static (PlausibleTissue? Tissue, string? Because) Find(SeriesContext context, string name)
    {
        switch (CatalogueMapping.Map(context.Catalogue, name, context.AgeGroup, context.FieldStrength, context.NeedsT2Star))
        {
            case MappingResult<TissueDistribution>.Refused(var errors):
                return (null, errors[0].Detail);
            case MappingResult<TissueDistribution>.Mapped(var found) when context.NeedsDiffusion && found.Mean.ApparentDiffusionCoefficient is null:
                return (null, $"The diffusion coefficient of \"{name}\" is unknown in catalogue {context.Catalogue.Id}; a diffusion-weighted series needs it.");
            case MappingResult<TissueDistribution>.Mapped(var found):
                return (new PlausibleTissue(context, found), null);
            case var other:
                throw new InvalidOperationException(other.GetType().Name);
        }
    }

    /// <summary>Writes one lane for each draw; −1 is the mean.</summary>
    internal void Fill(LaneTable lanes, int start, ReadOnlySpan<int> draws, FieldPoint point)
    {
        var mean = values.Mean;
        Fill(lanes.T1, start, draws, DrawnParameter.T1, mean.T1, values.T1Sd);
        Fill(lanes.T2, start, draws, DrawnParameter.T2, mean.T2, values.T2Sd);
        Fill(lanes.ProtonDensity, start, draws, DrawnParameter.ProtonDensity, mean.ProtonDensity, values.ProtonDensitySd);
        if (mean.T2Star is { } t2Star)
            Fill(lanes.T2Star, start, draws, DrawnParameter.T2Star, t2Star, values.T2StarSd);
        if (mean.ApparentDiffusionCoefficient is { } adc)
            Fill(lanes.ApparentDiffusionCoefficient, start, draws, DrawnParameter.ApparentDiffusionCoefficient, adc, values.ApparentDiffusionCoefficientSd);
        lanes.IsFat.AsSpan(start, draws.Length).Fill(mean.IsFat);
        lanes.B1Scale.AsSpan(start, draws.Length).Fill(point.B1Scale);
        lanes.OffResonanceHz.AsSpan(start, draws.Length).Fill(point.OffResonanceHz);
        lanes.UnpreparedInflow.AsSpan(start, draws.Length).Fill(point.UnpreparedInflow);
        if (enhancement is { } agent)
            Enhance(agent, context.ContrastConcentration!.Value, lanes, start, draws.Length);
    }

    /// <summary>Values of recalled or estimated evidence that this series uses.</summary>
    internal IEnumerable<WeakSource> WeakSources()
    {
        var row = context.Catalogue.Tissues.First(t => t.Name == Name && t.AgeGroup == context.AgeGroup);
        var field = row.Fields.First(f => Math.Abs(f.FieldStrength - context.FieldStrength) <= CatalogueMapping.FieldTolerance);
        (string, MeasuredValue?)[] used =
        [
            ("T1", field.T1),
            ("T2", context.NeedsT2Star ? null : field.T2),
            ("T2star", context.NeedsT2Star ? field.T2Star : null),
            ("protonDensity", row.ProtonDensity),
            ("apparentDiffusionCoefficient", context.NeedsDiffusion ? row.ApparentDiffusionCoefficient : null),
        ];
        foreach (var (parameter, value) in used)
        {
            if (value is { Evidence: Evidence.Recalled or Evidence.Estimated })
                yield return new WeakSource(Name, parameter, value.Evidence == Evidence.Recalled ? "recalled" : "estimated", value.Source);
        }
    }

    private static void Enhance(Relaxivity agent, double concentration, LaneTable lanes, int start, int count)
    {
        for (var lane = start; lane < start + count; lane++)
        {
            lanes.T1[lane] = agent.T1(lanes.T1[lane], concentration);
            lanes.T2[lane] = agent.T2(lanes.T2[lane], concentration);
            lanes.T2Star[lane] = agent.T2(lanes.T2Star[lane], concentration);
        }
    }

    private void Fill(double[] column, int start, ReadOnlySpan<int> draws, DrawnParameter parameter, double mean, double? sd)
    {
        var drawn = sd > 0 ? context.Draws.LogNormal(Name, parameter, mean, sd.Value) : null;
        for (var i = 0; i < draws.Length; i++)
            column[start + i] = draws[i] < 0 || drawn is null ? mean : drawn[draws[i]];
    }
}
