using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Tests.Signatures;

/// <summary>A good signature shown for anything but what it was given for is refused, and the difference is named.</summary>
public sealed class ReplayedSignatureTests
{
    private static readonly string[] Subjects =
        ["protocol/brain-standard/7", "protocol/brain-standard/8", "protocol/spine-standard/7", "change-request/17"];

    private static readonly SignatureMeaning[] Meanings =
        [SignatureMeaning.Reviewed, SignatureMeaning.Approved, SignatureMeaning.ClinicallyAccepted, SignatureMeaning.ReadyToLoad];

    [Fact]
    public void BoundElsewhere_EveryPairOfDifferentUses_IsRefused()
    {
        using var site = new TestSite();
        var uses = (from subject in Subjects
                    from meaning in Meanings
                    from signer in (TestSite.Signer[])[site.Physicist, site.Other]
                    from origin in (string[])["linden.example/protoledger", "birch.example/protoledger"]
                    select (subject, meaning, signer, origin)).ToList();
        var refused = 0;
        foreach (var made in uses)
        {
            var manifest = made.signer.Manifest(made.subject, made.meaning, "physicist", made.origin);
            foreach (var shown in uses)
            {
                var verdict = manifest.BoundElsewhere(shown.subject, shown.signer.Certificate.Subject.Account, "physicist", shown.meaning, shown.origin);
                Assert.Equal(made == shown, verdict is null);
                refused += verdict is null ? 0 : 1;
            }
        }

        Assert.True(refused >= 5_000 / 2, $"{refused} pairs");
        Assert.Equal(64 * 63, refused);
    }

    [Fact]
    public void BoundElsewhere_NamesFieldAndBothSides()
    {
        using var site = new TestSite();
        var verdict = site.Physicist.Manifest(Subjects[0]).BoundElsewhere(Subjects[1], "t.okafor", "physicist", SignatureMeaning.Approved, "linden.example/protoledger");
        Assert.Equal(new SignatureVerdict.BoundToOther("subject", Subjects[1], Subjects[0]), verdict);
    }

    [Fact]
    public void Verify_SignatureFilesExchangedBetweenManifests_IsContentChanged()
    {
        using var site = new TestSite();
        var manifests = (from subject in Subjects from meaning in Meanings select site.Physicist.Manifest(subject, meaning)).ToList();
        var files = manifests.Select(m => site.Physicist.Key.Sign(m, site.Physicist.Certificate)).ToList();
        var verifier = new SignatureVerifier(site.Authority.Certificate, site.Revocations());
        for (var m = 0; m < manifests.Count; m++)
        {
            for (var f = 0; f < files.Count; f++)
            {
                var verdict = verifier.Verify(manifests[m].ToBytes(), files[f], site.Physicist.Certificate.Fingerprint);
                Assert.Equal(m == f ? typeof(SignatureVerdict.Good) : typeof(SignatureVerdict.ContentChanged), verdict.GetType());
            }
        }
    }

    [Fact]
    public void Differs_ChangedOrUnsignedFile_IsNamed()
    {
        using var site = new TestSite();
        var manifest = site.Physicist.Manifest();
        Assert.Null(manifest.Differs("report.md", "# Report"u8));
        var changed = Assert.IsType<SignatureVerdict.ArtefactChanged>(manifest.Differs("report.md", "# Rapport"u8));
        Assert.Equal(Digest.Of("# Rapport"u8), changed.Actual);
        Assert.IsType<SignatureVerdict.ArtefactNotSigned>(manifest.Differs("notes.md", "# Report"u8));
    }
}
