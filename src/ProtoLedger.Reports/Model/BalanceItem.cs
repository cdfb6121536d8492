using ProtoLedger.Regression.Findings;

namespace ProtoLedger.Reports.Model;

/// <summary>A line of what gets better, gets worse, stays.</summary>
/// <param name="Direction">Which of the three.</param>
/// <param name="What">In words, such as "scan time".</param>
/// <param name="SeriesTitle">Series, or null for the whole protocol.</param>
/// <param name="ScannerIds">Scanners of which it is said; empty for all.</param>
/// <param name="Before">Value before, in <paramref name="Unit"/>; null where there was none.</param>
/// <param name="After">Value after; null where there is none.</param>
/// <param name="Unit">s, ms, px; empty for relative numbers (old = 1).</param>
/// <param name="Note">What belongs to the number, such as "2 concatenations, as before"; may be empty.</param>
public sealed record BalanceItem(
    FindingDirection Direction,
    string What,
    string? SeriesTitle,
    IReadOnlyList<string> ScannerIds,
    double? Before,
    double? After,
    string Unit,
    string Note);
