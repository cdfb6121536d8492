using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Validation;

/// <summary>Collects errors, with values in the form of canonical JSON.</summary>
internal sealed class ErrorList
{
    private readonly List<DocumentError> errors = [];

    public IReadOnlyList<DocumentError> All => errors;

    public void Add(string pointer, double value, string? limit, string detail) => Add(pointer, ShownValue.Of(value), limit, detail);

    public void Add(string pointer, string? value, string? limit, string detail) => errors.Add(new DocumentError(pointer, value, limit, detail));

    public void AddAll(IEnumerable<DocumentError> found) => errors.AddRange(found);

    /// <summary>Refuses a range whose ends are the wrong way round.</summary>
    public void RequireOrder(string pointer, double low, double high, string unit)
    {
        if (high < low)
            Add(pointer + "/high", high, $"≥ {ShownValue.Of(low)} {unit}".TrimEnd(), "The high end of the range lies below its low end.");
    }
}
