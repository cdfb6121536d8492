using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Merkle;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>The leaves of a bundle give the root of its checkpoint, and that of every earlier checkpoint that is known.</summary>
internal sealed class LedgerCheck
{
    private readonly Dictionary<long, Digest> roots = [];
    private readonly HashSet<Digest> referred = [];
    private readonly Dictionary<long, LedgerLeaf> signatureLeaves = [];

    private LedgerCheck(Checkpoint checkpoint) => Checkpoint = checkpoint;

    public Checkpoint Checkpoint { get; }

    /// <summary>Hashes of contents that leaves refer to.</summary>
    public IReadOnlySet<Digest> Referred => referred;

    /// <summary>Leaves that record a signature, by index.</summary>
    public IReadOnlyDictionary<long, LedgerLeaf> SignatureLeaves => signatureLeaves;

    /// <summary>Root at a size that a manifest or the reader's checkpoint names; null outside the tree.</summary>
    public Digest? RootAt(long size) => roots.TryGetValue(size, out var root) ? root : null;

    public static LedgerCheck Run(
        BundleFiles files, BundleIndex index, TrustedKeys keys, (SignedNote Note, Checkpoint Checkpoint)? outside, Findings findings)
    {
        var (note, checkpoint) = ReadCheckpoint(files, index, keys);
        var check = new LedgerCheck(checkpoint);
        var sizes = Manifests(files).Select(m => m.Checkpoint.Size).ToHashSet();
        if (outside is { } given)
        {
            sizes.Add(given.Checkpoint.Size);
        }

        check.ReadLeaves(files, sizes, findings);
        var witnesses = keys.Witnesses(note).ToList();
        if (witnesses.Count > 0)
        {
            findings.Holds($"cosigned by {string.Join(", ", witnesses)}");
        }

        check.CompareOutside(outside, keys, findings);
        return check;
    }

    private static (SignedNote Note, Checkpoint Checkpoint) ReadCheckpoint(BundleFiles files, BundleIndex index, TrustedKeys keys)
    {
        var bytes = files.Require(BundleNames.Checkpoint, BundlePart.Checkpoint);
        if (SignedNote.Parse(bytes.Span) is not Parsed<SignedNote>.Good(var note))
        {
            throw Fault(BundlePart.Checkpoint, BundleNames.Checkpoint, "it is no signed note");
        }

        if (keys.Refusal(note) is { } refusal)
        {
            throw Fault(BundlePart.Checkpoint, BundleNames.Checkpoint, refusal);
        }

        return Checkpoint.Parse(note.Text) switch
        {
            Parsed<Checkpoint>.Bad(var reason) => throw Fault(BundlePart.Checkpoint, BundleNames.Checkpoint, reason),
            var good when good.Require().Origin != index.Origin =>
                throw Fault(BundlePart.Checkpoint, BundleNames.Checkpoint, $"its origin is '{good.Require().Origin}', bundle.json says '{index.Origin}'"),
            var good => (note, good.Require()),
        };
    }

    private static IEnumerable<SignatureManifest> Manifests(BundleFiles files) =>
        files.Names.Where(n => BundleNames.Signature(n) is { Name: BundleNames.Manifest })
            .Select(n => SignatureManifest.Parse(files[n].Span))
            .OfType<Parsed<SignatureManifest>.Good>()
            .Select(good => good.Value);

    private void ReadLeaves(BundleFiles files, HashSet<long> sizes, Findings findings)
    {
        var rest = files.Require(BundleNames.Leaves, BundlePart.Leaf);
        var tree = CompactRange.Empty;
        Keep(tree, sizes);
        while (!rest.IsEmpty)
        {
            var end = rest.Span.IndexOf((byte)'\n');
            if (end < 0)
            {
                throw Fault(BundlePart.Leaf, BundleNames.Leaves, $"leaf {tree.Size} does not end in a line feed");
            }

            ReadLeaf(tree.Size, rest.Span[..end]);
            tree = tree.Append(MerkleHash.Leaf(rest.Span[..end])).Tree;
            Keep(tree, sizes);
            rest = rest[(end + 1)..];
        }

        if (tree.Size != Checkpoint.Size)
        {
            throw Fault(BundlePart.Leaf, BundleNames.Leaves, $"it has {tree.Size} leaves, the checkpoint covers {Checkpoint.Size}");
        }

        if (tree.Root() is var root && root != Checkpoint.Root)
        {
            throw Fault(BundlePart.Leaf, BundleNames.Leaves, $"its root is {root}, the checkpoint says {Checkpoint.Root}");
        }

        findings.Holds($"{Checkpoint.Size} facts give the root of the signed checkpoint {Checkpoint.ShortHash} of {Checkpoint.Origin}");
    }

    private void ReadLeaf(long index, ReadOnlySpan<byte> line)
    {
        var leaf = LedgerLeaf.Parse(line) switch
        {
            Parsed<LedgerLeaf>.Bad(var reason) => throw Fault(BundlePart.Leaf, BundleNames.Leaves, $"leaf {index}: {reason}"),
            var good => good.Require(),
        };
        referred.UnionWith(leaf.Blobs.Values);
        if (leaf.Blobs.ContainsKey(BundleNames.SignatureFile))
        {
            signatureLeaves.Add(index, leaf);
        }
    }

    private void Keep(CompactRange tree, HashSet<long> sizes)
    {
        if (sizes.Contains(tree.Size))
        {
            roots[tree.Size] = tree.Root();
        }
    }

    private void CompareOutside((SignedNote Note, Checkpoint Checkpoint)? outside, TrustedKeys keys, Findings findings)
    {
        const string entry = "your checkpoint";
        if (outside is not var (note, given))
        {
            findings.Unknown("whether facts at the end were cut off, or the whole log was made anew, before this bundle was written: "
                + "only a checkpoint kept outside (a print, an earlier bundle, a witness) can show that");
            return;
        }

        if (given.Origin != Checkpoint.Origin)
        {
            findings.Wrong(BundlePart.OutsideCheckpoint, entry, $"it is of '{given.Origin}', the bundle of '{Checkpoint.Origin}'");
        }
        else if (keys.Refusal(note) is { } refusal)
        {
            findings.Wrong(BundlePart.OutsideCheckpoint, entry, refusal);
        }
        else if (given.Size > Checkpoint.Size)
        {
            findings.Wrong(BundlePart.OutsideCheckpoint, entry,
                $"it covers {given.Size} facts, the bundle has only {Checkpoint.Size}: the end was cut off, or the bundle is older than your checkpoint");
        }
        else if (RootAt(given.Size) is { } root && root != given.Root)
        {
            findings.Wrong(BundlePart.OutsideCheckpoint, entry,
                $"its root is {given.Root}, the first {given.Size} facts of the bundle give {root}: history was rewritten");
        }
        else
        {
            findings.Holds($"the history extends your checkpoint {given.ShortHash}: nothing of its {given.Size} facts was changed or removed");
        }
    }

    private static BundleFaultException Fault(BundlePart part, string entry, string detail) => new(new BundleFault(part, entry, detail));
}
