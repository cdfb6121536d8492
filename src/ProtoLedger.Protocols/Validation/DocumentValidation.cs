using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Validation;

/// <summary>What one document can be held to by itself, beyond the form: physics, order of ranges, references within it.</summary>
internal static class DocumentValidation
{
    /// <summary>All errors of a document; empty when it is possible.</summary>
    /// <param name="document">The document.</param>
    /// <param name="tree">The tree from which it was read.</param>
    public static IReadOnlyList<DocumentError> Validate(LedgerDocument document, JsonNode tree) => document switch
    {
        ProtocolDocument protocol => ProtocolValidation.Validate(protocol, tree),
        ScannerDocument scanner => ScannerValidation.Validate(scanner),
        ConditionsDocument conditions => ConditionsValidation.Validate(conditions),
        CatalogueDocument catalogue => CatalogueValidation.Validate(catalogue),
        ExpectationsDocument expectations => ExpectationsValidation.Validate(expectations),
        _ => throw new ArgumentException($"No validation for {document.GetType().Name}.", nameof(document)),
    };
}
