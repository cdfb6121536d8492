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

    [Fact]
    public void OpenSsl_RefusesForeignCertificates()
    {
        OpenSsl.Require();
        using var folder = new TemporaryFolder();
        using var other = new TestSite("Birch Hospital ProtoLedger");
        var (manifest, cms) = Sign(other.Physicist);
        folder.Write("manifest.json", manifest);
        folder.Write("approval.p7s", cms);
        folder.Write("site-ca.pem", Encoding.ASCII.GetBytes(site.Authority.Certificate.ToPem()));
        var (code, output) = OpenSsl.VerifyCms(folder.Path, TestSite.Signing);
        Assert.NotEqual(0, code);
        Assert.Contains("local issuer certificate", output, StringComparison.Ordinal);
        Assert.IsType<SignatureVerdict.ForeignAuthority>(Verify(manifest, cms, other.Physicist));
    }

    [Fact]
    public void OpenSsl_RefusesASignatureAfterRevocationAndAcceptsOneBefore()
    {
        // OpenSSL knows no time of revocation: it refuses every certificate on the list that it is given. So it gets the
        // list as of signing; our own verifier gets the newest list and compares times.
        OpenSsl.Require();
        using var folder = new TemporaryFolder();
        var (manifest, cms) = Sign(site.Physicist);
        folder.Write("manifest.json", manifest);
        folder.Write("approval.p7s", cms);
        int Check(params Revocation[] asOfSigning)
        {
            var list = site.Authority.IssueRevocationList(asOfSigning, 3, TestSite.Signing.AddMinutes(-1), TestSite.Signing.AddDays(1));
            var pem = site.Authority.Certificate.ToPem() + System.Security.Cryptography.PemEncoding.WriteString("X509 CRL", list) + "\n";
            folder.Write("site-ca.pem", Encoding.ASCII.GetBytes(pem));
            return OpenSsl.VerifyCms(folder.Path, TestSite.Signing, "-crl_check").ExitCode;
        }

        var serial = site.Physicist.Certificate.Serial;
        Assert.Equal(0, Check());
        Assert.Equal(0, Check(new Revocation(site.Other.Certificate.Serial, TestSite.Signing.AddDays(-1), RevocationReason.KeyCompromise)));
        Assert.NotEqual(0, Check(new Revocation(serial, TestSite.Signing.AddDays(-1), RevocationReason.KeyCompromise)));

        SignatureVerdict Ours(TimeSpan afterSigning) => new SignatureVerifier(
                site.Authority.Certificate, site.Revocations(new Revocation(serial, TestSite.Signing + afterSigning, RevocationReason.KeyCompromise)))
            .Verify(manifest, cms, site.Physicist.Certificate.Fingerprint);
        Assert.IsType<SignatureVerdict.Good>(Ours(TimeSpan.FromDays(1)));
        Assert.IsType<SignatureVerdict.CertificateRevoked>(Ours(TimeSpan.FromDays(-1)));
    }

    [Fact]
    public void OtherLibraries_AcceptAGoodSignatureToo()
    {
        var (manifest, cms) = Sign(site.Physicist);
        var platform = new System.Security.Cryptography.Pkcs.SignedCms(new System.Security.Cryptography.Pkcs.ContentInfo(manifest), detached: true);
        platform.Decode(cms);
        platform.CheckSignature(verifySignatureOnly: true);

        var managed = new Org.BouncyCastle.Cms.CmsSignedData(new Org.BouncyCastle.Cms.CmsProcessableByteArray(manifest), cms);
        var signer = managed.GetSignerInfos().GetSigners().Single();
        var certificate = managed.GetCertificates().EnumerateMatches(signer.SignerID).Single();
        Assert.True(signer.Verify(certificate));
        certificate.Verify(new Org.BouncyCastle.X509.X509Certificate(site.Authority.Certificate.ToDer()).GetPublicKey());
    }

    [Fact]
    public void Certificate_IsWhatAStandardChainBuilderAcceptsAtTheTimeOfSigning()
    {
        using var chain = new System.Security.Cryptography.X509Certificates.X509Chain();
        chain.ChainPolicy.TrustMode = System.Security.Cryptography.X509Certificates.X509ChainTrustMode.CustomRootTrust;
        chain.ChainPolicy.CustomTrustStore.Add(Load(site.Authority.Certificate));
        chain.ChainPolicy.VerificationTime = TestSite.Signing.UtcDateTime;
        chain.ChainPolicy.RevocationMode = System.Security.Cryptography.X509Certificates.X509RevocationMode.NoCheck;
        chain.ChainPolicy.DisableCertificateDownloads = true;
        Assert.True(chain.Build(Load(site.Physicist.Certificate)), string.Join(", ", chain.ChainStatus.Select(s => s.StatusInformation)));

        static System.Security.Cryptography.X509Certificates.X509Certificate2 Load(SigningCertificate certificate) =>
            System.Security.Cryptography.X509Certificates.X509CertificateLoader.LoadCertificate(certificate.ToDer());
    }

    [Fact]
    public void RevocationList_EveryFlippedByte_IsRefused()
    {
        var bytes = site.RevocationBytes(new Revocation(site.Other.Certificate.Serial, TestSite.Signing, RevocationReason.KeyCompromise));
        Assert.True(RevocationList.Parse(bytes).Require().IsSignedBy(site.Authority.Certificate));
        for (var i = 0; i < bytes.Length; i++)
        {
            var changed = (byte[])bytes.Clone();
            changed[i] ^= 0x01;
            Assert.False(RevocationList.Parse(changed) is Parsed<RevocationList>.Good(var list) && list.IsSignedBy(site.Authority.Certificate), $"byte {i}");
        }
    }

    [Fact]
    public void Authority_LoadedFromItsExport_IssuesForTheSameAnchor()
    {
        using var loaded = SiteAuthority.Load(site.Authority.Certificate, site.Authority.ExportPrivateKey());
        var renewed = loaded.Issue(site.Physicist.Certificate.Subject, site.Physicist.Key.PublicKey, TestSite.Start, TestSite.Start.AddYears(3), SiteAuthority.NewSerial());
        var manifest = site.Physicist.Manifest() with { Certificate = renewed.Fingerprint };
        var verdict = new SignatureVerifier(site.Authority.Certificate, site.Revocations())
            .Verify(manifest.ToBytes(), site.Physicist.Key.Sign(manifest, renewed), renewed.Fingerprint);
        Assert.IsType<SignatureVerdict.Good>(verdict);
        Assert.Throws<System.Security.Cryptography.CryptographicException>(() =>
            SiteAuthority.Load(site.Physicist.Certificate, site.Authority.ExportPrivateKey()));
    }

    private static (byte[] Manifest, byte[] Cms) Sign(TestSite.Signer signer)
    {
        var manifest = signer.Manifest();
        return (manifest.ToBytes(), signer.Key.Sign(manifest, signer.Certificate));
    }

    private SignatureVerdict Verify(byte[] manifest, byte[] cms, TestSite.Signer signer) =>
        new SignatureVerifier(site.Authority.Certificate, site.Revocations()).Verify(manifest, cms, signer.Certificate.Fingerprint);
}
