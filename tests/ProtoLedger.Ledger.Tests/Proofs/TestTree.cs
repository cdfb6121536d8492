using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Ledger.Tests.Proofs;

/// <summary>A tree of small leaves with its stored nodes and the root of every size.</summary>
internal sealed class TestTree : ITreeNodes
{
    private readonly StoredNodes nodes = new();

    public TestTree(int size)
    {
        var tree = CompactRange.Empty;
        Roots.Add(tree.Root());
        for (var i = 0; i < size; i++)
        {
            Leaves.Add(BitConverter.GetBytes(i * 31 + 5));
            LeafHashes.Add(MerkleHash.Leaf(Leaves[^1]));
            (tree, var created) = tree.Append(LeafHashes[^1]);
            foreach (var node in created)
            {
                nodes.Add(node);
            }

            Roots.Add(tree.Root());
        }
    }

    public List<byte[]> Leaves { get; } = [];

    public List<Digest> LeafHashes { get; } = [];

    public List<Digest> Roots { get; } = [];

    public List<NodeAddress> Read { get; } = [];

    public Digest Hash(NodeAddress address)
    {
        Read.Add(address);
        return nodes.Hash(address);
    }
}
