using ProtoLedger.Ledger.Audit;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Merkle;
using ProtoLedger.Ledger.Tests.Signatures;

namespace ProtoLedger.Ledger.Tests.Audit;

public sealed class AuditReplayTests
{
    private const string Origin = "linden.example/protoledger";
    private static readonly NoteSigner Log = NoteSigner.FromSeed(Origin, new byte[32]);

    [Fact]
    public void Run_HealthyStore_IsCleanAndSaysWhatItCannotKnow()
    {
        var report = new Store(20).Audit();
        Assert.True(report.Clean, report.First?.Words);
        Assert.Equal(20, report.Size);
        Assert.Equal(3, report.Holds.Count);
        Assert.Contains("cut off", Assert.Single(report.Unknown), StringComparison.Ordinal);
    }

    [Fact]
    public void Run_EveryLeafChangedDeletedDoubledOrSwapped_NamesThatLeafFirst()
    {
        const int size = 20;
        for (var i = 0; i < size; i++)
        {
            var n = i;
            Assert.Equal($"leaf {n}", Tampered(s => s.Leaves[n] = s.Leaves[n] with { Bytes = Leaf(n, "somebody.else") }).Record);
            Assert.Equal($"leaf {n}", Tampered(s => s.Leaves[n].Bytes[5] ^= 1).Record);
            Assert.Equal($"leaf {n}", Tampered(s => s.Leaves.RemoveAt(n)).Record);
            Assert.Equal($"leaf {n + 1}", Tampered(s => s.Leaves.Insert(n, s.Leaves[n])).Record);
            if (n > 0)
            {
                Assert.Equal($"leaf {n - 1}", Tampered(s => (s.Leaves[n - 1], s.Leaves[n]) = (s.Leaves[n], s.Leaves[n - 1])).Record);
                Assert.Equal($"leaf {n - 1}", Tampered(s => SwapContents(s.Leaves, n - 1, n)).Record);
            }
        }

        AuditFault Tampered(Action<Store> change)
        {
            var store = new Store(size);
            change(store);
            var report = store.Audit();
            Assert.False(report.Clean);
            return report.First!;
        }
    }

    [Fact]
    public void Run_EveryNodeChangedDeletedOrAdded_IsNamed()
    {
        for (var i = 0; i < new Store(20).Nodes.Count; i++)
        {
            var changed = new Store(20);
            var address = changed.Nodes[i].Address;
            var name = address.Level == 0 ? $"leaf {address.Index}" : $"node level {address.Level} index {address.Index}";
            changed.Nodes[i] = changed.Nodes[i] with { Hash = MerkleHash.Empty };
            Assert.Equal(name, changed.Audit().First!.Record);

            var deleted = new Store(20);
            deleted.Nodes.RemoveAt(i);
            Assert.Equal(name, deleted.Audit().First!.Record);
        }

        var added = new Store(20);
        added.Nodes.Add(new TreeNode(new NodeAddress(3, 2), MerkleHash.Empty));
        Assert.Equal("node level 3 index 2", added.Audit().First!.Record);
    }

    [Fact]
    public void Run_LeafAndAllItsNodesRewritten_IsFoundByTheNextCheckpoint()
    {
        var store = new Store(20);
        store.Rewrite(12, Leaf(12, "somebody.else"));
        var first = store.Audit().First!;
        Assert.Equal("checkpoint of 15 facts", first.Record);
        Assert.Contains("facts 10 to 14", first.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Run_CheckpointForgedOrOfAnotherKey_IsNamed()
    {
        var forged = new Store(20);
        forged.Checkpoints[1] = NoteSigner.FromSeed(Origin, Enumerable.Repeat((byte)9, 32).ToArray())
            .Sign(new Checkpoint(Origin, 10, MerkleHash.Empty)).ToBytes();
        Assert.Equal("checkpoint number 1", forged.Audit().First!.Record);

        var swapped = new Store(20);
        (swapped.Checkpoints[0], swapped.Checkpoints[1]) = (swapped.Checkpoints[1], swapped.Checkpoints[0]);
        Assert.Contains("follows one of 10", swapped.Audit().First!.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Run_EveryContentChangedDeletedOrAdded_IsNamed()
    {
        for (var i = 0; i < 20; i++)
        {
            var changed = new Store(20);
            changed.Blobs[i] = changed.Blobs[i] with { Content = "other"u8.ToArray() };
            Assert.Equal($"content {changed.Blobs[i].Hash}", changed.Audit().First!.Record);

            var deleted = new Store(20);
            deleted.Blobs.RemoveAt(i);
            Assert.Contains($"leaf {i} refers to it", deleted.Audit().First!.Detail, StringComparison.Ordinal);
        }

        var added = new Store(20);
        added.Blobs.Add(new StoredBlob(Digest.Of("x"u8), "x"u8.ToArray()));
        Assert.Contains("no leaf refers to it", added.Audit().First!.Detail, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    [InlineData(9)]
    public void Run_TailCutWithItsNodesAndCheckpoints_IsOnlyFoundWithAnOutsideCheckpoint(int cut)
    {
        var whole = new Store(20);
        var store = new Store(20 - cut);
        Assert.True(store.Audit().Clean);

        var fault = store.Audit(whole.Checkpoints[^1]).First!;
        Assert.Equal("your checkpoint", fault.Record);
        Assert.Contains("the end was cut off", fault.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Run_WholeLogMadeAnew_IsOnlyFoundWithAnOutsideCheckpoint()
    {
        var (honest, rewritten) = (new Store(20), new Store(20, "somebody.else"));
        Assert.True(rewritten.Audit().Clean);
        Assert.Contains("history was rewritten", rewritten.Audit(honest.Checkpoints[1]).First!.Detail, StringComparison.Ordinal);
        Assert.True(honest.Audit(honest.Checkpoints[1]).Clean);
    }

    [Fact]
    public void Run_ForkAfterARestoredBackup_IsAFault()
    {
        // Same size, other root: the restored copy went on differently after fact 15.
        var (first, second) = (new Store(20), new Store(20));
        second.Rewrite(17, Leaf(17, "after.restore"));
        second.Checkpoints[^1] = second.Sign(20);
        Assert.True(second.Audit().Clean);
        Assert.Contains("history was rewritten", second.Audit(first.Checkpoints[^1]).First!.Detail, StringComparison.Ordinal);
    }

    private static void SwapContents(List<StoredLeaf> leaves, int a, int b) =>
        (leaves[a], leaves[b]) = (leaves[a] with { Bytes = leaves[b].Bytes }, leaves[b] with { Bytes = leaves[a].Bytes });

    private static byte[] Blob(int i) => BitConverter.GetBytes(i);

    private static byte[] Leaf(int i, string actor = "t.okafor") =>
        new LedgerLeaf("version-recorded", 1, TestSite.Signing.AddSeconds(i), actor, $"protocol/p{i}",
            new Dictionary<string, Digest> { ["document"] = Digest.Of(Blob(i)) }).ToBytes();

    private sealed class Store
    {
        public Store(int size, string actor = "t.okafor")
        {
            for (var i = 0; i < size; i++)
            {
                Leaves.Add(new StoredLeaf(i, Leaf(i, actor)));
                Blobs.Add(new StoredBlob(Digest.Of(Blob(i)), Blob(i)));
            }

            Rebuild();
            for (var i = 5; i <= size; i += 5)
            {
                Checkpoints.Add(Sign(i));
            }
        }

        public List<StoredLeaf> Leaves { get; } = [];

        public List<TreeNode> Nodes { get; } = [];

        public List<byte[]> Checkpoints { get; } = [];

        public List<StoredBlob> Blobs { get; } = [];

        public AuditReport Audit(byte[]? outside = null) =>
            AuditReplay.Run(new AuditInput(Origin, [Log.PublicKey], Leaves, Nodes, Checkpoints, Blobs, outside));

        public void Rewrite(int index, byte[] leaf)
        {
            Leaves[index] = Leaves[index] with { Bytes = leaf };
            Rebuild();
        }

        public byte[] Sign(int size)
        {
            var tree = Leaves.Take(size).Aggregate(CompactRange.Empty, (t, l) => t.Append(MerkleHash.Leaf(l.Bytes)).Tree);
            return Log.Sign(new Checkpoint(Origin, size, tree.Root())).ToBytes();
        }

        private void Rebuild()
        {
            Nodes.Clear();
            var tree = CompactRange.Empty;
            foreach (var leaf in Leaves)
            {
                (tree, var created) = tree.Append(MerkleHash.Leaf(leaf.Bytes));
                Nodes.AddRange(created);
            }
        }
    }
}
