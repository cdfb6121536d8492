using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Pictures;

namespace ProtoLedger.Reports.Plots;

/// <summary>Every plot and picture of a change report, in the order in which the report shows them.</summary>
public sealed class ReportFigures
{
    /// <summary>Most attributions that are drawn; the others stand in a table.</summary>
    public const int MaximumCharts = 8;

    /// <summary>Draws all figures of a report.</summary>
    public ReportFigures(ChangeReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        string Title(string id) => report.Scanners.FirstOrDefault(s => s.ScannerId == id)?.Title ?? id;
        Pictures = [.. report.Appearances.Select((a, i) => AppearancePictures.Draw($"appearance-{i + 1}", a, Title(a.ScannerId)))];
        Signals = [.. report.Appearances.Select((a, i) => a.Tissues.Count == 0 ? null : SignalChart.Draw($"signals-{i + 1}", a, Title(a.ScannerId)))];
        var charted = Charted(report);
        Attributions = [.. report.Attributions.Select((a, i) => charted.Contains(i) ? AttributionChart.Draw($"attribution-{i + 1}", a, Title(a.ScannerId)) : null)];
        RecoveryCurves = [.. report.RecoveryCurves.Select((c, i) => RecoveryChart.Draw($"recovery-{i + 1}", c, Title(c.ScannerId)))];
        FieldMaps = [.. report.FieldMaps.Select((m, i) => FieldMapChart.Draw($"field-{i + 1}", m, Title(m.ScannerId)))];
    }

    /// <summary>One set for each appearance.</summary>
    public IReadOnlyList<PictureSet> Pictures { get; }

    /// <summary>One for each appearance; null where it names no tissue.</summary>
    public IReadOnlyList<Figure?> Signals { get; }

    /// <summary>One for each attribution table; null where the findings do not speak of its number, or after <see cref="MaximumCharts"/>.</summary>
    public IReadOnlyList<Figure?> Attributions { get; }

    /// <summary>One for each recovery curve.</summary>
    public IReadOnlyList<Figure> RecoveryCurves { get; }

    /// <summary>One for each field map.</summary>
    public IReadOnlyList<Figure> FieldMaps { get; }

    /// <summary>Attributions of the numbers that findings speak of, by the severity of the finding; each number and lane once.</summary>
    private static HashSet<int> Charted(ChangeReport report)
    {
        var severity = report.Findings
            .GroupBy(f => (f.ScannerId, f.SeriesTitle, f.Observable, f.Subject, f.Reference))
            .ToDictionary(g => g.Key, g => g.Max(f => f.Severity));
        return [.. report.Attributions
            .Select((a, i) => (Index: i, Key: (a.ScannerId, a.SeriesTitle, (string?)a.Observable, a.Subject, a.Reference), a.Lane, a.Contributions.Count))
            .Where(a => a.Count > 0 && severity.ContainsKey(a.Key))
            .DistinctBy(a => (a.Key, a.Lane))
            .OrderByDescending(a => severity[a.Key])
            .ThenBy(a => a.Index)
            .Take(MaximumCharts)
            .Select(a => a.Index)];
    }

    /// <summary>All plots.</summary>
    public IEnumerable<Figure> Plots => Signals.Concat(Attributions).OfType<Figure>().Concat(RecoveryCurves).Concat(FieldMaps);
}
