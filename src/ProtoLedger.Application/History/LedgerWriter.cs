using System.Text.Json.Nodes;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Site;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Merkle;
using ProtoLedger.Protocols.Canonical;

namespace ProtoLedger.Application.History;

/// <summary>Appends facts to the ledger, inside the transaction of the fact itself.</summary>
public sealed class LedgerWriter
{
    private readonly SiteKeys keys;

    /// <summary>Signs checkpoints with the site's key.</summary>
    /// <param name="keys">The keys.</param>
    public LedgerWriter(SiteKeys keys) => this.keys = keys;

    /// <summary>Appends leaves in order, stores their blobs and signs one checkpoint over all.</summary>
    /// <param name="command">The running command.</param>
    /// <param name="facts">At least one.</param>
    internal async Task AppendAsync(Command command, params IReadOnlyList<Fact> facts)
    {
        var (ledger, cancellation) = (command.Stores.Ledger, command.Cancellation);
        var site = await keys.OpenAsync(command.Stores, cancellation);
        var size = await ledger.LockAsync(cancellation);
        var addresses = CompactRange.EdgeOf(size).Select(node => (node.Level, node.Index)).ToList();
        var tree = CompactRange.Restore(size, [.. (await ledger.NodesAsync(addresses, cancellation)).Select(hash => new Digest(hash))]);
        foreach (var fact in facts)
        {
            var blobs = new Dictionary<string, Digest>(StringComparer.Ordinal);
            foreach (var (name, bytes) in fact.AllBlobs())
                blobs.Add(name, new Digest(await ledger.AddBlobAsync(bytes, cancellation)));
            var leaf = new LedgerLeaf(fact.Type, 1, new DateTimeOffset(command.Now), command.Actor.Name, fact.Subject, blobs);
            var bytesOfLeaf = leaf.ToBytes();
            var hash = MerkleHash.Leaf(bytesOfLeaf);
            await ledger.AddLeafAsync(new LeafRow(tree.Size, bytesOfLeaf, hash.ToArray()), cancellation);
            var growth = tree.Append(hash);
            await ledger.AddNodesAsync(
                [.. growth.NewNodes.Select(node => new NodeRow(node.Address.Level, node.Address.Index, node.Hash.ToArray()))], cancellation);
            tree = growth.Tree;
        }

        var checkpoint = new Checkpoint(site.Origin, tree.Size, tree.Root());
        var note = System.Text.Encoding.UTF8.GetString(site.Signer.Sign(checkpoint).ToBytes());
        await ledger.AddCheckpointAsync(new CheckpointRow(tree.Size, checkpoint.Root.ToArray(), note, command.Now), cancellation);
    }

    /// <summary>The checkpoint current now; the append lock is held from here to the end of the transaction.</summary>
    internal async Task<Checkpoint> CurrentAsync(Command command)
    {
        var site = await keys.OpenAsync(command.Stores, command.Cancellation);
        await command.Stores.Ledger.LockAsync(command.Cancellation);
        return await command.Stores.Ledger.NewestCheckpointAsync(command.Cancellation) is { } row
            ? new Checkpoint(site.Origin, row.Size, new Digest(row.Root))
            : new Checkpoint(site.Origin, 0, MerkleHash.Empty);
    }
}

/// <summary>A fact on its way into the ledger.</summary>
/// <param name="Type">Lower-case words joined by hyphens.</param>
/// <param name="Subject">What it is about.</param>
/// <param name="Values">Every value of the fact that the tables keep; stored as the blob <c>fact</c>.</param>
/// <param name="Blobs">Further contents by name.</param>
internal sealed record Fact(string Type, string Subject, JsonObject Values, params (string Name, byte[] Bytes)[] Blobs)
{
    /// <summary>The blobs with the fact itself.</summary>
    public IEnumerable<(string Name, byte[] Bytes)> AllBlobs() => [("fact", CanonicalJson.Serialize(Values)), .. Blobs];
}
