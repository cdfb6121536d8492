using System.Globalization;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Findings;

/// <summary>What happens to written expectations.</summary>
internal static class ExpectationFindings
{
    private static readonly HashSet<string> Ratios = ["residualRatio", "contrastRatio"];

    /// <summary>Findings of a series, and the pairs of tissues that they tell of.</summary>
    internal static (IReadOnlyList<Finding> Findings, IReadOnlySet<(string, string)> Pairs) Of(ScannerEvidence evidence, ProtocolSeries series)
    {
        var findings = new List<Finding>();
        var pairs = new HashSet<(string, string)>();
        foreach (var outcome in evidence.Now.Expectations.Where(o => o.Expectation.Series == series.Id))
        {
            var old = evidence.OldOutcome(outcome.Expectation.Id);
            var transition = VerdictRule.Between(old?.Verdict, outcome.Verdict);
            var moved = old is not null && RunDifference.HasMoved(old.Nominal, outcome.Nominal);
            // What holds on and belongs to the series as a whole stands in the balance.
            if (outcome.Expectation.Observable.Tissue is null && transition == Transition.StillHolds)
                continue;
            if (old is null || !double.IsFinite(outcome.Nominal) || !double.IsFinite(old.Nominal) || !Tells(transition, moved, old.Nominal, outcome.Nominal))
                continue;
            findings.Add(Tell(evidence, series, old, outcome, transition));
            if (Ratios.Contains(outcome.Expectation.Observable.Name))
                pairs.Add((outcome.Expectation.Observable.Tissue!, outcome.Expectation.Observable.Reference!));
        }

        return (findings, pairs);
    }

    private static bool Tells(Transition transition, bool moved, double old, double now) => transition switch
    {
        Transition.NewlyFails or Transition.NewlyHolds or Transition.NewlyUncertain => true,
        Transition.StillFails or Transition.StillUncertain => moved,
        Transition.StillHolds => moved && Math.Abs(now - old) > PairFindings.Visible * Math.Max(Math.Abs(old), Math.Abs(now)) && Math.Abs(now - old) > 0.03,
        _ => false,
    };

    private static Finding Tell(ScannerEvidence evidence, ProtocolSeries series, ExpectationOutcome old, ExpectationOutcome now, Transition transition)
    {
        var expectation = now.Expectation;
        var (tissue, reference) = (expectation.Observable.Tissue, expectation.Observable.Reference);
        var (subject, against) = (tissue is null ? null : evidence.Words(tissue), reference is null ? null : evidence.Words(reference));
        var worse = expectation.Relation == LimitRelation.AtMost ? now.Nominal > old.Nominal : now.Nominal < old.Nominal;
        var condition = evidence.Edit.After.Conditions.Document.Conditions.FirstOrDefault(c => c.Name == now.Observable.Condition)?.Title ?? "";
        var attribution = evidence.Attribution(now.Observable) ?? evidence.WorstAttribution(now.Observable);
        var share = Share(evidence, series.Id, expectation, worse);
        return new Finding(
            FindingKind.Suppression,
            worse ? FindingDirection.Worse : now.Nominal == old.Nominal ? FindingDirection.Same : FindingDirection.Better,
            Severity(transition, worse, old, now),
            evidence.ScannerId,
            series.Id,
            series.Title,
            PairFindings.Join(
                Text(expectation, subject, against, old.Nominal, now.Nominal),
                PairFindings.Because(attribution),
                share is { } s ? PlainWords.ForShare(worse ? "worse" : "better", s) : ""),
            now.Observable,
            subject,
            against,
            old.Nominal,
            now.Nominal,
            Unit(expectation.Observable.Name),
            attribution?.Shares ?? [],
            attribution is null ? double.NaN : attribution.NewSigned - attribution.OldSigned,
            share,
            condition,
            transition,
            expectation.Id,
            expectation.Title,
            expectation.Limit,
            now.Probability,
            reference is not null && PairFindings.ReferenceMoved(evidence, series.Id, reference));
    }

    private static double Severity(Transition transition, bool worse, ExpectationOutcome old, ExpectationOutcome now) => transition switch
    {
        // The number itself comes before its ratio to the old one.
        Transition.NewlyFails => 100 + 20 * (1 - now.Probability)
            + (ExpectationJudge.IsPaired(now.Expectation) ? 0 : 10 * Math.Min(1, Math.Abs(now.Nominal - old.Nominal))),
        Transition.NewlyUncertain => worse ? 80 + 10 * (1 - now.Probability) : -20,
        Transition.StillFails => worse ? 60 : 40,
        Transition.StillUncertain => worse ? 50 : 20,
        Transition.NewlyHolds => -60,
        _ => worse ? 28 : -28,
    };

    private static string Text(Expectation expectation, string? subject, string? against, double old, double now)
    {
        var name = expectation.Observable.Name;
        if (expectation.Basis == ExpectationBasis.Paired || name is "relativeNoise" or "relativeRfPower")
            return $"{Label(name, subject, against)} becomes {(now < 2 ? $"{PlainWords.Ratio(now)} of" : $"{PlainWords.Ratio(now)} times that of")} before";
        return name switch
        {
            "residualRatio" => PairFindings.Turns(subject!, against!, old, now),
            "contrastRatio" => $"brightness of {subject} against {against} goes from {PlainWords.Ratio(old)} to {PlainWords.Ratio(now)}",
            "nullDistance" => $"the inversion time stands {Milliseconds(now)} the null of {subject}, before {Milliseconds(old)}",
            "scanTime" => $"scan time goes from {PlainWords.Minutes(old)} to {PlainWords.Minutes(now)}",
            "slicesFit" => now >= 0.5 ? "the slices fit in the repetition time" : "the slices no longer fit in the repetition time",
            _ => $"{Label(name, subject, against)} goes from {PlainWords.Ratio(old)} to {PlainWords.Ratio(now)}{(Unit(name) is { Length: > 0 } u ? " " + u : "")}",
        };
    }

    private static string Milliseconds(double distance) =>
        string.Create(CultureInfo.InvariantCulture, $"{Math.Abs(Math.Round(distance))} ms {(distance < 0 ? "below" : "above")}");

    private static string Label(string observable, string? subject, string? against) => observable switch
    {
        "signal" or "signedSignal" => $"signal of {subject}",
        "contrastDifference" or "contrastRatio" => $"contrast of {subject} against {against}",
        "contrastToNoise" => $"contrast to noise of {subject} against {against}",
        "residualRatio" => $"what is left of {subject} against {against}",
        "nullTime" => $"the inversion time that nulls {subject}",
        "nullWindow" => $"the range of inversion times that keep {subject} dark",
        "weightingT1" => $"T1 weighting of {subject}",
        "weightingT2" => $"T2 weighting of {subject}",
        "weightingProtonDensity" => $"proton-density weighting of {subject}",
        "weightingDiffusion" => $"diffusion weighting of {subject}",
        "contrastEquivalentEchoTime" => $"the contrast-equivalent echo time of {subject}",
        "blurWidth" => $"blur of {subject} along the phase direction",
        "fatWaterShift" => "shift of fat against water",
        "fatWaterPhase" => "phase of fat against water",
        "relativeNoise" => "noise",
        "relativeRfPower" => "RF power",
        "scanTime" => "scan time",
        _ => observable,
    };

    internal static string Unit(string observable) => observable switch
    {
        "nullTime" or "nullDistance" or "nullWindow" or "contrastEquivalentEchoTime" => "ms",
        "blurWidth" or "fatWaterShift" => "px",
        "fatWaterPhase" => "°",
        "scanTime" => "s",
        _ => "",
    };

    /// <summary>Share of the draws that change in the direction of the finding, at the nominal point.</summary>
    private static double? Share(ScannerEvidence evidence, string series, Expectation expectation, bool worse)
    {
        var observable = expectation.Observable;
        // A standard observable says the same under another name.
        var name = observable.Name == "residualRatio" ? "contrastRatio" : observable.Name;
        if (evidence.Rising(new(series, name, observable.Tissue, observable.Reference, ObservableKey.NominalCondition)) is not { } rising)
            return null;
        return (expectation.Relation == LimitRelation.AtMost) == worse ? rising : 1 - rising;
    }
}
