namespace ProtoLedger.Protocols.Documents;

/// <summary>What mapping documents onto the acquisition model gives: the value, or why there is none.</summary>
/// <typeparam name="T">Type of the value.</typeparam>
public abstract record MappingResult<T>
{
    private MappingResult()
    {
    }

    /// <summary>The value.</summary>
    /// <param name="Value">Complete: nothing is left to resolve.</param>
    public sealed record Mapped(T Value) : MappingResult<T>;

    /// <summary>There is none.</summary>
    /// <param name="Errors">At least one.</param>
    public sealed record Refused(IReadOnlyList<DocumentError> Errors) : MappingResult<T>;

    /// <summary>The value of a mapping that was validated before.</summary>
    /// <exception cref="InvalidOperationException">There is none; the message holds every error.</exception>
    public T Require() => this switch
    {
        Mapped(var value) => value,
        Refused(var errors) => throw new InvalidOperationException(
            string.Join(" ", errors.Select(error => $"{error.Pointer}: {error.Detail}"))),
        _ => throw new InvalidOperationException(GetType().Name),
    };
}
