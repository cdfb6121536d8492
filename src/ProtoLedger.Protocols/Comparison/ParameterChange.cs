using System.Text.Json.Nodes;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>One difference between two versions of a document.</summary>
/// <param name="Index">Its number in the difference, from 0.</param>
/// <param name="Kind">Whether a value was set, or something was added or removed as a whole.</param>
/// <param name="Pointer">Where it stands in the new document; for <see cref="ChangeKind.Removed"/>, in the old one.</param>
/// <param name="OldPointer">Where it stood in the old document; null for <see cref="ChangeKind.Added"/>.</param>
/// <param name="Name">Key, such as <c>RepetitionTime</c>, by which a scanner's console wording is found.</param>
/// <param name="Label">In trade words, such as "inversion time" or "T1, mean, white matter at 3 T".</param>
/// <param name="Unit">Unit, or null for none.</param>
/// <param name="Keyword">DICOM keyword, or null.</param>
/// <param name="SeriesId">Series to which it belongs, or null.</param>
/// <param name="SeriesTitle">Title of that series, or null.</param>
/// <param name="Old">Old value; null for <see cref="ChangeKind.Added"/>.</param>
/// <param name="New">New value; null for <see cref="ChangeKind.Removed"/>.</param>
public sealed record ParameterChange(
    int Index,
    ChangeKind Kind,
    string Pointer,
    string? OldPointer,
    string Name,
    string Label,
    string? Unit,
    string? Keyword,
    string? SeriesId,
    string? SeriesTitle,
    JsonNode? Old,
    JsonNode? New);

/// <summary>What kind of difference it is.</summary>
public enum ChangeKind
{
    /// <summary>A value became another.</summary>
    Set,

    /// <summary>A value, block or item was added as a whole.</summary>
    Added,

    /// <summary>A value, block or item was removed as a whole.</summary>
    Removed,

    /// <summary>Items of a list stand in another order.</summary>
    Reordered,
}
