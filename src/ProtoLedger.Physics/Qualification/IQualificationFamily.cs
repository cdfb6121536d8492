namespace ProtoLedger.Physics.Qualification;

/// <summary>Computes the numbers of one family's cases. One small class a family; <see cref="Qualifier"/> lists them.</summary>
internal interface IQualificationFamily
{
    /// <summary>Name as in the reference files, such as <c>spin_echo</c>.</summary>
    string Name { get; }

    /// <summary>Computes the numbers of a case.</summary>
    /// <param name="inputs">The inputs, read by name.</param>
    /// <param name="question">Names of the numbers that are asked for.</param>
    /// <returns>At least the names asked for; a list for a name whose value is a list, otherwise one number.</returns>
    /// <exception cref="ArgumentException">An input is missing or out of range.</exception>
    IReadOnlyDictionary<string, ComputedQuantity> Compute(CaseInputs inputs, IReadOnlyList<string> question);
}

/// <summary>A computed number, or a list of numbers.</summary>
/// <param name="Values">The numbers.</param>
/// <param name="IsList">Whether it is written as a list.</param>
internal sealed record ComputedQuantity(IReadOnlyList<double> Values, bool IsList)
{
    public static implicit operator ComputedQuantity(double value) => new([value], false);

    public static implicit operator ComputedQuantity(double[] values) => new(values, true);
}
