using ProtoLedger.Physics.Observables;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Findings;

/// <summary>What happens to the brightness of tissues against the reference tissue, and to the reference itself.</summary>
internal static class PairFindings
{
    /// <summary>Relative change below which a contrast counts as the same; readers do not see less (common practice, no source).</summary>
    internal const double Visible = 0.03;

    internal static IEnumerable<Finding> Of(ScannerEvidence evidence, ProtocolSeries series, IReadOnlySet<(string, string)> toldByExpectation)
    {
        var keys = evidence.Now.Observables.Where(k => k.Series == series.Id && k.Condition == ObservableKey.NominalCondition).ToArray();
        var reference = TissueRoles.Of(evidence.Region)[0];
        foreach (var key in keys.Where(k => k.Observable == "contrastRatio" && k.Reference == reference && !toldByExpectation.Contains((k.Tissue!, reference))))
        {
            if (Pair(evidence, series, key) is { } finding)
                yield return finding;
        }

        if (keys.FirstOrDefault(k => k.Observable == "signal" && k.Tissue == reference) is { } signal && Signal(evidence, series, signal) is { } change)
            yield return change;
    }

    /// <summary>A tissue that a series keeps dark, before or after: its brightness is a matter of suppression, not of contrast.</summary>
    internal static bool IsSuppressed(ScannerEvidence evidence, ProtocolSeries series, string tissue, double old, double now) =>
        Math.Min(old, now) < 0.3
        && series.Acquisition.Preparations.Count > 0
        && (TissueRoles.IsFluid(tissue) || evidence.Edit.After.Catalogue.Document.Tissues.Any(t => t.Name == tissue && t.IsFat));

    internal static string Verb(string subject, string plural) =>
        subject.Contains(" and ", StringComparison.Ordinal) || (subject.EndsWith('s') && !subject.EndsWith("ss", StringComparison.Ordinal)) ? plural : plural + "s";

    /// <summary>"ventricles and sulci turn from black to about as bright as white matter, 0.05 to 1.0".</summary>
    internal static string Turns(string subject, string reference, double old, double now)
    {
        var (was, becomes) = (PlainWords.Brightness(old, reference), PlainWords.Brightness(now, reference));
        var numbers = $"{PlainWords.Ratio(old)} to {PlainWords.Ratio(now)}";
        return was != becomes
            ? $"{subject} {Verb(subject, "turn")} from {was} to {becomes}, {numbers}"
            : $"{subject} {Verb(subject, "get")} {(now > old ? "brighter" : "darker")} but {Verb(subject, "stay")} {becomes}, {numbers} of {reference}";
    }

    internal static string Because(AttributionResult? attribution) =>
        attribution is null ? "" : PlainWords.Causes(attribution.Shares, attribution.NewSigned - attribution.OldSigned);

    internal static string Join(params IEnumerable<string> parts) => string.Join("; ", parts.Where(p => p.Length > 0));

    private static Finding? Pair(ScannerEvidence evidence, ProtocolSeries series, ObservableKey key)
    {
        if (evidence.Values(key) is not var (old, now) || old <= 0 || now <= 0)
            return null;
        var (subject, reference) = (evidence.Words(key.Tissue!), evidence.Words(key.Reference!));
        var suppressed = IsSuppressed(evidence, series, key.Tissue!, old, now);
        var (before, after) = (Math.Abs(Math.Log(old)), Math.Abs(Math.Log(now)));
        if (Math.Abs(suppressed ? now - old : Math.Log(now / old)) < Visible)
            return null;
        // A pair that changes places reads differently even where it is told apart as well as before.
        var worse = suppressed ? now > old : after < before || (old > 1) != (now > 1);
        var rising = evidence.Rising(key);
        // Of the plausible tissue values: how many move the way in which the nominal ones do.
        var share = rising is not { } up ? (double?)null : now > old ? up : 1 - up;
        var attribution = evidence.Attribution(key);
        var text = suppressed ? Turns(subject, reference, old, now) : ToldApart(subject, reference, old, now);
        return new Finding(
            suppressed ? FindingKind.Suppression : FindingKind.Contrast,
            worse ? FindingDirection.Worse : FindingDirection.Better,
            (worse ? 1 : -1) * (suppressed ? 30 + 20 * Math.Min(2, Math.Abs(now - old)) : 25 * Math.Min(1, Math.Abs(Math.Log(now / old)) / Math.Max(before, after))),
            evidence.ScannerId,
            series.Id,
            series.Title,
            Join(text, Because(attribution), share is { } s ? PlainWords.ForShare(worse ? "worse" : "better", s) : ""),
            key,
            subject,
            reference,
            old,
            now,
            "",
            attribution?.Shares ?? [],
            attribution is null ? double.NaN : attribution.NewSigned - attribution.OldSigned,
            share,
            "",
            null,
            null,
            null,
            null,
            null,
            ReferenceMoved(evidence, series.Id, key.Reference!));
    }

    private static string ToldApart(string subject, string reference, double old, double now)
    {
        var numbers = $"brightness ratio {PlainWords.Ratio(old)} to {PlainWords.Ratio(now)}";
        if (Math.Abs(Math.Log(now)) < 0.05)
            return $"{subject} and {reference} can hardly be told apart any more, {numbers}";
        if ((old > 1) != (now > 1))
        {
            var was = Math.Abs(Math.Log(old)) < 0.05 ? $"about as bright as {reference}" : $"{(old > 1 ? "brighter" : "darker")} than {reference}";
            return $"{subject} {Verb(subject, "turn")} from {was} to {(now > 1 ? "brighter" : "darker")}, {numbers}";
        }

        return $"{subject} and {reference} are told apart {(Math.Abs(Math.Log(now)) < Math.Abs(Math.Log(old)) ? "less" : "better")}, {numbers}";
    }

    internal static bool ReferenceMoved(ScannerEvidence evidence, string series, string reference) =>
        evidence.Values(new(series, "signal", reference, null, ObservableKey.NominalCondition)) is var (old, now)
        && Math.Abs(now - old) > ResidualRatio.Threshold * old;

    private static Finding? Signal(ScannerEvidence evidence, ProtocolSeries series, ObservableKey key)
    {
        if (evidence.Values(key) is not var (old, now) || old <= 0 || Math.Abs(now / old - 1) < Visible)
            return null;
        var subject = evidence.Words(key.Tissue!);
        var (relative, worse) = (now / old, now < old);
        var share = evidence.Rising(key) is { } up ? (worse ? 1 - up : up) : (double?)null;
        var attribution = evidence.Attribution(key);
        return new Finding(
            FindingKind.Signal,
            worse ? FindingDirection.Worse : FindingDirection.Better,
            (worse ? 1 : -1) * 20 * Math.Min(1, Math.Abs(relative - 1)),
            evidence.ScannerId,
            series.Id,
            series.Title,
            Join(
                $"{subject} {Verb(subject, "give")} {(worse ? "less" : "more")} signal, {PlainWords.Ratio(relative)} of before",
                Because(attribution),
                share is { } s ? PlainWords.ForShare(worse ? "less" : "more", s) : ""),
            key,
            subject,
            null,
            1,
            relative,
            "",
            attribution?.Shares ?? [],
            attribution is null ? double.NaN : attribution.NewSigned - attribution.OldSigned,
            share,
            "",
            null,
            null,
            null,
            null,
            null,
            false);
    }
}
