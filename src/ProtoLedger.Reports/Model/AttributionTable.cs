namespace ProtoLedger.Reports.Model;

/// <summary>Which parameter moved one signed number by how much. The contributions add up to the change.</summary>
/// <param name="ScannerId">Scanner.</param>
/// <param name="SeriesTitle">Series.</param>
/// <param name="Observable">Name of the observable.</param>
/// <param name="Subject">Tissue in plain words, or null.</param>
/// <param name="Reference">Second tissue in plain words, or null.</param>
/// <param name="Lane">Where it was computed: "nominal", or the worst case of a broken expectation in words.</param>
/// <param name="Unit">Unit of the number, empty for ratios.</param>
/// <param name="Before">Signed value before.</param>
/// <param name="After">Signed value after.</param>
/// <param name="MagnitudeBefore">What the image shows before, since signs are lost there.</param>
/// <param name="MagnitudeAfter">What the image shows after.</param>
/// <param name="Contributions">One per parameter or coupled group, the largest first.</param>
/// <param name="Exact">True where every order of the changes was computed, false where orders were sampled.</param>
public sealed record AttributionTable(
    string ScannerId,
    string SeriesTitle,
    string Observable,
    string? Subject,
    string? Reference,
    string Lane,
    string Unit,
    double Before,
    double After,
    double MagnitudeBefore,
    double MagnitudeAfter,
    IReadOnlyList<Contribution> Contributions,
    bool Exact);

/// <summary>What one parameter contributed.</summary>
/// <param name="Parameter">Keyword, names joined by " with " for a coupled group, or the name of a block.</param>
/// <param name="Change">Old and new in words, such as "9000 to 6000 ms".</param>
/// <param name="Amount">Signed, in the table's unit.</param>
/// <param name="StandardError">Of a sampled amount; 0 for an exact one.</param>
public sealed record Contribution(string Parameter, string Change, double Amount, double StandardError);
