namespace ProtoLedger.Ledger.Merkle;

/// <summary>Nodes in memory, by address.</summary>
public sealed class StoredNodes : ITreeNodes
{
    private readonly Dictionary<NodeAddress, Digest> hashes = [];

    /// <summary>An empty set.</summary>
    public StoredNodes()
    {
    }

    /// <summary>The given nodes.</summary>
    public StoredNodes(IEnumerable<TreeNode> nodes)
    {
        ArgumentNullException.ThrowIfNull(nodes);
        foreach (var node in nodes)
        {
            Add(node);
        }
    }

    /// <summary>Adds or replaces one node.</summary>
    public void Add(TreeNode node) => hashes[node.Address] = node.Hash;

    /// <inheritdoc/>
    public Digest Hash(NodeAddress address) =>
        hashes.TryGetValue(address, out var hash)
            ? hash
            : throw new KeyNotFoundException($"No node at level {address.Level}, index {address.Index}.");
}
