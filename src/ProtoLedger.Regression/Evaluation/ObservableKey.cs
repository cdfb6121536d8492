namespace ProtoLedger.Regression.Evaluation;

/// <summary>Names one predicted number of a protocol version on a scanner.</summary>
/// <param name="Series">Series identifier.</param>
/// <param name="Observable">Observable name, such as <c>residualRatio</c>.</param>
/// <param name="Tissue">Catalogue name, or null where the observable needs none.</param>
/// <param name="Reference">Catalogue name of the second tissue, or null.</param>
/// <param name="Condition">Condition name, or <see cref="NominalCondition"/>.</param>
/// <param name="Extreme">Which extreme over the condition's ranges the number is.</param>
/// <remarks>Text form: <c>series/observable(tissue,reference)@condition</c>, with <c>^</c> after the condition for the highest value over its ranges and <c>_</c> for the lowest.</remarks>
public sealed record ObservableKey(
    string Series,
    string Observable,
    string? Tissue,
    string? Reference,
    string Condition,
    RangeExtreme Extreme = RangeExtreme.None) : IComparable<ObservableKey>
{
    /// <summary>The condition of B1+ scale 1 on resonance without inflow.</summary>
    public const string NominalCondition = "nominal";

    /// <inheritdoc/>
    public override string ToString()
    {
        var tissues = Tissue is null ? "" : Reference is null ? $"({Tissue})" : $"({Tissue},{Reference})";
        var extreme = Extreme switch { RangeExtreme.Highest => "^", RangeExtreme.Lowest => "_", _ => "" };
        return $"{Series}/{Observable}{tissues}@{Condition}{extreme}";
    }

    /// <summary>Reads the text form.</summary>
    /// <exception cref="FormatException">The text is none.</exception>
    public static ObservableKey Parse(string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        var slash = text.IndexOf('/', StringComparison.Ordinal);
        var at = text.LastIndexOf('@');
        if (slash <= 0 || at < slash + 2 || at == text.Length - 1)
            throw new FormatException($"\"{text}\" is no observable; the form is series/observable(tissue,reference)@condition.");
        var (condition, extreme) = text[^1] switch
        {
            '^' => (text[(at + 1)..^1], RangeExtreme.Highest),
            '_' => (text[(at + 1)..^1], RangeExtreme.Lowest),
            _ => (text[(at + 1)..], RangeExtreme.None),
        };
        var body = text[(slash + 1)..at];
        var open = body.IndexOf('(', StringComparison.Ordinal);
        if (open < 0)
            return new(text[..slash], body, null, null, condition, extreme);
        var tissues = body[(open + 1)..].TrimEnd(')').Split(',');
        return new(text[..slash], body[..open], tissues[0], tissues.Length > 1 ? tissues[1] : null, condition, extreme);
    }

    /// <inheritdoc/>
    public int CompareTo(ObservableKey? other) => string.CompareOrdinal(ToString(), other?.ToString());

    /// <inheritdoc/>
    public static bool operator <(ObservableKey left, ObservableKey right) => string.CompareOrdinal(left?.ToString(), right?.ToString()) < 0;

    /// <inheritdoc/>
    public static bool operator >(ObservableKey left, ObservableKey right) => right < left;

    /// <inheritdoc/>
    public static bool operator <=(ObservableKey left, ObservableKey right) => !(right < left);

    /// <inheritdoc/>
    public static bool operator >=(ObservableKey left, ObservableKey right) => !(left < right);
}

/// <summary>Which extreme over the ranges of a condition a number is.</summary>
public enum RangeExtreme
{
    /// <summary>The number stands at one point.</summary>
    None,

    /// <summary>The lowest over the corners and the centre of the ranges.</summary>
    Lowest,

    /// <summary>The highest over the corners and the centre of the ranges.</summary>
    Highest,
}
