namespace ProtoLedger.Reports.Model;

/// <summary>One changed parameter.</summary>
/// <param name="SeriesTitle">Series, or null for the document itself.</param>
/// <param name="Pointer">JSON pointer in the document.</param>
/// <param name="Parameter">Keyword.</param>
/// <param name="Meaning">What is meant where the trade is ambiguous; null otherwise.</param>
/// <param name="Old">Value before as text, null where it was not there.</param>
/// <param name="New">Value after as text, null where it was removed.</param>
/// <param name="Unit">Unit of both, empty for text and numbers without one.</param>
/// <param name="Console">Wording at each scanner's console.</param>
public sealed record ReportChange(
    string? SeriesTitle,
    string Pointer,
    string Parameter,
    string? Meaning,
    string? Old,
    string? New,
    string Unit,
    IReadOnlyList<ConsoleWording> Console);

/// <summary>How one scanner's console calls a parameter.</summary>
/// <param name="ScannerId">Scanner.</param>
/// <param name="Word">What the console shows; the keyword where the scanner's document names none.</param>
/// <param name="Meaning">What that console means by it, or null.</param>
public sealed record ConsoleWording(string ScannerId, string Word, string? Meaning);
