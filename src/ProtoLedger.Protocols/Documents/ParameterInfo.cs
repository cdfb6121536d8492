namespace ProtoLedger.Protocols.Documents;

/// <summary>What is known about one parameter of a document.</summary>
/// <param name="Name">Key in the document: the DICOM keyword where one exists.</param>
/// <param name="Label">In trade words.</param>
/// <param name="Unit">Unit, or null for none.</param>
/// <param name="Keyword">DICOM keyword, or null where none exists.</param>
/// <param name="Tag">DICOM tag, such as (0018,0080), or null.</param>
/// <param name="Low">Lowest value that the format allows, or null where it is no number.</param>
/// <param name="High">Highest value, or null.</param>
/// <param name="Whole">True for whole numbers.</param>
/// <param name="Words">Allowed words, or empty where it is no choice.</param>
public sealed record ParameterInfo(
    string Name,
    string Label,
    string? Unit,
    string? Keyword,
    string? Tag,
    double? Low,
    double? High,
    bool Whole,
    IReadOnlyList<string> Words)
{
    /// <summary>True for a number.</summary>
    public bool IsNumber => Low is not null;
}
