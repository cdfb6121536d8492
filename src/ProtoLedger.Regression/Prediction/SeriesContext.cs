using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Sampling;

namespace ProtoLedger.Regression.Prediction;

/// <summary>One series on one scanner with all that its numbers depend on.</summary>
/// <param name="SeriesId">Identifier in the protocol.</param>
/// <param name="Acquisition">Pulses resolved.</param>
/// <param name="FieldStrength">B0, T.</param>
/// <param name="Catalogue">Tissue values.</param>
/// <param name="AgeGroup">Whose values.</param>
/// <param name="BodyRegion">Region of the protocol.</param>
/// <param name="ContrastConcentration">mmol/l in enhancing tissue, or null.</param>
/// <param name="Conditions">B0/B1 conditions.</param>
/// <param name="AllowedRanges">What the console may change, and the repetition times to which a trigger leads.</param>
/// <param name="Draws">Tissue draws.</param>
internal sealed record SeriesContext(
    string SeriesId,
    Series Acquisition,
    double FieldStrength,
    CatalogueDocument Catalogue,
    string AgeGroup,
    string BodyRegion,
    double? ContrastConcentration,
    ConditionsDocument Conditions,
    IReadOnlyList<AllowedRange> AllowedRanges,
    TissueDraws Draws)
{
    internal PredictionSetting Setting { get; } = new(FieldStrength);

    /// <summary>The catalogue's values depend on T2* when a gradient echo is read.</summary>
    internal bool NeedsT2Star => Acquisition.Readout is SpoiledGradientEcho or SpoiledGradientEchoTrain;

    internal bool NeedsDiffusion => Acquisition.Readout is DiffusionSpinEcho;

    /// <summary>Context of a series of an input.</summary>
    /// <exception cref="InvalidOperationException">The scanner lacks a pulse that the series names.</exception>
    internal static SeriesContext Create(EvaluationInput input, ProtocolSeries series, TissueDraws draws) =>
        Create(input, series, SeriesMapping.Resolve(series, input.Scanner.Document).Require(), draws);

    private static SeriesContext Create(EvaluationInput input, ProtocolSeries series, Series acquisition, TissueDraws draws) => new(
        series.Id,
        acquisition,
        input.Scanner.Document.MagneticFieldStrength,
        input.Catalogue.Document,
        input.Protocol.Document.AgeGroup,
        input.Protocol.Document.BodyRegion,
        series.ContrastConcentration,
        input.Conditions.Document,
        AllowedCorners.WithTrigger(series.AllowedRanges, acquisition),
        draws);

    /// <summary>Text that two contexts share exactly when their numbers are equal, the catalogue and the conditions apart.</summary>
    internal string Text() => string.Join(
        '|', SeriesId, AcquisitionText.Of(Acquisition), FieldStrength, AgeGroup, BodyRegion, ContrastConcentration, string.Join(';', AllowedRanges));
}
