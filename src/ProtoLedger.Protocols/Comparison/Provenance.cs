using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>A version that gave a parameter its value.</summary>
/// <typeparam name="T">What the caller knows about the version.</typeparam>
/// <param name="Version">The version.</param>
/// <param name="Pointer">Where the parameter stands in that version.</param>
/// <param name="Value">The value that it set; null where it removed the parameter.</param>
public sealed record ProvenanceStep<T>(T Version, string Pointer, JsonNode? Value);

/// <summary>Which version gave a parameter its value.</summary>
public static class Provenance
{
    /// <summary>Every setting of a parameter, newest first; empty where the newest version has nothing at the pointer.</summary>
    /// <typeparam name="T">What the caller knows about a version.</typeparam>
    /// <param name="kind">Kind of the document.</param>
    /// <param name="versions">Versions with their canonical bytes, oldest first.</param>
    /// <param name="pointer">Where the parameter stands in the newest version; items are followed by identity into older ones.</param>
    public static IReadOnlyList<ProvenanceStep<T>> Trace<T>(
        DocumentKind kind, IReadOnlyList<(T Version, byte[] CanonicalBytes)> versions, string pointer)
    {
        var trees = versions.Select(version => StrictJson.Parse(version.CanonicalBytes)).ToArray();
        if (trees.Length == 0 || !JsonPointer.TryFind(trees[^1], pointer, out _))
            return [];
        var path = StablePath.Of(DocumentShapes.Of(kind), trees[^1], pointer);
        var steps = new List<ProvenanceStep<T>>();
        JsonNode? earlier = null;
        var earlierPointer = pointer;
        for (var i = 0; i < trees.Length; i++)
        {
            var (place, value) = StablePath.Find(DocumentShapes.Of(kind), trees[i], path) ?? (earlierPointer, null);
            if (!JsonNode.DeepEquals(earlier, value))
                steps.Insert(0, new ProvenanceStep<T>(versions[i].Version, place, value?.DeepClone()));
            (earlier, earlierPointer) = (value, place);
        }

        return steps;
    }
}
