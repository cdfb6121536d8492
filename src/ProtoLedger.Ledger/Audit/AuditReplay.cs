using System.Globalization;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Merkle;

namespace ProtoLedger.Ledger.Audit;

/// <summary>
/// Recomputes the ledger from its leaves and compares with all that is stored beside them: nodes, checkpoints, contents.
/// Memory: one hash for each inner node and content, not the contents themselves.
/// </summary>
public sealed class AuditReplay
{
    private readonly AuditInput input;
    private readonly List<AuditFault> faults = [];
    private readonly List<string> holds = [];
    private readonly List<string> unknown = [];
    private readonly Dictionary<NodeAddress, Digest> stored = [];
    private readonly Dictionary<Digest, long> referred = [];
    private readonly Dictionary<long, Digest> roots = [];
    private CompactRange tree = CompactRange.Empty;
    private long further;

    private AuditReplay(AuditInput input) => this.input = input;

    /// <summary>Runs the audit.</summary>
    public static AuditReport Run(AuditInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        return new AuditReplay(input).Run();
    }

    private AuditReport Run()
    {
        var notes = input.Checkpoints.ToList();
        var sizes = notes.Append(input.Outside ?? []).Select(SizeOf).ToHashSet();
        foreach (var node in input.Nodes)
        {
            if (!stored.TryAdd(node.Address, node.Hash))
            {
                Wrong(Name(node.Address), "it is stored twice");
            }
        }

        ReplayLeaves(sizes);
        foreach (var (address, hash) in stored.OrderBy(n => n.Key.Level).ThenBy(n => n.Key.Index))
        {
            Wrong(Name(address), $"{hash} is stored, but {tree.Size} leaves have no such node");
        }

        CheckCheckpoints(notes);
        CheckBlobs();
        CompareOutside();
        if (further > 0)
        {
            faults.Add(new AuditFault("further records", $"{further} more faults"));
        }

        return new AuditReport(tree.Size, tree.Root(), faults, holds, unknown);
    }

    private void ReplayLeaves(HashSet<long> sizes)
    {
        Keep(sizes);
        foreach (var (sequence, bytes) in input.Leaves)
        {
            if (sequence != tree.Size)
            {
                Wrong($"leaf {tree.Size}", $"it is missing or out of order: the next stored leaf has sequence {sequence}");
            }

            Read(bytes);
            (tree, var created) = tree.Append(MerkleHash.Leaf(bytes));
            foreach (var (address, hash) in created)
            {
                Compare(address, hash);
            }

            Keep(sizes);
        }

        if (faults.Count == 0)
        {
            holds.Add($"{tree.Size} leaves are dense, canonical and give root {tree.Root()}, with every stored node as recomputed");
        }
    }

    private void Read(byte[] bytes)
    {
        switch (LedgerLeaf.Parse(bytes))
        {
            case Parsed<LedgerLeaf>.Bad(var reason):
                Wrong($"leaf {tree.Size}", reason);
                break;
            case Parsed<LedgerLeaf>.Good(var leaf):
                foreach (var hash in leaf.Blobs.Values)
                {
                    referred.TryAdd(hash, tree.Size);
                }

                break;
        }
    }

    private void Compare(NodeAddress address, Digest computed)
    {
        if (!stored.Remove(address, out var hash))
        {
            Wrong(Name(address), $"its hash {computed} is not stored");
        }
        else if (hash != computed)
        {
            Wrong(Name(address), $"its contents give hash {computed}, stored is {hash}");
        }
    }

    private void CheckCheckpoints(List<byte[]> notes)
    {
        var lastGood = 0L;
        var before = faults.Count;
        for (var i = 0; i < notes.Count; i++)
        {
            if (Open(notes[i], out var reason) is not { } checkpoint)
            {
                Wrong($"checkpoint number {i}", reason!);
            }
            else if (checkpoint.Size < lastGood)
            {
                Wrong(Name(checkpoint), $"it follows one of {lastGood} facts");
            }
            else if (Difference(checkpoint) is { } difference)
            {
                Wrong(Name(checkpoint), $"{difference}; the last checkpoint that fits covers {lastGood}, so the change lies in facts {lastGood} to {checkpoint.Size - 1}");
            }
            else
            {
                lastGood = checkpoint.Size;
            }
        }

        if (faults.Count == before)
        {
            holds.Add($"{notes.Count} stored checkpoints are signed and fit the recomputed tree; the newest covers {lastGood} of {tree.Size} facts");
        }
    }

    private void CheckBlobs()
    {
        var before = faults.Count;
        var expected = new Dictionary<Digest, long>(referred);
        foreach (var (hash, content) in input.Blobs)
        {
            if (Digest.Of(content) is var actual && actual != hash)
            {
                Wrong($"content {hash}", $"its bytes have SHA-256 {actual}" + (referred.TryGetValue(hash, out var leaf) ? $"; leaf {leaf} refers to it" : ""));
            }
            else if (!referred.ContainsKey(hash))
            {
                Wrong($"content {hash}", "no leaf refers to it");
            }

            expected.Remove(hash);
        }

        foreach (var (hash, leaf) in expected.OrderBy(e => e.Value))
        {
            Wrong($"content {hash}", $"it is missing, leaf {leaf} refers to it");
        }

        if (faults.Count == before)
        {
            holds.Add($"{referred.Count} contents are there with their recorded hashes");
        }
    }

    private void CompareOutside()
    {
        if (input.Outside is null)
        {
            unknown.Add("whether facts at the end were cut off or the whole log was made anew: "
                + "only a checkpoint kept outside this store (a print, a bundle, a witness) can show that");
        }
        else if (Open(input.Outside, out var reason) is not { } checkpoint)
        {
            Wrong("your checkpoint", reason!);
        }
        else if (Difference(checkpoint) is { } difference)
        {
            Wrong("your checkpoint", difference);
        }
        else
        {
            holds.Add($"the history extends your checkpoint {checkpoint.ShortHash}");
        }
    }

    private string? Difference(Checkpoint checkpoint) =>
        checkpoint.Size > tree.Size ? $"it covers {checkpoint.Size} facts, only {tree.Size} are stored: the end was cut off"
        : roots[checkpoint.Size] is var root && root != checkpoint.Root
            ? $"its root is {checkpoint.Root}, the first {checkpoint.Size} facts give {root}: history was rewritten"
        : null;

    private Checkpoint? Open(byte[] bytes, out string? reason)
    {
        if (SignedNote.Parse(bytes) is not Parsed<SignedNote>.Good(var note))
        {
            reason = "it is no signed note";
            return null;
        }

        reason = note.Verify(input.Keys) switch
        {
            NoteVerification.BadSignature(var name) => $"the signature of key '{name}' is wrong",
            NoteVerification.NoKnownKey => "no known key signed it",
            NoteVerification.Valid(var keys) when keys.All(k => k.IsWitness) => "only witnesses signed it",
            _ => Checkpoint.Parse(note.Text) switch
            {
                Parsed<Checkpoint>.Bad(var fault) => fault,
                var good when good.Require().Origin != input.Origin => $"its origin is '{good.Require().Origin}', not '{input.Origin}'",
                _ => null,
            },
        };
        return reason is null ? Checkpoint.Parse(note.Text).Require() : null;
    }

    private static long SizeOf(byte[] note) =>
        SignedNote.Parse(note) is Parsed<SignedNote>.Good(var good) && Checkpoint.Parse(good.Text) is Parsed<Checkpoint>.Good(var checkpoint)
            ? checkpoint.Size
            : 0;

    private void Keep(HashSet<long> sizes)
    {
        if (sizes.Contains(tree.Size))
        {
            roots[tree.Size] = tree.Root();
        }
    }

    private void Wrong(string record, string detail)
    {
        if (faults.Count < AuditReport.MostFaults)
        {
            faults.Add(new AuditFault(record, detail));
        }
        else
        {
            further++;
        }
    }

    private static string Name(NodeAddress address) =>
        address.Level == 0
            ? string.Create(CultureInfo.InvariantCulture, $"leaf {address.Index}")
            : string.Create(CultureInfo.InvariantCulture, $"node level {address.Level} index {address.Index}");

    private static string Name(Checkpoint checkpoint) =>
        string.Create(CultureInfo.InvariantCulture, $"checkpoint of {checkpoint.Size} facts");
}
