using System.Text.Json.Nodes;
using ProtoLedger.Protocols.Canonical;
using ProtoLedger.Protocols.Formats.V1.Shapes;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>Walks two documents of one shape together and notes every difference once.</summary>
internal sealed class MergeBuilder
{
    private readonly List<ParameterChange> changes = [];

    public IReadOnlyList<ParameterChange> Changes => changes;

    public Merge Walk(JsonNode? old, JsonNode? @new, Shape shape, Place place)
    {
        if (old is not null && @new is not null && JsonNode.DeepEquals(old, @new))
            return new SameMerge(old);
        return (old, @new, shape) switch
        {
            (JsonObject before, JsonObject after, ObjectShape block) => WalkObject(before, after, block, place),
            (JsonObject before, JsonObject after, MapShape map) => WalkMap(before, after, map, place),
            (JsonObject before, JsonObject after, VariantShape variant) when SameKind(before, after) is { } kind && variant.Find(kind) is { } option =>
                WalkObject(before, after, option, place),
            (JsonObject before, JsonObject after, NameOrObjectShape either) => Walk(before, after, either.Object, place),
            (JsonArray before, JsonArray after, ListShape { Identity.Count: > 0 } list) => WalkList(before, after, list, place),
            _ => Leaf(old, @new, shape, place),
        };
    }

    private ObjectMerge WalkObject(JsonObject old, JsonObject @new, ObjectShape shape, Place place) => new(
        [.. shape.Members
            .Where(member => old.ContainsKey(member.Name) || @new.ContainsKey(member.Name))
            .Select(member => (member.Name, Walk(old[member.Name], @new[member.Name], member.Shape, place.Into(member))))]);

    private ObjectMerge WalkMap(JsonObject old, JsonObject @new, MapShape shape, Place place) => new(
        [.. old.Select(member => member.Key).Union(@new.Select(member => member.Key)).Order(StringComparer.Ordinal)
            .Select(name => (name, Walk(old[name], @new[name], shape.Value, place.IntoKey(name))))]);

    private ListMerge WalkList(JsonArray old, JsonArray @new, ListShape shape, Place place)
    {
        var (oldNames, newNames) = (ItemIdentity.OfAll(old, shape), ItemIdentity.OfAll(@new, shape));
        var common = newNames.Where(oldNames.Contains).ToArray();
        int? reordered = null;
        if (!common.SequenceEqual(oldNames.Where(newNames.Contains)))
            reordered = Note(ChangeKind.Reordered, Names(oldNames), Names(newNames), shape, place with { Label = "order of " + place.Label });
        var newOrder = Interleave(newNames, oldNames);
        var merges = newOrder.ToDictionary(name => name, name =>
        {
            var (i, j) = (IndexOf(oldNames, name), IndexOf(newNames, name));
            var (before, after) = (i < 0 ? null : old[i], j < 0 ? null : @new[j]);
            return Walk(before, after, shape.Item, place.IntoItem(i, j, after ?? before!, Ordinal(name, newOrder)));
        });
        var oldOrder = reordered is null ? newOrder : Interleave(oldNames, newNames);
        return new ListMerge([.. oldOrder.Select(name => merges[name])], [.. newOrder.Select(name => merges[name])], reordered);
    }

    /// <summary>Number of an item among those of equal identity, from 1; null where it is alone.</summary>
    private static int? Ordinal(string name, List<string> all)
    {
        var mark = name.LastIndexOf('#');
        var identity = mark < 0 ? name : name[..mark];
        return mark < 0 && !all.Contains(identity + "#1")
            ? null
            : mark < 0 ? 1 : int.Parse(name.AsSpan(mark + 1), System.Globalization.CultureInfo.InvariantCulture) + 1;
    }

    /// <summary>All of the leading list in its order, the others after the neighbour that precedes them in theirs.</summary>
    private static List<string> Interleave(IReadOnlyList<string> leading, IReadOnlyList<string> others)
    {
        var order = leading.ToList();
        var after = -1;
        foreach (var name in others)
        {
            var at = order.IndexOf(name);
            if (at >= 0)
                after = at;
            else
                order.Insert(++after, name);
        }

        return order;
    }

    private LeafMerge Leaf(JsonNode? old, JsonNode? @new, Shape shape, Place place)
    {
        var kind = old is null ? ChangeKind.Added : @new is null ? ChangeKind.Removed : ChangeKind.Set;
        return new LeafMerge(Note(kind, old, @new, shape, place), old, @new);
    }

    private int Note(ChangeKind kind, JsonNode? old, JsonNode? @new, Shape shape, Place place)
    {
        var number = shape as NumberShape ?? (shape as ListShape)?.Item as NumberShape;
        changes.Add(new ParameterChange(
            changes.Count,
            kind,
            kind == ChangeKind.Removed ? place.OldPointer : place.NewPointer,
            kind == ChangeKind.Added ? null : place.OldPointer,
            place.Name,
            place.FullLabel,
            number is { Unit.Length: > 0 } ? number.Unit : null,
            place.Keyword,
            place.SeriesId,
            place.SeriesTitle,
            old?.DeepClone(),
            @new?.DeepClone()));
        return changes.Count - 1;
    }

    private static string? SameKind(JsonObject old, JsonObject @new) =>
        ShapeCheck.KindOf(old["kind"]) is { } kind && kind == ShapeCheck.KindOf(@new["kind"]) ? kind : null;

    private static JsonArray Names(IEnumerable<string> names) => new([.. names.Select(name => (JsonNode)JsonValue.Create(name))]);

    private static int IndexOf(IReadOnlyList<string> names, string name)
    {
        for (var i = 0; i < names.Count; i++)
            if (names[i] == name)
                return i;
        return -1;
    }
}
