using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>
/// Each signature folder belongs to a leaf that holds the hashes of its manifest, signature file and certificate; the
/// signature is that leaf's actor's, names a state of this very log that precedes the leaf, and no other leaf records it.
/// </summary>
internal sealed class SignatureCheck
{
    private readonly BundleFiles files;
    private readonly LedgerCheck ledger;
    private readonly Findings findings;
    private readonly SignatureVerifier verifier;

    private SignatureCheck(BundleFiles files, LedgerCheck ledger, Findings findings, SignatureVerifier verifier) =>
        (this.files, this.ledger, this.findings, this.verifier) = (files, ledger, findings, verifier);

    public static void Run(BundleFiles files, LedgerCheck ledger, BundleTrust trust, Findings findings)
    {
        if (Verifier(files, trust, findings) is not { } verifier)
        {
            return;
        }

        var check = new SignatureCheck(files, ledger, findings, verifier);
        var folders = new Dictionary<long, List<string>>();
        foreach (var name in files.Names.Where(n => n.StartsWith(BundleNames.Signatures, StringComparison.Ordinal)))
        {
            if (BundleNames.Signature(name) is var (index, file))
            {
                (folders.TryGetValue(index, out var list) ? list : folders[index] = []).Add(file);
            }
            else
            {
                findings.Wrong(BundlePart.Signature, name, "the entry is in no signature's folder");
            }
        }

        foreach (var (index, names) in folders)
        {
            check.CheckFolder(index, names);
        }

        check.CheckReplays();

        var missing = ledger.SignatureLeaves.Keys.Count(i => !folders.ContainsKey(i));
        if (missing > 0)
        {
            findings.Unknown($"{missing} further signatures of the ledger are outside this bundle's scope and were not checked");
        }
    }

    private static SignatureVerifier? Verifier(BundleFiles files, BundleTrust trust, Findings findings)
    {
        var pem = System.Text.Encoding.UTF8.GetString(files.Require(BundleNames.Authority, BundlePart.Authority).Span);
        if (SigningCertificate.ParsePem(pem) is not Parsed<SigningCertificate>.Good(var authority) || authority.ToPem() != pem)
        {
            findings.Wrong(BundlePart.Authority, BundleNames.Authority, "it is not one certificate in PEM form");
            return null;
        }

        if (trust.Authorities.Count == 0)
        {
            findings.OriginUnknown($"who issued the signers' certificates: you gave no authority; the bundle's own has SHA-256 {authority.Fingerprint}");
        }
        else if (!trust.Authorities.Any(a => a.Fingerprint == authority.Fingerprint))
        {
            findings.Wrong(BundlePart.Authority, BundleNames.Authority, $"its SHA-256 {authority.Fingerprint} is none of the authorities that you trust");
            return null;
        }

        switch (RevocationList.Parse(files.Require(BundleNames.Revocations, BundlePart.Authority).Span))
        {
            case Parsed<RevocationList>.Bad(var reason):
                findings.Wrong(BundlePart.Authority, BundleNames.Revocations, reason);
                return null;
            case Parsed<RevocationList>.Good(var list) when list.IsSignedBy(authority):
                return new SignatureVerifier(authority, list);
            default:
                findings.Wrong(BundlePart.Authority, BundleNames.Revocations, "the site authority did not sign it");
                return null;
        }
    }

    private void CheckFolder(long index, List<string> names)
    {
        foreach (var needed in (string[])[BundleNames.Manifest, BundleNames.SignatureFile])
        {
            if (!names.Contains(needed))
            {
                findings.Wrong(BundlePart.Signature, BundleNames.InSignature(index, needed), "the entry is missing");
                return;
            }
        }

        if (!ledger.SignatureLeaves.TryGetValue(index, out var leaf))
        {
            findings.Wrong(BundlePart.Signature, BundleNames.InSignature(index, BundleNames.SignatureFile), $"leaf {index} of the ledger records no signature");
            return;
        }

        if (!IsPinned(index, leaf, BundleNames.Manifest) || !IsPinned(index, leaf, BundleNames.SignatureFile))
        {
            return;
        }

        if (!leaf.Blobs.TryGetValue(BundleNames.SignerCertificate, out var pinned))
        {
            findings.Wrong(BundlePart.Leaf, BundleNames.Leaves, $"leaf {index} records a signature, but not its certificate");
            return;
        }

        var verdict = verifier.Verify(
            files[BundleNames.InSignature(index, BundleNames.Manifest)].Span, files[BundleNames.InSignature(index, BundleNames.SignatureFile)].Span, pinned);
        if (verdict is SignatureVerdict.Good(var manifest, _))
        {
            verdict = manifest.BoundElsewhere(manifest.Subject, leaf.Actor, manifest.Role, manifest.Meaning, ledger.Checkpoint.Origin) ?? verdict;
            CheckPlace(index, leaf, manifest);
            CheckArtefacts(index, names, manifest);
        }

        findings.Signature(index, verdict);
    }

    /// <summary>A signature counts once: a second leaf with the same file would be a replay.</summary>
    private void CheckReplays()
    {
        var first = new Dictionary<Digest, long>();
        foreach (var (index, leaf) in ledger.SignatureLeaves.OrderBy(l => l.Key))
        {
            if (!first.TryAdd(leaf.Blobs[BundleNames.SignatureFile], index))
            {
                findings.Wrong(BundlePart.Leaf, BundleNames.Leaves,
                    $"leaf {index} records the signature of leaf {first[leaf.Blobs[BundleNames.SignatureFile]]} a second time");
            }
        }
    }

    private bool IsPinned(long index, LedgerLeaf leaf, string name)
    {
        var entry = BundleNames.InSignature(index, name);
        var actual = Digest.Of(files[entry].Span);
        if (leaf.Blobs.TryGetValue(name, out var expected) && expected == actual)
        {
            return true;
        }

        findings.Wrong(BundlePart.Signature, entry, $"its SHA-256 is {actual}, leaf {index} of the ledger says {expected}");
        return false;
    }

    private void CheckPlace(long index, LedgerLeaf leaf, SignatureManifest manifest)
    {
        var entry = BundleNames.InSignature(index, BundleNames.Manifest);
        if (manifest.Checkpoint.Size > index)
        {
            findings.Wrong(BundlePart.Signature, entry, $"it names a checkpoint of {manifest.Checkpoint.Size} facts, but is itself fact {index}");
        }
        else if (ledger.RootAt(manifest.Checkpoint.Size) is not { } root || root != manifest.Checkpoint.Root)
        {
            findings.Wrong(BundlePart.Signature, entry,
                $"it names root {manifest.Checkpoint.Root} for {manifest.Checkpoint.Size} facts, the ledger gives {ledger.RootAt(manifest.Checkpoint.Size)}: history was rewritten, or the signature comes from another log");
        }

        if (manifest.Time > leaf.Time)
        {
            findings.Wrong(BundlePart.Signature, entry, $"it is of {LedgerTime.Format(manifest.Time)}, after its own record of {LedgerTime.Format(leaf.Time)}");
        }
    }

    /// <summary>Every signed file has to be here, in the folder or among the contents, and the folder holds nothing else.</summary>
    private void CheckArtefacts(long index, List<string> names, SignatureManifest manifest)
    {
        foreach (var (name, hash) in manifest.Artefacts)
        {
            var entry = BundleNames.InSignature(index, name);
            var content = files.Find(entry) ?? files.Find(BundleNames.Blob(hash));
            if (content is null)
            {
                findings.Wrong(BundlePart.Signature, entry, "the signed file is missing");
            }
            else if (manifest.Differs(name, content.Value.Span) is { } difference)
            {
                findings.Wrong(BundlePart.Signature, entry, difference.Words);
            }
        }

        foreach (var name in names.Where(n => n is not (BundleNames.Manifest or BundleNames.SignatureFile) && !manifest.Artefacts.ContainsKey(n)))
        {
            findings.Wrong(BundlePart.Signature, BundleNames.InSignature(index, name), "it lies beside a signature, but was not signed");
        }
    }
}
