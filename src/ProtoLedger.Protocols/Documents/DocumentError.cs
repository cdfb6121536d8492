namespace ProtoLedger.Protocols.Documents;

/// <summary>One thing that is wrong with a document.</summary>
/// <param name="Pointer">JSON pointer (RFC 6901) of the field; empty for the whole document.</param>
/// <param name="Value">The offending value as JSON text, shortened; null where the field is missing.</param>
/// <param name="Limit">What is allowed, with the unit, such as "0 &lt; value ≤ 60000 ms"; null where no limit speaks.</param>
/// <param name="Detail">One sentence: what is wrong and why.</param>
/// <param name="Line">Line in a YAML text, from 1; null for JSON.</param>
/// <param name="Column">Column in a YAML text, from 1; null for JSON.</param>
public sealed record DocumentError(
    string Pointer, string? Value, string? Limit, string Detail, int? Line = null, int? Column = null);
