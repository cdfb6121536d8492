namespace ProtoLedger.Physics.Qualification;

/// <summary>What the engine computed for one reference file.</summary>
/// <param name="Family">Name of the family.</param>
/// <param name="IsBuilt">False where the engine has no such family; <paramref name="Cases"/> is then empty.</param>
/// <param name="ModelId">The model that computed.</param>
/// <param name="Cases">Case by case.</param>
public sealed record QualificationReport(string Family, bool IsBuilt, string ModelId, IReadOnlyList<QualificationCaseResult> Cases)
{
    /// <summary>Whether every number of every case with expectations lies within tolerance, and nothing failed.</summary>
    public bool Passed => IsBuilt && Cases.All(c => c.Error is null && c.Quantities.All(q => q.Verdict is not QuantityVerdict.Outside));
}

/// <summary>What the engine computed for one case.</summary>
/// <param name="Id">Name of the case.</param>
/// <param name="Quantities">Computed numbers in the order of the file.</param>
/// <param name="Error">Why the case could not be computed, or null.</param>
public sealed record QualificationCaseResult(string Id, IReadOnlyList<QualificationQuantity> Quantities, string? Error);

/// <summary>One computed quantity of a case: a number or a list of numbers.</summary>
/// <param name="Name">Name as in the file.</param>
/// <param name="Computed">The numbers; one for a plain number.</param>
/// <param name="IsList">Whether the file has a list under this name.</param>
/// <param name="Deviation">Largest absolute deviation from the expected numbers; null where none are given.</param>
/// <param name="Tolerance">Its limit; null where none is given.</param>
/// <param name="Verdict">The verdict.</param>
public sealed record QualificationQuantity(
    string Name, IReadOnlyList<double> Computed, bool IsList, double? Deviation, double? Tolerance, QuantityVerdict Verdict);

/// <summary>Verdict on one quantity.</summary>
public enum QuantityVerdict
{
    /// <summary>The file only asks.</summary>
    Asked,

    /// <summary>Within tolerance.</summary>
    Within,

    /// <summary>Outside tolerance, or another number of values.</summary>
    Outside,
}
