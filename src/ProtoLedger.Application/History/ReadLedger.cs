using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Site;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger;
using ProtoLedger.Ledger.Merkle;
using ProtoLedger.Ledger.Proofs;

namespace ProtoLedger.Application.History;

/// <summary>Reads the ledger: checkpoint, proofs, leaves, and the site's trust anchor.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="keys">The site's keys.</param>
/// <param name="clock">Clock, for revocation lists.</param>
public sealed class ReadLedger(Commands commands, SiteKeys keys, TimeProvider clock)
{
    private const int MostLeaves = 1000;
    private static readonly CommandKind Kind = new("read-ledger", Rule);
    private static readonly CommandKind Anchor = new("read-trust-anchor", AnchorRule);

    /// <summary>Who may read the ledger.</summary>
    public static RoleRule Rule => RoleRule.SignedIn;

    /// <summary>Who may read the trust anchor.</summary>
    public static RoleRule AnchorRule => RoleRule.Anyone;

    /// <summary>The newest checkpoint, a signed note.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<CheckpointRow>> CheckpointAsync(Caller caller, CancellationToken cancellationToken) =>
        commands.ReadAsync<CheckpointRow>(
            caller,
            Kind,
            "ledger",
            async stores => await stores.Ledger.NewestCheckpointAsync(cancellationToken) is { } row ? row : new NotFound("The ledger is empty."),
            cancellationToken);

    /// <summary>Proof that a leaf is in the tree of a size, with the leaf.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="index">Leaf, from 0.</param>
    /// <param name="size">Leaves of the tree; null for all.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<LeafProof>> InclusionAsync(Caller caller, long index, long? size, CancellationToken cancellationToken) =>
        commands.ReadAsync<LeafProof>(
            caller,
            Kind,
            "ledger",
            async stores =>
            {
                var all = await stores.Ledger.SizeAsync(cancellationToken);
                var tree = size ?? all;
                if (tree < 1 || tree > all)
                    return Range("/size", tree, 1, all, "leaves");
                if (index < 0 || index >= tree)
                    return Range("/index", index, 0, tree - 1, "leaf numbers");
                var nodes = await NodesAsync(stores, InclusionProof.Needs(index, tree), cancellationToken);
                var leaf = (await stores.Ledger.LeavesAsync(index, 1, cancellationToken))[0];
                return new LeafProof(InclusionProof.Build(index, tree, nodes), leaf.Bytes);
            },
            cancellationToken);

    /// <summary>Proof that a smaller tree is the beginning of a larger one.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="from">Leaves of the smaller tree, ≥ 1.</param>
    /// <param name="to">Leaves of the larger tree; null for all.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<ConsistencyProof>> ConsistencyAsync(Caller caller, long from, long? to, CancellationToken cancellationToken) =>
        commands.ReadAsync<ConsistencyProof>(
            caller,
            Kind,
            "ledger",
            async stores =>
            {
                var all = await stores.Ledger.SizeAsync(cancellationToken);
                var larger = to ?? all;
                if (larger < 1 || larger > all)
                    return Range("/to", larger, 1, all, "leaves");
                if (from < 1 || from > larger)
                    return Range("/from", from, 1, larger, "leaves");
                return ConsistencyProof.Build(from, larger, await NodesAsync(stores, ConsistencyProof.Needs(from, larger), cancellationToken));
            },
            cancellationToken);

    /// <summary>Leaves from a number on, at most 1,000.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="from">First, from 0.</param>
    /// <param name="limit">Most leaves, 1 to 1,000.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<IReadOnlyList<LeafRow>>> LeavesAsync(Caller caller, long from, int limit, CancellationToken cancellationToken) =>
        commands.ReadAsync(
            caller,
            Kind,
            "ledger",
            async stores => limit is < 1 or > MostLeaves
                ? Range("/limit", limit, 1, MostLeaves, "leaves")
                : Outcome.Done(await stores.Ledger.LeavesAsync(from, limit, cancellationToken)),
            cancellationToken);

    /// <summary>The authority's certificate, DER: what a reviewer keeps to verify signatures.</summary>
    /// <param name="caller">Who asks; anybody may.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<TrustAnchor>> AnchorAsync(Caller caller, CancellationToken cancellationToken) =>
        commands.ReadAsync<TrustAnchor>(
            caller,
            Anchor,
            "site",
            async stores =>
            {
                var site = await keys.OpenAsync(stores, cancellationToken);
                var revocations = await Revocations.ListAsync(stores, cancellationToken);
                var now = new DateTimeOffset(clock.Now());
                var list = site.Authority.IssueRevocationList(revocations, revocations.Count + 1, now, now.AddDays(30));
                return new TrustAnchor(site.Authority.Certificate.ToDer(), list, site.Signer.PublicKey.ToString(), site.Origin);
            },
            cancellationToken);

    private static async Task<StoredNodes> NodesAsync(IStores stores, IReadOnlyList<NodeAddress> wanted, CancellationToken cancellationToken)
    {
        var hashes = await stores.Ledger.NodesAsync([.. wanted.Select(node => (node.Level, node.Index))], cancellationToken);
        return new StoredNodes(wanted.Zip(hashes, (address, hash) => new TreeNode(address, new Digest(hash))));
    }

    private static Invalid Range(string pointer, long value, long low, long high, string what) =>
        Invalid.Field(pointer, value.ToString(System.Globalization.CultureInfo.InvariantCulture), $"{low} to {high}", $"The ledger has {what} {low} to {high}.");
}

/// <summary>A leaf with its proof.</summary>
/// <param name="Proof">The proof.</param>
/// <param name="Leaf">Canonical bytes of the leaf.</param>
public sealed record LeafProof(InclusionProof Proof, byte[] Leaf);

/// <summary>What a verifier needs from outside.</summary>
/// <param name="Certificate">The authority's certificate, DER.</param>
/// <param name="RevocationList">Certificates that sign no more, DER, signed by the authority.</param>
/// <param name="NoteKey">Verifier key line of the checkpoints.</param>
/// <param name="Origin">Origin line of the checkpoints.</param>
public sealed record TrustAnchor(byte[] Certificate, byte[] RevocationList, string NoteKey, string Origin);
