namespace ProtoLedger.Reports.Model;

/// <summary>Everything that a change report says, as plain data. The renderer adds words and layout, no facts.</summary>
/// <param name="Identity">Which change of which document, by whom, computed by which run.</param>
/// <param name="Findings">What the edit does, one entry per scanner, series, observable and tissues; in any order.</param>
/// <param name="Balance">What gets better, gets worse, stays: scan time, noise, RF power and the like.</param>
/// <param name="Changes">Every changed parameter.</param>
/// <param name="Scanners">Every scanner that runs the document; in any order, the report puts the worst first.</param>
/// <param name="UnchangedVariants">Protocols that are variants of the document, or share the series, and were not edited along.</param>
/// <param name="LeftOut">What the prediction does not hold for this edit.</param>
/// <param name="NextSteps">What must be done, where, by whom.</param>
/// <param name="Appearances">Predicted pictures.</param>
/// <param name="Effects">Predicted numbers by tissue and pair.</param>
/// <param name="Attributions">Which parameter moved a number by how much.</param>
/// <param name="Verdicts">Written expectations before and after.</param>
/// <param name="RecoveryCurves">Longitudinal recovery around the inversion times.</param>
/// <param name="FieldMaps">Observables over off-resonance and B1+.</param>
/// <param name="Repairs">Offers that make a broken expectation hold, with their cost.</param>
/// <param name="Run">What the regression run counted.</param>
/// <param name="Touched">Other stored versions that the run moved.</param>
/// <param name="Assumptions">Values that the documents leave open, and weakly sourced ones.</param>
/// <param name="Cautions">Cautions that belong to this edit; the standing ones are added by the report.</param>
public sealed record ChangeReport(
    ReportIdentity Identity,
    IReadOnlyList<ReportFinding> Findings,
    IReadOnlyList<BalanceItem> Balance,
    IReadOnlyList<ReportChange> Changes,
    IReadOnlyList<ScannerSummary> Scanners,
    IReadOnlyList<UnchangedVariant> UnchangedVariants,
    IReadOnlyList<OmissionNote> LeftOut,
    IReadOnlyList<ReportStep> NextSteps,
    IReadOnlyList<Appearance> Appearances,
    IReadOnlyList<PredictedEffect> Effects,
    IReadOnlyList<AttributionTable> Attributions,
    IReadOnlyList<VerdictLine> Verdicts,
    IReadOnlyList<RecoveryCurve> RecoveryCurves,
    IReadOnlyList<FieldMap> FieldMaps,
    IReadOnlyList<ReportRepair> Repairs,
    ReportRun Run,
    IReadOnlyList<TouchedVersion> Touched,
    IReadOnlyList<Assumption> Assumptions,
    IReadOnlyList<string> Cautions);
