using System.Text.Json.Nodes;

namespace ProtoLedger.Protocols.Comparison;

/// <summary>Two documents laid over each other: any subset of their differences can be taken from the new one.</summary>
internal abstract record Merge
{
    /// <summary>The tree with the chosen differences; null where nothing stands here.</summary>
    public abstract JsonNode? Build(Func<int, bool> takeNew);
}

/// <summary>The same in both.</summary>
internal sealed record SameMerge(JsonNode Value) : Merge
{
    public override JsonNode Build(Func<int, bool> takeNew) => Value.DeepClone();
}

/// <summary>One difference: either the old value or the new one, null for its absence.</summary>
internal sealed record LeafMerge(int Index, JsonNode? Old, JsonNode? New) : Merge
{
    public override JsonNode? Build(Func<int, bool> takeNew) => (takeNew(Index) ? New : Old)?.DeepClone();
}

/// <summary>Members compared one by one.</summary>
internal sealed record ObjectMerge(IReadOnlyList<(string Name, Merge Value)> Members) : Merge
{
    public override JsonNode Build(Func<int, bool> takeNew)
    {
        var built = new JsonObject();
        foreach (var (name, value) in Members)
            if (value.Build(takeNew) is { } node)
                built.Add(name, node);
        return built;
    }
}

/// <summary>Items followed by identity.</summary>
/// <param name="OldOrder">All items of both, in the order of the old list.</param>
/// <param name="NewOrder">All items of both, in the order of the new list.</param>
/// <param name="Reordered">Index of the difference that is the order itself, or null.</param>
internal sealed record ListMerge(IReadOnlyList<Merge> OldOrder, IReadOnlyList<Merge> NewOrder, int? Reordered) : Merge
{
    public override JsonNode Build(Func<int, bool> takeNew)
    {
        var order = Reordered is { } index && !takeNew(index) ? OldOrder : NewOrder;
        return new JsonArray([.. order.Select(item => item.Build(takeNew)).OfType<JsonNode>()]);
    }
}
