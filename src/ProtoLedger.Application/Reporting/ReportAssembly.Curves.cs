using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports.Model;

namespace ProtoLedger.Application.Reporting;

/// <summary>Recovery curves and predicted pictures.</summary>
internal sealed partial class ReportAssembly
{
    private const int CurvePoints = 61;

    /// <summary>Noise over the brightest tissue before the edit; common practice, no source.</summary>
    private const double UsualNoise = 0.02;

    /// <summary>Curves of the tissues that the series' expectations and findings speak of, for series with an inversion.</summary>
    private IEnumerable<RecoveryCurve> RecoveryOf(AssessedProtocol one)
    {
        foreach (var part in one.Assessment.Scanners)
        {
            var edit = Edit(one, part.ScannerId);
            foreach (var id in part.Difference.Moved.Select(moved => moved.Observable.Series).Distinct())
            {
                var (before, after) = (Inverted(edit.Before, id), Inverted(edit.After, id));
                if (before is null && after is null)
                    continue;
                var tissues = Tissues(part.After, id).Take(6)
                    .Select(tissue => Recovery(one, tissue, before, after, edit))
                    .OfType<TissueRecovery>()
                    .ToList();
                if (tissues.Count > 0)
                    yield return new RecoveryCurve(part.ScannerId, Title(one, id), before?.InversionTime, after?.InversionTime, tissues);
            }
        }
    }

    private static IEnumerable<string> Tissues(EvaluationResult result, string series) =>
        result.Observables
            .Where(key => key.Series == series && key is { Observable: "residualRatio" or "contrastDifference" or "contrastRatio", Condition: ObservableKey.NominalCondition })
            .SelectMany(key => new[] { key.Tissue, key.Reference })
            .OfType<string>()
            .Distinct();

    /// <summary>The series when its last preparation is an inversion, with the time from there to the excitation.</summary>
    private static InvertedSeries? Inverted(EvaluationInput input, string id)
    {
        if (SeriesOf(input, id) is not { } series
            || SeriesMapping.Resolve(series, input.Scanner.Document) is not MappingResult<Series>.Mapped(var resolved))
            return null;
        return resolved.Preparations is [.., Inversion { End: InversionTimeEnd.Excitation } last]
            ? new InvertedSeries(resolved, last.InversionTime, new PredictionSetting(input.Scanner.Document.MagneticFieldStrength))
            : null;
    }

    private static TissueRecovery? Recovery(AssessedProtocol one, string tissue, InvertedSeries? before, InvertedSeries? after, EditOnScanner edit)
    {
        var old = before is null ? null : Curve(before, tissue, edit.Before);
        var now = after is null ? null : Curve(after, tissue, edit.After);
        return old is null && now is null
            ? null
            : new TissueRecovery(Words(one, tissue)!, old?.Null, now?.Null, old?.Points ?? [], now?.Points ?? []);
    }

    /// <summary>
    /// Between the last inversion and the excitation nothing but recovery happens, so one predicted point gives the whole curve:
    /// M(t) = 1 − (1 − M(TI)) · exp((TI − t) / T1), M over equilibrium.
    /// </summary>
    private static (double? Null, IReadOnlyList<CurvePoint> Points)? Curve(InvertedSeries series, string tissue, EvaluationInput input)
    {
        if (CatalogueMapping.Map(
                input.Catalogue.Document, tissue, input.Protocol.Document.AgeGroup, series.Setting.FieldStrength)
            is not MappingResult<TissueDistribution>.Mapped(var distribution) || distribution.Mean.IsFat)
            return null;
        var lanes = LaneTable.FromGrid([distribution.Mean with { T2Star = distribution.Mean.T2Star ?? distribution.Mean.T2 }], [new FieldPoint()]);
        var atExcitation = SignalPredictor.Predict(series.Series, series.Setting, lanes).LongitudinalBeforeExcitation[0];
        var deficit = 1 - atExcitation;
        double At(double time) => Math.Clamp(1 - deficit * Math.Exp((series.InversionTime - time) / distribution.Mean.T1), -1, 1);
        var last = series.InversionTime * 1.5;
        var crossing = deficit > 0 ? series.InversionTime + distribution.Mean.T1 * Math.Log(deficit) : double.NaN;
        return (
            crossing > 0 && crossing <= last ? crossing : null,
            [.. Enumerable.Range(0, CurvePoints).Select(i => last * i / (CurvePoints - 1)).Select(time => new CurvePoint(time, At(time)))]);
    }

    /// <summary>Pictures of the series that moved, on the scanner where it is worst.</summary>
    private IEnumerable<Appearance> AppearancesOf(AssessedProtocol one)
    {
        if (Phantom(one.Edit.Document.BodyRegion) is not { } phantom || one.Assessment.Scanners.Count == 0)
            yield break;
        var part = one.Assessment.Scanners[0];
        foreach (var id in part.Difference.Moved.Select(moved => moved.Observable.Series).Distinct().Take(3))
        {
            var signals = part.After.Observables
                .Where(key => key is { Observable: "signedSignal", Condition: ObservableKey.NominalCondition } && key.Series == id)
                .Select(key => Signal(one, part, key))
                .OfType<TissueSignal>()
                .ToList();
            if (signals.Count == 0 || SeriesOf(Edit(one, part.ScannerId).After, id) is not { } series)
                continue;
            yield return new Appearance(
                part.ScannerId, Title(one, id), "nominal field", phantom, signals,
                UsualNoise, UsualNoise * Noise(part.After, id) / Noise(part.Before, id),
                0.1, Width(part.Before, id), Width(part.After, id), series.Acquisition.Geometry.PhaseDirection == PhaseDirection.Row);
        }
    }

    private TissueSignal? Signal(AssessedProtocol one, ScannerAssessment part, ObservableKey key)
    {
        if (At(part.Before, key) is not { } old || At(part.After, key) is not { } now)
            return null;
        var edit = Edit(one, part.ScannerId);
        return new TissueSignal(
            key.Tissue!, Words(one, key.Tissue)!, old, now, OffResonant(edit.Before, key) ?? old, OffResonant(edit.After, key) ?? now, B1Slope(edit.After, key));
    }

    private static double Noise(EvaluationResult result, string series) =>
        Named(result, series, "relativeNoise") is { } noise and > 0 ? Math.Min(noise, 5) : 1;

    private static double Width(EvaluationResult result, string series) =>
        Named(result, series, "blurWidth") is { } width ? Math.Clamp(width, 1, 8) : 1;

    private static double? Named(EvaluationResult result, string series, string observable)
    {
        for (var i = 0; i < result.Observables.Count; i++)
            if (result.Observables[i].Series == series && result.Observables[i].Observable == observable && double.IsFinite(result.Nominal[i]))
                return result.Nominal[i];
        return null;
    }

    private static PhantomKind? Phantom(string region) => region switch
    {
        "brain" or "head" or "pituitary" => PhantomKind.Head,
        "knee" => PhantomKind.Knee,
        "liver" or "abdomen" or "pancreas" => PhantomKind.Abdomen,
        _ => null,
    };

    private sealed record InvertedSeries(Series Series, double InversionTime, PredictionSetting Setting);
}
