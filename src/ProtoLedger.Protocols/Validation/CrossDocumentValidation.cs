using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Protocols.Validation;

/// <summary>Whether a document fits the others: what it refers to exists, and what refers to it still finds what it needs.</summary>
public static class CrossDocumentValidation
{
    /// <summary>All errors; empty when the document fits.</summary>
    /// <param name="document">The document, already valid by itself.</param>
    /// <param name="others">The current documents; a predecessor of <paramref name="document"/> among them is replaced.</param>
    /// <remarks>Other documents are looked at once the document itself fits. Errors of another document that this one would break carry the empty pointer and name that document.</remarks>
    public static IReadOnlyList<DocumentError> Validate(LedgerDocument document, DocumentSet others)
    {
        var after = others.With(document);
        if (Own(document, after) is { Count: > 0 } own)
            return own;
        var errors = new ErrorList();
        foreach (var dependent in Dependents(document, after))
        {
            var known = Own(dependent, others).ToHashSet();
            foreach (var error in Own(dependent, after).Where(error => !known.Contains(error)))
                errors.Add(
                    "", $"{DocumentKinds.Word(dependent.Kind)} {dependent.Id}", error.Limit,
                    $"This document would break {DocumentKinds.Word(dependent.Kind)} {dependent.Id} at {error.Pointer}: {error.Detail}");
        }

        return errors.All;
    }

    private static IReadOnlyList<DocumentError> Own(LedgerDocument document, DocumentSet set) => document switch
    {
        ProtocolDocument protocol => ProtocolReferences.Validate(protocol, set),
        ExpectationsDocument expectations => ExpectationReferences.Validate(expectations, set),
        _ => [],
    };

    private static IEnumerable<LedgerDocument> Dependents(LedgerDocument document, DocumentSet set) => document switch
    {
        ProtocolDocument => set.All<ExpectationsDocument>().Where(other => other.Protocol == document.Id),
        ScannerDocument => set.All<ProtocolDocument>().Where(other => other.Scanners.Contains(document.Id)).Concat<LedgerDocument>(
            set.All<ExpectationsDocument>().Where(other => ScannersOf(other, set).Contains(document.Id))),
        ConditionsDocument => set.All<ProtocolDocument>().Where(other => other.Conditions == document.Id).Concat<LedgerDocument>(
            set.All<ExpectationsDocument>().Where(other => set.Find<ProtocolDocument>(DocumentKind.Protocol, other.Protocol)?.Conditions == document.Id)),
        CatalogueDocument => set.All<ProtocolDocument>().Concat<LedgerDocument>(set.All<ExpectationsDocument>()),
        _ => [],
    };

    private static IReadOnlyList<string> ScannersOf(ExpectationsDocument expectations, DocumentSet set) =>
        set.Find<ProtocolDocument>(DocumentKind.Protocol, expectations.Protocol)?.Scanners ?? [];
}
