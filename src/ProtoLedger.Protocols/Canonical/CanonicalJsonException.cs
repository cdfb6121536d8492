namespace ProtoLedger.Protocols.Canonical;

/// <summary>JSON that has no canonical form here: malformed, too deep, too large, or holding what a document may not hold.</summary>
/// <param name="pointer">JSON pointer (RFC 6901) of the place; empty for the whole.</param>
/// <param name="detail">What is wrong, with the limit.</param>
public sealed class CanonicalJsonException(string pointer, string detail)
    : FormatException(pointer.Length == 0 ? detail : $"{pointer}: {detail}")
{
    /// <summary>JSON pointer of the place; empty for the whole.</summary>
    public string Pointer { get; } = pointer;

    /// <summary>What is wrong, with the limit.</summary>
    public string Detail { get; } = detail;
}
