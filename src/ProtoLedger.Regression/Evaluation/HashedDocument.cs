using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Regression.Evaluation;

/// <summary>A document together with the identity of its canonical bytes.</summary>
/// <typeparam name="T">Kind of document.</typeparam>
/// <param name="Document">The parsed and validated document.</param>
/// <param name="Sha256">SHA-256 of its RFC 8785 canonical bytes, lower-case hexadecimal.</param>
public sealed record HashedDocument<T>(T Document, string Sha256)
    where T : LedgerDocument;
