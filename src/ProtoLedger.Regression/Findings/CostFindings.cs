using System.Globalization;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Observables;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Findings;

/// <summary>Scan time, noise, RF power, sharpness and slices: the balance of an edit, and findings where a line counts.</summary>
internal static class CostFindings
{
    /// <summary>Relative change from which a cost is a finding of its own (common practice, no source).</summary>
    private const double Counts = 0.05;

    private static readonly (string Observable, string What, bool Relative)[] Lines =
    [
        ("scanTime", "scan time", false),
        ("relativeNoise", "noise", true),
        ("relativeRfPower", "RF power", true),
        ("blurWidth", "blur along the phase direction", false),
        ("fatWaterShift", "shift of fat against water", false),
        ("contrastEquivalentEchoTime", "contrast-equivalent echo time", false),
    ];

    /// <summary>The balance of a series that the edit moved: costs first, then contrasts against the reference.</summary>
    internal static IEnumerable<BalanceLine> Balance(ScannerEvidence evidence, ProtocolSeries series)
    {
        foreach (var (observable, what, relative) in Lines)
        {
            if (Find(evidence, series.Id, observable) is not { } key || evidence.Values(key) is not var (old, now) || old == 0)
                continue;
            var (before, after) = relative ? (1, now / old) : (old, now);
            var direction = Direction(observable, before, after);
            if (direction != FindingDirection.Same || observable is "scanTime" or "relativeNoise" or "relativeRfPower")
                yield return new(direction, what, series.Id, series.Title, before, after, ExpectationFindings.Unit(observable), Note(evidence, series, observable));
        }

        var reference = TissueRoles.Of(evidence.Region)[0];
        foreach (var key in evidence.Now.Observables.Where(k => k.Series == series.Id && k.Observable == "contrastRatio" && k.Reference == reference && k.Condition == ObservableKey.NominalCondition))
        {
            if (evidence.Values(key) is not var (old, now) || old <= 0 || now <= 0)
                continue;
            var (before, after) = (Math.Abs(Math.Log(old)), Math.Abs(Math.Log(now)));
            var suppressed = PairFindings.IsSuppressed(evidence, series, key.Tissue!, old, now);
            var change = suppressed ? old - now : Math.Log(now / old);
            var better = suppressed ? now < old : after > before && (old > 1) == (now > 1);
            yield return new(
                Math.Abs(change) < PairFindings.Visible ? FindingDirection.Same : better ? FindingDirection.Better : FindingDirection.Worse,
                $"{evidence.Words(key.Tissue!)} against {evidence.Words(reference)}",
                series.Id,
                series.Title,
                old,
                now,
                "",
                RatioNote(suppressed, old, now));
        }
    }

    /// <summary>What makes a ratio better or worse; a pair that changes places is told apart otherwise, however far from 1 it is.</summary>
    private static string RatioNote(bool suppressed, double old, double now) => suppressed ? "brightness ratio; darker is better"
        : (old > 1) == (now > 1) ? "brightness ratio; farther from 1 is better"
        : "brightness ratio; the pair has changed places: what was brighter is darker now";

    internal static IEnumerable<Finding> Findings(ScannerEvidence evidence, ProtocolSeries series)
    {
        foreach (var (observable, what, relative) in Lines)
        {
            if (Find(evidence, series.Id, observable) is not { } key || evidence.Values(key) is not var (old, now) || old == 0 || Math.Abs(now / old - 1) < Counts)
                continue;
            var unit = ExpectationFindings.Unit(observable);
            var (before, after) = relative ? (1, now / old) : (old, now);
            var numbers = observable == "scanTime" ? $"from {PlainWords.Minutes(old)} to {PlainWords.Minutes(now)}"
                : relative ? $"to {PlainWords.Ratio(after)} of before"
                : $"from {PlainWords.Ratio(old)} to {PlainWords.Ratio(now)} {unit}";
            var note = Note(evidence, series, observable);
            yield return Make(
                evidence, series, key, Direction(observable, before, after), 15 * Math.Min(2, Math.Abs(now / old - 1)),
                $"{what} {(now > old ? "rises" : "falls")} {numbers}{(note.Length > 0 ? $" ({note})" : "")}", before, after, unit);
        }

        if (Find(evidence, series.Id, "slicesFit") is { } fit && evidence.Values(fit) is var (fitted, fits) && fitted != fits)
        {
            var needed = SliceFit.Of(series.Acquisition).ConcatenationsNeeded;
            yield return Make(
                evidence, series, fit, fits > fitted ? FindingDirection.Better : FindingDirection.Worse, 90,
                fits > fitted
                    ? "the slices fit in the repetition time again"
                    : string.Create(CultureInfo.InvariantCulture, $"the slices no longer fit in the repetition time: {needed} concatenations are needed"),
                fitted, fits, "");
        }
    }

    private static Finding Make(
        ScannerEvidence evidence, ProtocolSeries series, ObservableKey key, FindingDirection direction, double weight, string text, double before, double after, string unit)
    {
        var attribution = evidence.Attribution(key);
        return new(
            FindingKind.Cost,
            direction,
            direction switch { FindingDirection.Worse => weight, FindingDirection.Better => -weight, _ => 0.1 },
            evidence.ScannerId,
            series.Id,
            series.Title,
            PairFindings.Join(text, PairFindings.Because(attribution)),
            key,
            null,
            null,
            before,
            after,
            unit,
            attribution?.Shares ?? [],
            attribution is null ? double.NaN : attribution.NewSigned - attribution.OldSigned,
            null,
            "",
            null,
            null,
            null,
            null,
            null,
            false);
    }

    private static ObservableKey? Find(ScannerEvidence evidence, string series, string observable) =>
        evidence.Now.Observables.FirstOrDefault(k => k.Series == series && k.Observable == observable && k.Condition == ObservableKey.NominalCondition);

    private static FindingDirection Direction(string observable, double before, double after) =>
        Math.Abs(after - before) < 0.02 * Math.Abs(before) ? FindingDirection.Same
        : observable == "contrastEquivalentEchoTime" ? FindingDirection.Different
        : after > before ? FindingDirection.Worse : FindingDirection.Better;

    private static string Note(ScannerEvidence evidence, ProtocolSeries series, string observable)
    {
        var old = evidence.Edit.Before.Protocol.Document.Series.FirstOrDefault(s => s.Id == series.Id)?.Acquisition;
        return observable switch
        {
            "relativeNoise" when old is not null && ContrastToNoise.WhyNotComparable(old.Geometry, series.Acquisition.Geometry) is { } why => $"old = 1; other reconstruction: {why}",
            "relativeNoise" or "relativeRfPower" => "old = 1",
            "scanTime" => string.Join("; ", ((string[])[Concatenations(old, series.Acquisition), Rates(series.Acquisition)]).Where(text => text.Length > 0)),
            _ => "",
        };
    }

    private static string Concatenations(Series? old, Series now)
    {
        if (now.Geometry.Dimensions == 3)
            return "";
        var (before, after) = (old?.Timing.Concatenations, now.Timing.Concatenations);
        return string.Create(
            CultureInfo.InvariantCulture, $"{after} {(after == 1 ? "concatenation" : "concatenations")}{(before == after ? ", as before" : before is null ? "" : $", before {before}")}");
    }

    /// <summary>Scan times to which the rates of a triggered series lead; empty where nothing triggers.</summary>
    private static string Rates(Series series)
    {
        if (series.Timing.Trigger == SeriesTrigger.None)
            return "";
        var (shortest, longest) = ScanTime.Range(series);
        return string.Create(
            CultureInfo.InvariantCulture, $"{shortest:0} to {longest:0} s at {series.Timing.HeartRate.Low} to {series.Timing.HeartRate.High} a minute");
    }
}
