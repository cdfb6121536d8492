using System.Text;
using ProtoLedger.Ledger.Bundles;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Leaves;
using ProtoLedger.Ledger.Signatures;
using ProtoLedger.Ledger.Tests.Signatures;

namespace ProtoLedger.Ledger.Tests.Bundles;

/// <summary>Well-formed bundles with altered contents, by forgers of rising means; each is refused and the place named.</summary>
public sealed class ForgedBundleTests : IDisposable
{
    private readonly TestBundle made = new();

    public void Dispose() => made.Dispose();

    [Fact]
    public void Verify_EveryByteOfEveryEntryFlippedInAWellFormedZip_NamesTheEntry()
    {
        // The zip checksums are made to fit, so that the hashes have to find it.
        var original = made.ToBytes();
        var tried = 0;
        foreach (var name in new Rezip(original).Names)
        {
            var content = new Rezip(original)[name];
            for (var i = 0; i < content.Length; i++)
            {
                var changed = (byte[])content.Clone();
                changed[i] ^= (byte)(1 << i % 8);
                var report = BundleVerifier.Verify(new Rezip(original).Set(name, changed).ToBytes(), made.Trust);
                Assert.Equal(BundleOutcome.Bad, report.Outcome);
                if (name is not (BundleNames.Index or BundleNames.Note))
                {
                    Assert.Equal(name, report.Faults[0].Entry);
                }

                tried++;
            }
        }

        Assert.True(tried > 8_000, $"{tried} bytes");
    }

    [Fact]
    public void Verify_EntryChangedAndListMadeToFit_IsRefusedByTheNote()
    {
        foreach (var name in new Rezip(made.ToBytes()).Names.Where(n => n is not (BundleNames.Index or BundleNames.Note or BundleNames.Sums)))
        {
            var rezip = new Rezip(made.ToBytes());
            var changed = rezip[name];
            changed[^1] ^= 1;
            var fault = BundleVerifier.Verify(rezip.Set(name, changed).Reindex(null).ToBytes(), made.Trust).Faults[0];
            Assert.Equal(name == BundleNames.LogKey ? BundleNames.LogKey : BundleNames.Note, fault.Entry);
        }
    }

    [Fact]
    public void Verify_ListSignedByAnotherKey_IsRefused()
    {
        var thief = NoteSigner.FromSeed(TestBundle.Origin, Enumerable.Repeat((byte)5, 32).ToArray());
        var fault = BundleVerifier.Verify(new Rezip(made.ToBytes()).Reindex(thief).ToBytes(), made.Trust).Faults[0];
        Assert.Contains("none of the keys", fault.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Verify_EveryByteChangedByAForgerWithTheLogKey_IsRefusedWhereThePersonsSignaturesAndTheTreeReach()
    {
        // Whoever holds the log's key can sign any list. The tree and the people's signatures do not yield to that key.
        var original = made.ToBytes();
        foreach (var name in new Rezip(original).Names.Where(n => n.StartsWith("ledger/", StringComparison.Ordinal)
            || n.StartsWith("blobs/", StringComparison.Ordinal) || n.StartsWith("signatures/", StringComparison.Ordinal)
            || n is BundleNames.Authority or BundleNames.Revocations))
        {
            var content = new Rezip(original)[name];
            for (var i = 0; i < content.Length; i += 3)
            {
                var changed = (byte[])content.Clone();
                changed[i] ^= 0x01;
                var report = BundleVerifier.Verify(new Rezip(original).Set(name, changed).Reindex(made.Log).ToBytes(), made.Trust);
                Assert.True(report.Outcome == BundleOutcome.Bad, $"{name} byte {i}");
            }
        }
    }

    [Fact]
    public void Verify_WholeBundleOfAnotherSite_IsConsistentButRefusedUnderTrust()
    {
        using var other = new TestBundle(new TestSite(), NoteSigner.FromSeed(TestBundle.Origin, Enumerable.Repeat((byte)9, 32).ToArray()));
        Assert.Equal(BundleOutcome.OriginUnknown, BundleVerifier.Verify(other.ToBytes(), BundleTrust.None).Outcome);
        Assert.Equal(BundleNames.LogKey, BundleVerifier.Verify(other.ToBytes(), made.Trust).Faults[0].Entry);

        var halfTrust = made.Trust with { Keys = other.Trust.Keys };
        Assert.Equal(BundleNames.Authority, BundleVerifier.Verify(other.ToBytes(), halfTrust).Faults[0].Entry);
    }

    [Fact]
    public void Verify_OnlyOneKindOfTrustGiven_IsOriginUnknown()
    {
        var bundle = made.ToBytes();
        Assert.Equal(BundleOutcome.OriginUnknown, BundleVerifier.Verify(bundle, made.Trust with { Authorities = [] }).Outcome);
        Assert.Equal(BundleOutcome.OriginUnknown, BundleVerifier.Verify(bundle, made.Trust with { Keys = [] }).Outcome);
        Assert.Equal(BundleOutcome.Good, BundleVerifier.Verify(bundle, made.Trust).Outcome);
    }

    [Fact]
    public void Verify_EntriesRemovedAddedOrReordered_IsRefusedAndNamed()
    {
        var names = new Rezip(made.ToBytes()).Names.ToList();
        foreach (var name in names)
        {
            Assert.Equal(name, BundleVerifier.Verify(new Rezip(made.ToBytes()).Remove(name).ToBytes(), made.Trust).Faults[0].Entry);
        }

        for (var i = 1; i < names.Count; i++)
        {
            Assert.Equal(BundleOutcome.Bad, BundleVerifier.Verify(new Rezip(made.ToBytes()).Swap(i - 1, i).ToBytes(), made.Trust).Outcome);
        }

        var added = BundleVerifier.Verify(new Rezip(made.ToBytes()).Insert(3, "pages/extra.html", []).ToBytes(), made.Trust).Faults[0];
        Assert.Equal(("pages/extra.html", "the entry is not on the list in bundle.json"), (added.Entry, added.Detail));
    }

    [Fact]
    public void Verify_LogKeyHolderDropsAFact_IsRefusedByTheSignedCheckpointsOfLaterSignatures()
    {
        // The log's holder removes fact 2, signs a new checkpoint and list: the manifests still name the old roots.
        var leaves = made.Leaves.Where((_, i) => i != 2).ToList();
        made.Leaves.Clear();
        made.Leaves.AddRange(leaves);
        var report = BundleVerifier.Verify(made.ToBytes(), made.Trust);
        Assert.Equal(BundleOutcome.Bad, report.Outcome);
    }

    [Fact]
    public void Verify_HistoryRewrittenBeforeASignature_NamesTheManifestThatContradicts()
    {
        var changed = LedgerLeaf.Parse(made.Leaves[1]).Require() with { Actor = "somebody.else" };
        made.Leaves[1] = changed.ToBytes();
        var report = BundleVerifier.Verify(made.ToBytes(), made.Trust);
        Assert.Contains(report.Faults, f => f.Entry == "signatures/4/manifest.json" && f.Detail.Contains("history was rewritten", StringComparison.Ordinal));
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    public void Verify_TailCut_IsRefusedOnlyWithAnOutsideCheckpoint(int cut)
    {
        var outside = made.CheckpointAt(made.Leaves.Count).ToBytes();
        foreach (var leaf in made.Leaves.TakeLast(cut).ToList())
        {
            made.Leaves.Remove(leaf);
            var blob = LedgerLeaf.Parse(leaf).Require().Blobs["document"];
            made.Entries.RemoveAll(e => e.Name == BundleNames.Blob(blob));
        }

        var without = BundleVerifier.Verify(made.ToBytes(), made.Trust);
        Assert.Equal(BundleOutcome.Good, without.Outcome);
        Assert.Contains(without.Unknown, u => u.Contains("cut off", StringComparison.Ordinal));
        var fault = BundleVerifier.Verify(made.ToBytes(), made.Trust, outside).Faults[0];
        Assert.Equal(BundlePart.OutsideCheckpoint, fault.Part);
        Assert.Contains("cut off", fault.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Verify_OutsideCheckpointOfAnotherHistoryKeyOrLog_IsRefusedAndUnreadableIsUsage()
    {
        var bundle = made.ToBytes();
        BundleReport With(SignedNote note) => BundleVerifier.Verify(bundle, made.Trust, note.ToBytes());
        Assert.Contains("history was rewritten", With(made.Log.Sign(new Checkpoint(TestBundle.Origin, 3, Digest.Of("x"u8)))).Faults[0].Detail, StringComparison.Ordinal);
        Assert.Contains("it is of 'other.example'", With(NoteSigner.Generate("other.example").Sign(new Checkpoint("other.example", 3, made.RootAt(3)))).Faults[0].Detail, StringComparison.Ordinal);
        Assert.Contains("none of the keys", With(made.CheckpointAt(3, NoteSigner.Generate(TestBundle.Origin))).Faults[0].Detail, StringComparison.Ordinal);
        Assert.Equal(BundleOutcome.Good, With(made.CheckpointAt(0)).Outcome);
        Assert.Equal(BundleOutcome.Usage, BundleVerifier.Verify(bundle, made.Trust, "nonsense"u8.ToArray()).Outcome);
    }

    [Fact]
    public void Verify_WitnessedCheckpoint_SaysWhoCosignedAndRefusesAForgedCosignature()
    {
        var witness = NoteSigner.WitnessFromSeed("witness.example", Enumerable.Repeat((byte)8, 32).ToArray());
        var contents = made.Contents();
        var cosigned = contents.Checkpoint.With(witness.Cosign(contents.Checkpoint, TestSite.Signing));
        var trust = made.Trust with { Keys = [made.Log.PublicKey, witness.PublicKey] };
        var report = BundleVerifier.Verify(made.ToBytes(contents with { Checkpoint = cosigned }), trust);
        Assert.Equal(BundleOutcome.Good, report.Outcome);
        Assert.Contains("cosigned by witness.example", report.Holds);

        var forged = contents.Checkpoint.With(witness.Cosign(made.CheckpointAt(3), TestSite.Signing));
        Assert.Equal(BundleOutcome.Bad, BundleVerifier.Verify(made.ToBytes(contents with { Checkpoint = forged }), trust).Outcome);
    }

    [Fact]
    public void Verify_SignatureRevokedBeforeSigning_IsNamed()
    {
        var list = made.Site.RevocationBytes(new Revocation(made.Site.Other.Certificate.Serial, TestSite.Signing.AddDays(-1), RevocationReason.KeyCompromise));
        var report = BundleVerifier.Verify(made.ToBytes(made.Contents() with { RevocationList = list }), made.Trust);
        Assert.IsType<SignatureVerdict.Good>(report.Signatures[4]);
        Assert.IsType<SignatureVerdict.CertificateRevoked>(report.Signatures[6]);
        Assert.Equal("signatures/6/approval.p7s", report.Faults[0].Entry);
    }

    [Fact]
    public void Verify_SignedFileMissingOrExchanged_IsNamed()
    {
        var missing = new Rezip(made.ToBytes()).Remove("signatures/4/report.md").Reindex(made.Log);
        Assert.Equal(("signatures/4/report.md", "the signed file is missing"), Pair(missing));
        var stranger = new Rezip(made.ToBytes()).Insert(2, "signatures/4/other.md", "x"u8.ToArray()).Reindex(made.Log);
        Assert.Equal(("signatures/4/other.md", "it lies beside a signature, but was not signed"), Pair(stranger));

        (string, string) Pair(Rezip rezip)
        {
            var fault = Assert.Single(BundleVerifier.Verify(rezip.ToBytes(), made.Trust).Faults);
            return (fault.Entry, fault.Detail);
        }
    }

    [Fact]
    public void Verify_SignaturesOfTwoLeavesExchanged_AreRefused()
    {
        var rezip = new Rezip(made.ToBytes());
        foreach (var file in (string[])[BundleNames.Manifest, BundleNames.SignatureFile])
        {
            var (a, b) = (rezip[$"signatures/4/{file}"], rezip[$"signatures/6/{file}"]);
            rezip.Set($"signatures/4/{file}", b).Set($"signatures/6/{file}", a);
        }

        var report = BundleVerifier.Verify(rezip.Reindex(made.Log).ToBytes(), made.Trust);
        Assert.Equal(["signatures/4/manifest.json", "signatures/6/manifest.json"], report.Faults.Select(f => f.Entry));
    }

    [Theory]
    [InlineData("t.okafor", "leaf 9 records the signature of leaf 4 a second time")]
    [InlineData("m.lindqvist", "the signature was given for another account: 't.okafor' instead of 'm.lindqvist'")]
    public void Verify_ASignatureThatAnotherLeafClaims_IsRefused(string actor, string words)
    {
        // The log's holder records a good signature a second time, for another request or another person.
        made.RecordAgain(4, actor);
        var report = BundleVerifier.Verify(made.ToBytes(), made.Trust);
        Assert.Equal(BundleOutcome.Bad, report.Outcome);
        Assert.Contains(report.Faults, f => f.Detail == words);
    }

    [Fact]
    public void Verify_ManifestThatDoesNotFitItsPlaceInTheLog_IsNamed()
    {
        // Each signed by the right person and recorded by the log's holder.
        var later = made.Leaves.Count;
        (Func<SignatureManifest, SignatureManifest> Change, string Words)[] cases =
        [
            (m => m with { Checkpoint = new Checkpoint(TestBundle.Origin, later + 1, Digest.Of("x"u8)) }, "but is itself fact"),
            (m => m with { Checkpoint = new Checkpoint(TestBundle.Origin, 3, made.RootAt(4)) }, "history was rewritten"),
            (m => m with { Checkpoint = m.Checkpoint with { Origin = "birch.example/protoledger" } }, "another origin"),
            (m => m with { Time = m.Time.AddHours(1) }, "after its own record"),
        ];
        foreach (var (change, words) in cases)
        {
            using var bundle = new TestBundle();
            bundle.Sign(bundle.Site.Physicist, "change-request/19", change);
            var faults = BundleVerifier.Verify(bundle.ToBytes(), bundle.Trust).Faults;
            Assert.Contains(words, Assert.Single(faults).Detail, StringComparison.Ordinal);
        }
    }

    [Fact]
    public void Verify_CheckpointOfAnotherOriginOrWithWitnessesOnly_IsNamed()
    {
        var contents = made.Contents();
        var foreign = new Rezip(made.ToBytes())
            .Set(BundleNames.Checkpoint, made.Log.Sign(new Checkpoint("birch.example", made.Leaves.Count, made.RootAt(made.Leaves.Count))).ToBytes())
            .Reindex(made.Log).ToBytes();
        Assert.Contains("its origin is 'birch.example'", BundleVerifier.Verify(foreign, made.Trust).Faults[0].Detail, StringComparison.Ordinal);

        var witness = NoteSigner.WitnessFromSeed("witness.example", new byte[32]);
        var alone = contents.Checkpoint with { Signatures = [witness.Cosign(contents.Checkpoint, TestSite.Signing)] };
        var trust = made.Trust with { Keys = [made.Log.PublicKey, witness.PublicKey] };
        Assert.Contains("only witnesses", BundleVerifier.Verify(made.ToBytes(contents with { Checkpoint = alone }), trust).Faults[0].Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Verify_TrustedKeyOfAnotherLog_DoesNotSpeakForThisOne()
    {
        // A key that the reader trusts, but under another name than the origin of the log.
        var other = NoteSigner.Generate("birch.example");
        var bundle = new Rezip(made.ToBytes()).Set(BundleNames.LogKey, Encoding.UTF8.GetBytes($"{other.PublicKey}\n")).Reindex(other).ToBytes();
        var report = BundleVerifier.Verify(bundle, made.Trust with { Keys = [made.Log.PublicKey, other.PublicKey] });
        Assert.Contains("no log key named", report.Faults[0].Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void Verify_FromAStream_EqualsFromMemory()
    {
        using var stream = new MemoryStream(made.ToBytes());
        Assert.Equal(BundleOutcome.Good, BundleVerifier.Verify(stream, made.Trust).Outcome);
    }

    [Fact]
    public void Trust_ReadsAFolderAndRefusesOtherFiles()
    {
        var pem = Encoding.ASCII.GetBytes(made.Site.Authority.Certificate.ToPem());
        var key = Encoding.UTF8.GetBytes($"{made.Log.PublicKey}\n");
        var trust = BundleTrust.Parse([("site-ca.pem", pem), ("log.vkey", key)]).Require();
        Assert.Equal(BundleOutcome.Good, BundleVerifier.Verify(made.ToBytes(), trust).Outcome);
        Assert.Contains("log.vky", Assert.IsType<Parsed<BundleTrust>.Bad>(BundleTrust.Parse([("log.vky", key)])).Reason, StringComparison.Ordinal);
        Assert.IsType<Parsed<BundleTrust>.Bad>(BundleTrust.Parse([("a.pem", key)]));
        Assert.IsType<Parsed<BundleTrust>.Bad>(BundleTrust.Parse([("a.pem", [.. pem, .. pem])]));
        Assert.IsType<Parsed<BundleTrust>.Bad>(BundleTrust.Parse([("a.vkey", pem)]));
    }
}
