using System.Security.Cryptography;
using System.Security.Cryptography.Pkcs;
using System.Security.Cryptography.X509Certificates;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Tests.Signatures;

/// <summary>Forged, unsuitable and badly written signatures: each has its own verdict, and none is good.</summary>
public sealed class ForgedSignatureTests
{
    private static readonly Dictionary<string, (Type Verdict, string Words, Func<TestSite, SignatureVerdict> Run)> Cases = new()
    {
        // Certificates: who issued them.
        ["self-signed under the signer's own name"] = Is<SignatureVerdict.ForeignAuthority>("not by the trusted authority",
            s => Certificate(s, f => (f.IssuerName, f.IssuerKey) = (s.Physicist.Certificate.SubjectName, (ECDsa)f.Key))),
        ["self-signed under the authority's name"] = Is<SignatureVerdict.CertificateForged>("not signed by its key",
            s => Certificate(s, f => f.IssuerKey = (ECDsa)f.Key)),
        ["issued by another root"] = Is<SignatureVerdict.ForeignAuthority>("Birch", s => FromOtherRoot(s, "Birch Hospital")),
        ["issued by another root of the same name"] = Is<SignatureVerdict.CertificateForged>("not signed by its key",
            s => FromOtherRoot(s, "Linden Hospital ProtoLedger")),
        ["issued by a person's key"] = Is<SignatureVerdict.ForeignAuthority>("Märta",
            s => Certificate(s, f => f.IssuerName = s.Other.Certificate.SubjectName)),
        ["issued by the authority, then the name changed"] = Is<SignatureVerdict.CertificateForged>("not signed by its key", Renamed),

        // Certificates: what they are for.
        ["no extended key usage"] = Is<SignatureVerdict.WrongUsage>("extended key usage", s => Certificate(s, f => f.ExtendedKeyUsage = [])),
        ["extended key usage server authentication"] = Is<SignatureVerdict.WrongUsage>("extended key usage", s => Certificate(s, f => f.ExtendedKeyUsage = ["1.3.6.1.5.5.7.3.1"])),
        ["extended key usage e-mail"] = Is<SignatureVerdict.WrongUsage>("extended key usage", s => Certificate(s, f => f.ExtendedKeyUsage = ["1.3.6.1.5.5.7.3.4"])),
        ["extended key usage any"] = Is<SignatureVerdict.WrongUsage>("extended key usage", s => Certificate(s, f => f.ExtendedKeyUsage = ["2.5.29.37.0"])),
        ["extended key usage time stamping"] = Is<SignatureVerdict.WrongUsage>("extended key usage", s => Certificate(s, f => f.ExtendedKeyUsage = ["1.3.6.1.5.5.7.3.8"])),
        ["no key usage"] = Is<SignatureVerdict.WrongUsage>("key usage", s => Certificate(s, f => f.KeyUsage = null)),
        ["key usage revocation lists"] = Is<SignatureVerdict.WrongUsage>("key usage", s => Certificate(s, f => f.KeyUsage = X509KeyUsageFlags.CrlSign)),
        ["key usage digital signature alone"] = Is<SignatureVerdict.WrongUsage>("key usage", s => Certificate(s, f => f.KeyUsage = X509KeyUsageFlags.DigitalSignature)),
        ["key usage non-repudiation alone"] = Is<SignatureVerdict.WrongUsage>("key usage", s => Certificate(s, f => f.KeyUsage = X509KeyUsageFlags.NonRepudiation)),
        ["an authority below the authority"] = Is<SignatureVerdict.WrongUsage>("it is an authority", s => Certificate(s, f => f.IsAuthority = true)),
        ["the authority's own certificate and key"] = Is<SignatureVerdict.WrongUsage>("it is an authority", ByTheAuthorityItself),
        ["critical extension nobody knows"] = Is<SignatureVerdict.WrongUsage>("1.2.3.4.5",
            s => Certificate(s, f => f.Extra = new X509Extension("1.2.3.4.5", [5, 0], critical: true))),

        // Certificates: when.
        ["ended long before signing"] = Is<SignatureVerdict.CertificateExpired>("had ended", s => Certificate(s, f => f.NotAfter = TestSite.Signing.AddDays(-20))),
        ["ended one second before signing"] = Is<SignatureVerdict.CertificateExpired>("had ended", s => Certificate(s, f => f.NotAfter = TestSite.Signing.AddSeconds(-1))),
        ["begins a year after signing"] = Is<SignatureVerdict.CertificateNotYetValid>("begins at", s => Certificate(s, f => f.NotBefore = TestSite.Signing.AddYears(1))),
        ["begins one second after signing"] = Is<SignatureVerdict.CertificateNotYetValid>("begins at", s => Certificate(s, f => f.NotBefore = TestSite.Signing.AddSeconds(1))),
        ["ended after signing stays good"] = Is<SignatureVerdict.Good>("signed", s => Certificate(s, f => f.NotAfter = TestSite.Signing.AddSeconds(1))),
        ["revoked a day before signing"] = Is<SignatureVerdict.CertificateRevoked>("KeyCompromise", s => Revoked(s, TestSite.Signing.AddDays(-1))),
        ["revoked in the second of signing"] = Is<SignatureVerdict.CertificateRevoked>("was revoked", s => Revoked(s, TestSite.Signing.AddTicks(-TestSite.Signing.Ticks % TimeSpan.TicksPerSecond))),
        ["revoked one second after signing stays good"] = Is<SignatureVerdict.Good>("signed", s => Revoked(s, TestSite.Signing.AddSeconds(1))),

        // Certificates: algorithms and encoding.
        ["key on P-384"] = Is<SignatureVerdict.WeakAlgorithm>("only ECDSA P-256", s => Certificate(s, f => f.Key = ECDsa.Create(ECCurve.NamedCurves.nistP384))),
        ["key on P-521"] = Is<SignatureVerdict.WeakAlgorithm>("only ECDSA P-256", s => Certificate(s, f => f.Key = ECDsa.Create(ECCurve.NamedCurves.nistP521))),
        ["key RSA 1024"] = Is<SignatureVerdict.WeakAlgorithm>("only ECDSA P-256", s => Certificate(s, f => f.Key = RSA.Create(1024))),
        ["key RSA 3072"] = Is<SignatureVerdict.WeakAlgorithm>("only ECDSA P-256", s => Certificate(s, f => f.Key = RSA.Create(3072))),
        ["certificate signed with SHA-1"] = Is<SignatureVerdict.WeakAlgorithm>("the signer's certificate", s => Certificate(s, f => f.Hash = HashAlgorithmName.SHA1)),
        ["certificate signed with SHA-512"] = Is<SignatureVerdict.WeakAlgorithm>("the signer's certificate", s => Certificate(s, f => f.Hash = HashAlgorithmName.SHA512)),

        // The right certificate, but another person or pin.
        ["another person's certificate"] = Is<SignatureVerdict.OtherCertificate>("is pinned", s => Verify(s, Good(s.Other), s.Physicist.Certificate)),
        ["a renewed certificate that is not pinned"] = Is<SignatureVerdict.OtherCertificate>("is pinned",
            s => Verify(s, Good(s.Physicist), s.Authority.Issue(s.Physicist.Certificate.Subject, s.Physicist.Key.PublicKey, TestSite.Start, TestSite.Start.AddYears(3), SiteAuthority.NewSerial()))),
        ["manifest names another certificate"] = Is<SignatureVerdict.OtherCertificate>("is pinned", s => Manifest(s, m => m with { Certificate = s.Other.Certificate.Fingerprint })),
        ["manifest names another account"] = Is<SignatureVerdict.OtherPerson>("m.lindqvist", s => Manifest(s, m => m with { Signer = m.Signer with { Account = "m.lindqvist" } })),
        ["manifest names another display name"] = Is<SignatureVerdict.OtherPerson>("Somebody", s => Manifest(s, m => m with { Signer = m.Signer with { DisplayName = "Somebody Else" } })),
        ["manifest of another time than the signed attribute"] = Is<SignatureVerdict.OtherTime>("signed attribute", s => Manifest(s, m => m with { Time = m.Time.AddSeconds(-1) })),

        // The manifest.
        ["manifest with spaces"] = Is<SignatureVerdict.ManifestMalformed>("canonical", s => ManifestBytes(s, m => [.. m, (byte)'\n'])),
        ["manifest without a meaning that is known"] = Is<SignatureVerdict.ManifestMalformed>("/meaning", s => ManifestBytes(s, m => Forger.Replace(m, "\"approved\"", "\"abproved\""))),
        ["manifest without a role"] = Is<SignatureVerdict.ManifestMalformed>("/role", s => ManifestBytes(s, m => Forger.Replace(m, "\"role\":", "\"rule\":"))),
        ["manifest that is no JSON"] = Is<SignatureVerdict.ManifestMalformed>("JSON", s => ManifestBytes(s, _ => "approved"u8.ToArray())),

        // The signature file.
        ["signature by another key beside the right certificate"] = Is<SignatureVerdict.SignatureWrong>("does not belong", WithForeignValue),
        ["two signers"] = Is<SignatureVerdict.WrongSignerCount>("2 signers", TwoSigners),
        ["no signer"] = Is<SignatureVerdict.WrongSignerCount>("0 signers", NoSigner),
        ["digest SHA-1"] = Is<SignatureVerdict.WeakAlgorithm>("sha1", s => File(s, f => f.OnSigner = c => c.DigestAlgorithm = new Oid("1.3.14.3.2.26"))),
        ["digest SHA-512"] = Is<SignatureVerdict.WeakAlgorithm>("sha512", s => File(s, f => f.OnSigner = c => c.DigestAlgorithm = new Oid("2.16.840.1.101.3.4.2.3"))),
        ["no signed attributes"] = Is<SignatureVerdict.Malformed>("no signed attributes", s => File(s, f => f.WithoutAttributes = true)),
        ["additional signed attribute"] = Is<SignatureVerdict.Malformed>("does not belong", s => File(s, f => f.OnSigner = c => c.SignedAttributes.Add(new Pkcs9DocumentName("x")))),
        ["unsigned attribute"] = Is<SignatureVerdict.Malformed>("not written as", s => File(s, f => f.OnSigner = c => c.UnsignedAttributes.Add(new Pkcs9DocumentName("x")))),
        ["signer named by key identifier"] = Is<SignatureVerdict.Malformed>("not written as", s => File(s, f => f.OnSigner = c => c.SignerIdentifierType = SubjectIdentifierType.SubjectKeyIdentifier)),
        ["no certificate"] = Is<SignatureVerdict.Malformed>("no certificate", s => File(s, f => f.OnSigner = c => c.IncludeOption = X509IncludeOption.None)),
        ["two certificates"] = Is<SignatureVerdict.Malformed>("more than one certificate",
            s => File(s, f => f.OnSigner = c => c.Certificates.Add(X509CertificateLoader.LoadCertificate(s.Authority.Certificate.ToDer())))),
        ["content inside"] = Is<SignatureVerdict.Malformed>("not written as", s => File(s, _ => { }, detached: false)),
        ["indefinite length (BER)"] = Is<SignatureVerdict.Malformed>("not DER", s => Bytes(s, cms => [0x30, 0x80, .. cms[4..], 0, 0])),
        ["length in more bytes than needed (BER)"] = Is<SignatureVerdict.Malformed>("not DER", s => Bytes(s, cms => [0x30, 0x83, 0, .. cms[2..]])),
        ["three bytes behind"] = Is<SignatureVerdict.Malformed>("followed by 3 bytes", s => Bytes(s, cms => [.. cms, 1, 2, 3])),
        ["empty file"] = Is<SignatureVerdict.Malformed>("not DER", s => Bytes(s, _ => [])),

        // The authority and its revocation list.
        ["trusted certificate is a person's"] = Is<SignatureVerdict.AuthorityUnusable>("no authority", s => Authority(s, s.Other.Certificate)),
        ["trusted authority had ended"] = Is<SignatureVerdict.AuthorityUnusable>("valid from",
            s => Authority(s, SiteAuthority.Create("Old", TestSite.Start.AddYears(-9), TestSite.Start).Certificate)),
        ["trusted authority begins later"] = Is<SignatureVerdict.AuthorityUnusable>("valid from",
            s => Authority(s, SiteAuthority.Create("New", TestSite.Signing.AddDays(1), TestSite.Signing.AddYears(9)).Certificate)),
        ["trusted authority without certificate signing"] = Is<SignatureVerdict.AuthorityUnusable>("key usage",
            s => Authority(s, Made(s, f => (f.IsAuthority, f.KeyUsage) = (true, X509KeyUsageFlags.CrlSign)))),
        ["trusted authority without list signing"] = Is<SignatureVerdict.AuthorityUnusable>("key usage",
            s => Authority(s, Made(s, f => (f.IsAuthority, f.KeyUsage) = (true, X509KeyUsageFlags.KeyCertSign)))),
        ["trusted authority not signed by itself"] = Is<SignatureVerdict.AuthorityUnusable>("not signed by itself",
            s => Authority(s, Made(s, f => (f.IsAuthority, f.KeyUsage) = (true, X509KeyUsageFlags.KeyCertSign | X509KeyUsageFlags.CrlSign)))),
        ["revocation list of another authority"] = Is<SignatureVerdict.RevocationListUnusable>("did not sign it", ListOfOther),
        ["revocation list older than the signature"] = Is<SignatureVerdict.RevocationListUnusable>("older than", s => Verify(s, Good(s.Physicist), s.Physicist.Certificate,
            RevocationList.Parse(s.Authority.IssueRevocationList([], 1, TestSite.Signing.AddSeconds(-1), TestSite.Signing.AddYears(1))).Require())),
    };

    public static TheoryData<string> Names => [.. Cases.Keys];

    [Theory]
    [MemberData(nameof(Names))]
    public void Verify_EachForgery_HasItsOwnVerdict(string name)
    {
        using var site = new TestSite();
        var (expected, words, run) = Cases[name];
        var verdict = run(site);
        Assert.IsType(expected, verdict);
        Assert.Contains(words, verdict.Words, StringComparison.OrdinalIgnoreCase);
    }

    [Fact]
    public void Table_HasAtLeastFortyRefusals() =>
        Assert.True(Cases.Values.Count(c => c.Verdict != typeof(SignatureVerdict.Good)) >= 40);

    private static (Type, string, Func<TestSite, SignatureVerdict>) Is<T>(string words, Func<TestSite, SignatureVerdict> run) where T : SignatureVerdict =>
        (typeof(T), words, run);

    private static (byte[] Manifest, byte[] Cms) Good(TestSite.Signer signer)
    {
        var manifest = signer.Manifest();
        return (manifest.ToBytes(), signer.Key.Sign(manifest, signer.Certificate));
    }

    private static SignatureVerdict Verify(
        TestSite site, (byte[] Manifest, byte[] Cms) signature, SigningCertificate pinned, RevocationList? list = null, SigningCertificate? authority = null) =>
        new SignatureVerifier(authority ?? site.Authority.Certificate, list ?? site.Revocations())
            .Verify(signature.Manifest, signature.Cms, pinned.Fingerprint);

    private static SigningCertificate Made(TestSite site, Action<Forger> change)
    {
        using var forger = new Forger(site);
        change(forger);
        return forger.Certificate();
    }

    /// <summary>A certificate that deviates, with all else in order.</summary>
    private static SignatureVerdict Certificate(TestSite site, Action<Forger> change)
    {
        using var forger = new Forger(site);
        change(forger);
        var certificate = forger.Certificate();
        var manifest = Forger.Manifest(site, certificate).ToBytes();
        return Verify(site, (manifest, forger.Cms(manifest, certificate)), certificate);
    }

    /// <summary>A signature file that deviates, made with a certificate that is in order.</summary>
    private static SignatureVerdict File(TestSite site, Action<Forger> change, bool detached = true)
    {
        using var forger = new Forger(site);
        forger.Extra = new X509SubjectKeyIdentifierExtension(new byte[20], false);
        change(forger);
        var certificate = forger.Certificate();
        var manifest = Forger.Manifest(site, certificate).ToBytes();
        return Verify(site, (manifest, forger.Cms(manifest, certificate, detached)), certificate);
    }

    private static SignatureVerdict Bytes(TestSite site, Func<byte[], byte[]> change)
    {
        var (manifest, cms) = Good(site.Physicist);
        return Verify(site, (manifest, change(cms)), site.Physicist.Certificate);
    }

    private static SignatureVerdict Manifest(TestSite site, Func<SignatureManifest, SignatureManifest> change)
    {
        using var forger = new Forger(site);
        var certificate = forger.Certificate();
        var manifest = change(Forger.Manifest(site, certificate)).ToBytes();
        return Verify(site, (manifest, forger.Cms(manifest, certificate)), certificate);
    }

    private static SignatureVerdict ManifestBytes(TestSite site, Func<byte[], byte[]> change)
    {
        using var forger = new Forger(site);
        var certificate = forger.Certificate();
        var manifest = change(Forger.Manifest(site, certificate).ToBytes());
        return Verify(site, (manifest, forger.Cms(manifest, certificate)), certificate);
    }

    private static SignatureVerdict FromOtherRoot(TestSite site, string name)
    {
        using var root = SiteAuthority.Create(name, TestSite.Start, TestSite.Start.AddYears(20));
        return Certificate(site, f => (f.IssuerName, f.IssuerKey) = (root.Certificate.SubjectName, Forger.Ec(root.ExportPrivateKey())));
    }

    private static SignatureVerdict Renamed(TestSite site)
    {
        using var forger = new Forger(site);
        var certificate = SigningCertificate.Parse(Forger.Replace(forger.Certificate().ToDer(), "Tunde Okafor", "Tunde Okofar")).Require();
        var manifest = Forger.Manifest(site, certificate).ToBytes();
        return Verify(site, (manifest, forger.Cms(manifest, certificate)), certificate);
    }

    private static SignatureVerdict ByTheAuthorityItself(TestSite site)
    {
        using var forger = new Forger(site) { Key = Forger.Ec(site.Authority.ExportPrivateKey()) };
        var certificate = site.Authority.Certificate;
        var manifest = (Forger.Manifest(site, certificate) with { Signer = new Person("site", "Site") }).ToBytes();
        return Verify(site, (manifest, forger.Cms(manifest, certificate)), certificate);
    }

    private static SignatureVerdict Revoked(TestSite site, DateTimeOffset at) => Verify(
        site, Good(site.Physicist), site.Physicist.Certificate,
        site.Revocations(new Revocation(site.Physicist.Certificate.Serial, at, RevocationReason.KeyCompromise)));

    /// <summary>The value that another key made over the same attributes, put into the file of the right certificate.</summary>
    private static SignatureVerdict WithForeignValue(TestSite site)
    {
        var (manifest, cms) = Good(site.Physicist);
        var (file, _) = SignatureFile.Read(cms, new());
        using var thief = ECDsa.Create(ECCurve.NamedCurves.nistP256);
        byte[] value;
        do
        {
            value = thief.SignData(file!.SignedAttributes(), HashAlgorithmName.SHA256, DSASignatureFormat.Rfc3279DerSequence);
        }
        while (value.Length != file.Signature.Length);
        value.CopyTo(cms, cms.Length - value.Length);
        return Verify(site, (manifest, cms), site.Physicist.Certificate);
    }

    private static SignatureVerdict TwoSigners(TestSite site)
    {
        // A second signer with the same certificate, so that the number of signers is the only deviation.
        using var forger = new Forger(site);
        var certificate = forger.Certificate();
        var manifest = Forger.Manifest(site, certificate).ToBytes();
        var cms = new SignedCms(new ContentInfo(manifest), detached: true);
        forger.Cms(manifest, certificate, addTo: cms);
        forger.OnSigner = signer => signer.IncludeOption = X509IncludeOption.None;
        return Verify(site, (manifest, forger.Cms(manifest, certificate, addTo: cms)), certificate);
    }

    private static SignatureVerdict NoSigner(TestSite site)
    {
        var (manifest, bytes) = Good(site.Physicist);
        var cms = new SignedCms(new ContentInfo(manifest), detached: true);
        cms.Decode(bytes);
        cms.RemoveSignature(0);
        return Verify(site, (manifest, cms.Encode()), site.Physicist.Certificate);
    }

    private static SignatureVerdict Authority(TestSite site, SigningCertificate trusted) =>
        Verify(site, Good(site.Physicist), site.Physicist.Certificate, authority: trusted);

    private static SignatureVerdict ListOfOther(TestSite site)
    {
        using var other = SiteAuthority.Create("Linden Hospital ProtoLedger", TestSite.Start, TestSite.Start.AddYears(20));
        var list = RevocationList.Parse(other.IssueRevocationList([], 1, TestSite.Signing.AddDays(1), TestSite.Signing.AddDays(9))).Require();
        return Verify(site, Good(site.Physicist), site.Physicist.Certificate, list);
    }
}
