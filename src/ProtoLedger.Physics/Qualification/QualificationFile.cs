using System.Text.Json;

namespace ProtoLedger.Physics.Qualification;

/// <summary>A file of reference vectors: one family of sequences, cases with inputs, expected numbers and tolerances.</summary>
/// <param name="Family">Name of the family, such as <c>spin_echo</c>.</param>
/// <param name="Cases">The cases in the order of the file.</param>
public sealed record QualificationFile(string Family, IReadOnlyList<QualificationCase> Cases)
{
    /// <summary>Reads a file's text.</summary>
    /// <param name="json">UTF-16 text of the file.</param>
    /// <exception cref="FormatException">The text is not JSON or lacks a member; the message gives the JSON pointer.</exception>
    public static QualificationFile Read(string json) => QualificationReader.Read(json);
}

/// <summary>One case of a reference file.</summary>
/// <param name="Id">Name of the case.</param>
/// <param name="Inputs">Inputs under the names of the file.</param>
/// <param name="Question">Names of the numbers asked for, in order.</param>
/// <param name="Expected">Expected numbers under those names; null where the file only asks.</param>
/// <param name="AbsoluteTolerance">Tolerance of every number; NaN where none is given.</param>
/// <param name="ToleranceByQuantity">Tolerances that override it, by name.</param>
public sealed record QualificationCase(
    string Id,
    JsonElement Inputs,
    IReadOnlyList<string> Question,
    IReadOnlyDictionary<string, IReadOnlyList<double>>? Expected,
    double AbsoluteTolerance,
    IReadOnlyDictionary<string, double> ToleranceByQuantity);
