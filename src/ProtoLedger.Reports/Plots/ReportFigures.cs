using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Pictures;

namespace ProtoLedger.Reports.Plots;

/// <summary>Every plot and picture of a change report, in the order in which the report shows them.</summary>
public sealed class ReportFigures
{
    /// <summary>Draws all figures of a report.</summary>
    public ReportFigures(ChangeReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        string Title(string id) => report.Scanners.FirstOrDefault(s => s.ScannerId == id)?.Title ?? id;
        Pictures = [.. report.Appearances.Select((a, i) => AppearancePictures.Draw($"appearance-{i + 1}", a, Title(a.ScannerId)))];
        Signals = [.. report.Appearances.Select((a, i) => a.Tissues.Count == 0 ? null : SignalChart.Draw($"signals-{i + 1}", a, Title(a.ScannerId)))];
        Attributions = [.. report.Attributions.Select((a, i) => a.Contributions.Count == 0 ? null : AttributionChart.Draw($"attribution-{i + 1}", a, Title(a.ScannerId)))];
        RecoveryCurves = [.. report.RecoveryCurves.Select((c, i) => RecoveryChart.Draw($"recovery-{i + 1}", c, Title(c.ScannerId)))];
        FieldMaps = [.. report.FieldMaps.Select((m, i) => FieldMapChart.Draw($"field-{i + 1}", m, Title(m.ScannerId)))];
    }

    /// <summary>One set for each appearance.</summary>
    public IReadOnlyList<PictureSet> Pictures { get; }

    /// <summary>One for each appearance; null where it names no tissue.</summary>
    public IReadOnlyList<Figure?> Signals { get; }

    /// <summary>One for each attribution table; null where it has no contribution.</summary>
    public IReadOnlyList<Figure?> Attributions { get; }

    /// <summary>One for each recovery curve.</summary>
    public IReadOnlyList<Figure> RecoveryCurves { get; }

    /// <summary>One for each field map.</summary>
    public IReadOnlyList<Figure> FieldMaps { get; }

    /// <summary>All plots.</summary>
    public IEnumerable<Figure> Plots => Signals.Concat(Attributions).OfType<Figure>().Concat(RecoveryCurves).Concat(FieldMaps);
}
