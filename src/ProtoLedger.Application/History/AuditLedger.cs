using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Site;
using ProtoLedger.Application.Stores;
using ProtoLedger.Ledger;
using ProtoLedger.Ledger.Audit;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Application.History;

/// <summary>
/// Recomputes the ledger from its leaves, rebuilds every state of record from leaves and contents, compares both with what
/// the tables hold, and names the first record that differs.
/// </summary>
/// <param name="commands">Runs it.</param>
/// <param name="keys">The site's keys.</param>
public sealed class AuditLedger(Commands commands, SiteKeys keys)
{
    private const int Page = 2000;
    private static readonly CommandKind Kind = new("audit-ledger", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.ReadAudit;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="outside">A checkpoint note that was kept outside, or null: without one a cut tail or a rebuilt log cannot be known.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public async Task<Outcome<AuditReport>> RunAsync(Caller caller, byte[]? outside, CancellationToken cancellationToken)
    {
        var outcome = await commands.ReadAsync<AuditReport>(
            caller, Kind, "ledger", stores => AuditAsync(stores, outside, cancellationToken), cancellationToken);
        if (outcome.Succeeded)
            await commands.RecordAsync(caller, Kind.Action, "ledger", "read", outcome.Value.First?.Words ?? "clean", cancellationToken);
        return outcome;
    }

    /// <summary>Every leaf, in order.</summary>
    internal static async Task<IReadOnlyList<LeafRow>> LeavesAsync(IStores stores, CancellationToken cancellationToken)
    {
        var leaves = new List<LeafRow>();
        var from = 0L;
        while (true)
        {
            var page = await stores.Ledger.LeavesAsync(from, Page, cancellationToken);
            leaves.AddRange(page);
            if (page.Count < Page)
                return leaves;
            from = page[^1].Sequence + 1;
        }
    }

    private async Task<Outcome<AuditReport>> AuditAsync(IStores stores, byte[]? outside, CancellationToken cancellationToken)
    {
        var site = await keys.OpenAsync(stores, cancellationToken);
        var leaves = await LeavesAsync(stores, cancellationToken);
        var parsed = leaves
            .Select(row => (row.Sequence, Leaf: LedgerLeaf.Parse(row.Bytes) is Parsed<LedgerLeaf>.Good(var leaf) ? leaf : null))
            .Where(pair => pair.Leaf is not null)
            .Select(pair => (pair.Sequence, Leaf: pair.Leaf!))
            .ToList();
        var contents = new Dictionary<Digest, byte[]>();
        foreach (var hash in parsed.SelectMany(pair => pair.Leaf.Blobs.Values).Distinct())
            if (await stores.Ledger.FindBlobAsync(hash.ToArray(), cancellationToken) is { } bytes)
                contents.Add(hash, bytes);
        var report = AuditReplay.Run(new AuditInput(
            site.Origin,
            [site.Signer.PublicKey],
            leaves.Select(row => new StoredLeaf(row.Sequence, row.Bytes)),
            (await stores.Records.NodesAsync(cancellationToken)).Select(node => new TreeNode(new NodeAddress(node.Level, node.Index), new Digest(node.Hash))),
            (await stores.Records.CheckpointsAsync(cancellationToken)).Select(checkpoint => System.Text.Encoding.UTF8.GetBytes(checkpoint.Note)),
            contents.Select(content => new StoredBlob(content.Key, content.Value)),
            outside));
        var (faults, compared) = await RecordComparison.RunAsync(stores, parsed, contents, cancellationToken);
        return report with
        {
            Faults = [.. report.Faults, .. faults.Take(AuditReport.MostFaults)],
            Holds = faults.Count == 0 ? [.. report.Holds, $"{compared} records in the tables are what the leaves say"] : report.Holds,
        };
    }
}
