using System.Text;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Tests.Signatures;

public sealed class SignatureVerifierTests : IDisposable
{
    private readonly TestSite site = new();

    public void Dispose() => site.Dispose();

    [Fact]
    public void Verify_GoodSignature_SaysWhoSignedWhatAndWhen()
    {
        var (manifest, cms) = Sign(site.Physicist);
        var good = Assert.IsType<SignatureVerdict.Good>(Verify(manifest, cms, site.Physicist));
        Assert.Equal(
            "Tunde Okafor (physicist) signed 'approved' for protocol/brain-standard/7 at 2026-03-04T10:20:30.123456Z", good.Words);
    }

    [Fact]
    public void Verify_EveryFlippedByteOfTheSignatureFile_IsRefused()
    {
        // The platform's own CMS reader accepts 140 of 570 such files: see docs/security.md.
        var (manifest, cms) = Sign(site.Physicist);
        var accepted = new List<string>();
        for (var i = 0; i < cms.Length; i++)
        {
            foreach (var mask in (byte[])[0x01, 0x80, 0xFF])
            {
                var changed = (byte[])cms.Clone();
                changed[i] ^= mask;
                if (Verify(manifest, changed, site.Physicist) is SignatureVerdict.Good)
                {
                    accepted.Add($"{i} ^ {mask:x2}");
                }
            }
        }

        Assert.Empty(accepted);
    }

    [Fact]
    public void Verify_EveryFlippedByteOfTheManifest_IsContentChanged()
    {
        var (manifest, cms) = Sign(site.Physicist);
        for (var i = 0; i < manifest.Length; i++)
        {
            var changed = (byte[])manifest.Clone();
            changed[i] ^= 0x01;
            Assert.IsType<SignatureVerdict.ContentChanged>(Verify(changed, cms, site.Physicist));
        }
    }

    [Fact]
    public void Verify_TruncatedOrExtendedSignatureFile_IsMalformed()
    {
        var (manifest, cms) = Sign(site.Physicist);
        for (var length = 0; length < cms.Length; length++)
        {
            Assert.IsType<SignatureVerdict.Malformed>(Verify(manifest, cms[..length], site.Physicist));
        }

        Assert.Contains("followed by 1 bytes", Verify(manifest, [.. cms, 0], site.Physicist).Words, StringComparison.Ordinal);
        Assert.IsType<SignatureVerdict.Malformed>(Verify(manifest, [.. cms, .. cms], site.Physicist));
    }

    [Fact]
    public void OpenSsl_AcceptsAGoodSignatureAndRefusesChangedContent()
    {
        OpenSsl.Require();
        using var folder = new TemporaryFolder();
        var (manifest, cms) = Sign(site.Physicist);
        folder.Write("manifest.json", manifest);
        folder.Write("approval.p7s", cms);
        folder.Write("site-ca.pem", Encoding.ASCII.GetBytes(site.Authority.Certificate.ToPem()));
        var (code, output) = OpenSsl.VerifyCms(folder.Path, TestSite.Signing);
        Assert.True(code == 0, output);

        manifest[20] ^= 1;
        folder.Write("manifest.json", manifest);
        Assert.NotEqual(0, OpenSsl.VerifyCms(folder.Path, TestSite.Signing).ExitCode);
    }

    private static (byte[] Manifest, byte[] Cms) Sign(TestSite.Signer signer)
    {
        var manifest = signer.Manifest();
        return (manifest.ToBytes(), signer.Key.Sign(manifest, signer.Certificate));
    }

    private SignatureVerdict Verify(byte[] manifest, byte[] cms, TestSite.Signer signer) =>
        new SignatureVerifier(site.Authority.Certificate, site.Revocations()).Verify(manifest, cms, signer.Certificate.Fingerprint);
}
