using ProtoLedger.Reports.Markdown;
using ProtoLedger.Reports.Model.Binders;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports;

/// <summary>The effective table as rows of a timeline.</summary>
internal static class BinderTimeline
{
    public static IReadOnlyList<TimelineRow> Rows(Binder binder) =>
        [.. Places(binder).Select(place => new TimelineRow(
            Label(place.First()),
            [.. place.Select(e => new TimelineSpan($"v{Numbers.Whole(e.Version)}", e.From, e.Until, e.Imported))]))];

    /// <summary>Lines by protocol and scanner, in order of time.</summary>
    public static IEnumerable<IGrouping<(string Protocol, string Scanner), EffectiveLine>> Places(Binder binder) =>
        BinderMarkdown.Ordered(binder).GroupBy(e => (e.ProtocolId, e.ScannerId));

    public static string Label(EffectiveLine line) =>
        line.ScannerId == "*" ? line.ProtocolId : $"{line.ProtocolId}, {line.ScannerTitle}";
}
