namespace ProtoLedger.Reports.Model;

/// <summary>One observable over off-resonance and B1+ scale.</summary>
/// <param name="ScannerId">Scanner.</param>
/// <param name="SeriesTitle">Series.</param>
/// <param name="Observable">Name of the observable.</param>
/// <param name="Subject">Tissue in plain words, or null.</param>
/// <param name="Reference">Second tissue in plain words, or null.</param>
/// <param name="Unit">Unit, empty for ratios.</param>
/// <param name="OffResonanceHz">Columns, Hz, ascending; at least one.</param>
/// <param name="B1Scale">Rows, actual over nominal flip angle, ascending; at least one.</param>
/// <param name="Before">Rows of columns, base version; empty for a new series.</param>
/// <param name="After">Rows of columns, proposal.</param>
/// <param name="Limit">Limit of the written expectation, or null.</param>
/// <param name="AtMost">True where values above the limit fail.</param>
public sealed record FieldMap(
    string ScannerId,
    string SeriesTitle,
    string Observable,
    string? Subject,
    string? Reference,
    string Unit,
    IReadOnlyList<double> OffResonanceHz,
    IReadOnlyList<double> B1Scale,
    IReadOnlyList<IReadOnlyList<double>> Before,
    IReadOnlyList<IReadOnlyList<double>> After,
    double? Limit,
    bool AtMost);
