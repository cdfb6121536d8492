using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>What differs between two versions of a document. Series, tissues and other items are followed by identity, preparations by kind and order.</summary>
public sealed class DocumentDifference
{
    private readonly Merge merge;

    private DocumentDifference(DocumentKind kind, Merge merge, IReadOnlyList<ParameterChange> changes) =>
        (Kind, this.merge, Changes) = (kind, merge, changes);

    /// <summary>Kind of both documents.</summary>
    public DocumentKind Kind { get; }

    /// <summary>All differences, in the order of the document; a block added or removed as a whole is one.</summary>
    public IReadOnlyList<ParameterChange> Changes { get; }

    /// <summary>Compares two documents of one kind.</summary>
    /// <param name="old">Canonical bytes of a document that was read before.</param>
    /// <param name="new">Canonical bytes of a document that was read before.</param>
    /// <exception cref="ArgumentException">The kinds differ, or bytes are no document.</exception>
    public static DocumentDifference Between(ReadOnlySpan<byte> old, ReadOnlySpan<byte> @new)
    {
        var (before, after) = (StrictJson.Parse(old), StrictJson.Parse(@new));
        if (!DocumentKinds.TryParse(ShapeCheck.KindOf(before?["kind"]), out var kind)
            || !DocumentKinds.TryParse(ShapeCheck.KindOf(after?["kind"]), out var other)
            || kind != other)
            throw new ArgumentException("Two documents of one kind are needed for a comparison.");
        var builder = new MergeBuilder();
        return new DocumentDifference(kind, builder.Walk(before, after, DocumentShapes.Of(kind), Place.Root), builder.Changes);
    }

    /// <summary>The old document with some of the differences taken over from the new one.</summary>
    /// <param name="taken">Indices of <see cref="Changes"/> to take; none gives the old document, all give the new one.</param>
    /// <returns>The document, or why these differences are not valid apart from the others.</returns>
    public ParseResult Hybrid(IReadOnlySet<int> taken) => DocumentReader.ReadTree(merge.Build(taken.Contains), Kind);
}
