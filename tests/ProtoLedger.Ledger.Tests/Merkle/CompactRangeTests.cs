using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Ledger.Tests.Merkle;

public sealed class CompactRangeTests
{
    /// <summary>
    /// Leaves and roots of the vectors that Certificate Transparency implementations share (for example the Merkle tree
    /// tests of the open-source log implementations). Written from memory; the recursive reference confirms them.
    /// </summary>
    private static readonly string[] SharedLeaves =
    [
        "", "00", "10", "2021", "3031", "40414243", "5051525354555657", "606162636465666768696a6b6c6d6e6f",
    ];

    private static readonly string[] SharedRoots =
    [
        "6e340b9cffb37a989ca544e6bb780a2c78901d3fb33738768511a30617afa01d",
        "fac54203e7cc696cf0dfcb42c92a1d9dbaf70ad9e621f4bd8d98662f00e3c125",
        "aeb6bcfe274b70a14fb067a5e5578264db0fa9b51af5e0ba159158f329e06e77",
        "d37ee418976dd95753c1c73862b9398fa2a2cf9b4ff0fdfe8b30cd95209614b7",
        "4e3bbb1f7b478dcfe71fb631631519a3bca12c9aefca1612bfce4c13a86264d4",
        "76e67dadbcdf1e10e1b74ddc608abd2f98dfb16fbce75277b5232a127f2087ef",
        "ddb89be403809e325750d3d263cd78929c2942b7942a34b77e122c9594a74c8c",
        "5dc9da79a70659a9ad559cb701ded9a2ab9d823aad2f4960cfe370eff4604328",
    ];

    [Fact]
    public void Empty_Root_IsTheHashOfNothing()
    {
        // RFC 9162 section 2.1.1: MTH({}) = HASH(). FIPS 180-4: SHA-256 of the empty string.
        Assert.Equal("e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855", CompactRange.Empty.Root().ToString());
    }

    [Fact]
    public void Root_OfTheSharedVectors_IsAsPublished()
    {
        var tree = CompactRange.Empty;
        foreach (var (leaf, root) in SharedLeaves.Zip(SharedRoots))
        {
            tree = tree.Append(MerkleHash.Leaf(Convert.FromHexString(leaf))).Tree;
            Assert.Equal(root, tree.Root().ToString());
        }
    }

    [Fact]
    public void Root_OfEverySizeTo130_EqualsTheRecursiveReference()
    {
        var (tree, leaves) = (CompactRange.Empty, new List<byte[]>());
        for (var size = 0; size <= 130; size++)
        {
            Assert.Equal(ReferenceTree.Root(leaves), tree.Root().ToArray());
            leaves.Add(BitConverter.GetBytes(size * 7919));
            tree = tree.Append(MerkleHash.Leaf(leaves[^1])).Tree;
        }
    }

    [Fact]
    public void Append_AtAMillionLeaves_CostsAtMostLogarithmicallyManyHashes()
    {
        const int size = 1_000_000;
        long total = 0;
        var worst = 0L;
        var tree = CompactRange.EmptyWith((left, right) =>
        {
            total++;
            return MerkleHash.Node(left, right);
        });
        for (var i = 0; i < size; i++)
        {
            var before = total;
            tree = tree.Append(MerkleHash.Leaf(BitConverter.GetBytes(i))).Tree;
            worst = Math.Max(worst, total - before);
        }

        // Each inner node of the complete subtrees is made once: size minus the number of 1 bits (7 in 1,000,000).
        Assert.Equal(size - 7, total);
        Assert.True(worst <= 20, $"one append took {worst} inner hashes, log2(10^6) is 19.9");
        var appends = total;
        tree.Root();
        Assert.Equal(6, total - appends);
    }

    [Fact]
    public void Restore_FromTheEdge_GoesOnWithTheSameRootsAndNodes()
    {
        var tree = CompactRange.Empty;
        for (var i = 0; i < 300; i++)
        {
            var leaf = MerkleHash.Leaf(BitConverter.GetBytes(i));
            var restored = CompactRange.Restore(tree.Size, tree.Edge).Append(leaf);
            var grown = tree.Append(leaf);
            Assert.Equal(grown.Tree.Root(), restored.Tree.Root());
            Assert.Equal(grown.NewNodes, restored.NewNodes);
            tree = grown.Tree;
        }
    }

    [Fact]
    public void Restore_WithAWrongNumberOfHashes_IsMisuse()
    {
        var fault = Assert.Throws<ArgumentException>(() => CompactRange.Restore(5, [MerkleHash.Empty]));
        Assert.Contains("2 edge hashes, not 1", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void EdgeOf_NamesTheNodesThatTheEdgeHolds()
    {
        var (tree, nodes) = (CompactRange.Empty, new StoredNodes());
        for (var i = 0; i < 200; i++)
        {
            (tree, var created) = tree.Append(MerkleHash.Leaf(BitConverter.GetBytes(i)));
            foreach (var node in created)
            {
                nodes.Add(node);
            }

            Assert.Equal(tree.Edge, CompactRange.EdgeOf(tree.Size).Select(nodes.Hash));
        }
    }
}
