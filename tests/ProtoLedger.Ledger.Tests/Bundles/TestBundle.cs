using System.Text;
using ProtoLedger.Ledger.Bundles;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Merkle;
using ProtoLedger.Ledger.Signatures;
using ProtoLedger.Ledger.Tests.Signatures;

namespace ProtoLedger.Ledger.Tests.Bundles;

/// <summary>A small log of ten facts with two signatures, and the bundle made from it.</summary>
internal sealed class TestBundle : IDisposable
{
    public const string Origin = "linden.example/protoledger";

    private readonly List<byte[]> leaves = [];
    private readonly List<BundleEntry> entries = [];
    private readonly Dictionary<string, byte[]> artefacts = new()
    {
        ["report.json"] = "{\"verdict\":\"holds\"}"u8.ToArray(),
        ["report.md"] = "# Report\n"u8.ToArray(),
    };

    public TestBundle(TestSite? site = null, NoteSigner? log = null)
    {
        Site = site ?? new TestSite();
        Log = log ?? NoteSigner.FromSeed(Origin, Enumerable.Range(1, 32).Select(i => (byte)i).ToArray());
        for (var i = 0; i < 4; i++)
        {
            Content($"{{\"TR\":{9000 - i}}}");
        }

        Sign(Site.Physicist, "change-request/17");
        Content("{\"loaded\":1}");
        Sign(Site.Other, "change-request/18");
        Content("{\"loaded\":2}");
        Content("{\"reviewed\":3}");
        entries.Add(BundleEntry.Page("index.html", "<!doctype html><title>Binder</title>"u8.ToArray()));
        entries.Add(BundleEntry.Page("history.html", "<!doctype html><title>History</title>"u8.ToArray()));
    }

    public TestSite Site { get; }

    public NoteSigner Log { get; }

    public List<byte[]> Leaves => leaves;

    public List<BundleEntry> Entries => entries;

    public BundleTrust Trust => new([Site.Authority.Certificate], [Log.PublicKey]);

    public SignedNote CheckpointAt(int size) => CheckpointAt(size, Log);

    public SignedNote CheckpointAt(int size, NoteSigner signer) => signer.Sign(new Checkpoint(Origin, size, RootAt(size)));

    public Digest RootAt(int size) =>
        leaves.Take(size).Aggregate(CompactRange.Empty, (tree, leaf) => tree.Append(MerkleHash.Leaf(leaf)).Tree).Root();

    public BundleContents Contents() => new(
        "Brain, standard", "protocol brain-standard, all scanners", CheckpointAt(leaves.Count), Log.PublicKey, leaves,
        Site.Authority.Certificate, Site.RevocationBytes(), entries);

    public byte[] ToBytes() => ToBytes(Contents());

    public byte[] ToBytes(BundleContents contents)
    {
        using var output = new MemoryStream();
        BundleWriter.WriteAsync(output, contents, Log).GetAwaiter().GetResult();
        return output.ToArray();
    }

    public void Dispose() => Site.Dispose();

    public void Content(string json)
    {
        var bytes = Encoding.UTF8.GetBytes(json);
        Append("version-recorded", "t.okafor", "protocol/brain-standard", new() { ["document"] = Digest.Of(bytes) });
        entries.Add(BundleEntry.Blob(Digest.Of(bytes), _ => ValueTask.FromResult(bytes)));
    }

    public void Append(string type, string actor, string subject, Dictionary<string, Digest> blobs) =>
        leaves.Add(new LedgerLeaf(type, 1, TestSite.Signing.AddSeconds(leaves.Count), actor, subject, blobs).ToBytes());

    /// <summary>Records the signature of a leaf a second time, under another subject.</summary>
    public void RecordAgain(int leaf, string actor)
    {
        var first = LedgerLeaf.Parse(leaves[leaf]).Require();
        var rezip = new Rezip(ToBytes());
        var index = leaves.Count;
        Append(first.Type, actor, "change-request/99/signatures/1", first.Blobs.ToDictionary());
        foreach (var name in rezip.Names.Where(n => n.StartsWith($"signatures/{leaf}/", StringComparison.Ordinal)))
        {
            entries.Add(BundleEntry.Of(BundleNames.InSignature(index, name.Split('/')[2]), rezip[name]));
        }
    }

    /// <summary>Signs, and records the signature in a leaf; <paramref name="change"/> makes a manifest that does not fit its place.</summary>
    public void Sign(TestSite.Signer signer, string subject, Func<SignatureManifest, SignatureManifest>? change = null)
    {
        var index = leaves.Count;
        var manifest = signer.Manifest(subject) with
        {
            Artefacts = artefacts.ToDictionary(a => a.Key, a => Digest.Of(a.Value)),
            Checkpoint = new Checkpoint(Origin, index - 1, RootAt(index - 1)),
        };
        manifest = change?.Invoke(manifest) ?? manifest;
        var (bytes, cms) = (manifest.ToBytes(), signer.Key.Sign(manifest, signer.Certificate));
        Append("signature-given", signer.Certificate.Subject.Account, $"{subject}/signatures/1", new()
        {
            [BundleNames.Manifest] = Digest.Of(bytes),
            [BundleNames.SignatureFile] = Digest.Of(cms),
            [BundleNames.SignerCertificate] = signer.Certificate.Fingerprint,
        });
        entries.AddRange(BundleEntry.Signature(index, bytes, cms));
        entries.AddRange(artefacts.Select(a => BundleEntry.Signed(index, a.Key, _ => ValueTask.FromResult(a.Value))));
    }
}
