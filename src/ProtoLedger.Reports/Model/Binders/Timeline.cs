namespace ProtoLedger.Reports.Model.Binders;

/// <summary>A row of a timeline: one protocol on one scanner.</summary>
/// <param name="Label">What the row is about.</param>
/// <param name="Spans">Intervals in order of time; they do not overlap.</param>
public sealed record TimelineRow(string Label, IReadOnlyList<TimelineSpan> Spans);

/// <summary>A version that was effective for a time.</summary>
/// <param name="Label">Short, such as "v7".</param>
/// <param name="From">Inclusive, UTC.</param>
/// <param name="Until">Exclusive, UTC; null while it lasts.</param>
/// <param name="Imported">True where it was stated and not signed here.</param>
public sealed record TimelineSpan(string Label, DateTimeOffset From, DateTimeOffset? Until, bool Imported);
