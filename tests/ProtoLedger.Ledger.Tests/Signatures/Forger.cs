using System.Security.Cryptography;
using System.Security.Cryptography.Pkcs;
using System.Security.Cryptography.X509Certificates;
using System.Text;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Tests.Signatures;

/// <summary>Makes certificates and signature files that deviate in one point from what the product makes.</summary>
internal sealed class Forger(TestSite site) : IDisposable
{
    private const X509KeyUsageFlags Usual = X509KeyUsageFlags.DigitalSignature | X509KeyUsageFlags.NonRepudiation;
    private const string DocumentSigning = "1.3.6.1.5.5.7.3.36";

    public AsymmetricAlgorithm Key { get; set; } = ECDsa.Create(ECCurve.NamedCurves.nistP256);

    public ECDsa IssuerKey { get; set; } = Ec(site.Authority.ExportPrivateKey());

    public byte[] IssuerName { get; set; } = site.Authority.Certificate.SubjectName;

    public byte[]? SubjectName { get; set; }

    public X509KeyUsageFlags? KeyUsage { get; set; } = Usual;

    public string[] ExtendedKeyUsage { get; set; } = [DocumentSigning];

    public bool IsAuthority { get; set; }

    public DateTimeOffset NotBefore { get; set; } = TestSite.Start;

    public DateTimeOffset NotAfter { get; set; } = TestSite.Start.AddYears(2);

    public HashAlgorithmName Hash { get; set; } = HashAlgorithmName.SHA256;

    public X509Extension? Extra { get; set; }

    public Action<CmsSigner>? OnSigner { get; set; }

    public bool WithoutAttributes { get; set; }

    public DateTimeOffset AttributeTime { get; set; } = TestSite.Signing;

    public static ECDsa Ec(byte[] pkcs8)
    {
        var key = ECDsa.Create();
        key.ImportPkcs8PrivateKey(pkcs8, out _);
        return key;
    }

    /// <summary>A certificate for the physicist with the deviations set above.</summary>
    public SigningCertificate Certificate()
    {
        var subject = new X500DistinguishedName(SubjectName ?? site.Physicist.Certificate.SubjectName);
        var request = Key is RSA rsa
            ? new CertificateRequest(subject, rsa, Hash, RSASignaturePadding.Pkcs1)
            : new CertificateRequest(subject, (ECDsa)Key, Hash);
        request.CertificateExtensions.Add(new X509BasicConstraintsExtension(IsAuthority, false, 0, true));
        if (KeyUsage is { } usage)
        {
            request.CertificateExtensions.Add(new X509KeyUsageExtension(usage, true));
        }

        if (ExtendedKeyUsage.Length > 0)
        {
            request.CertificateExtensions.Add(new X509EnhancedKeyUsageExtension([.. ExtendedKeyUsage.Select(o => new Oid(o))], false));
        }

        if (Extra is not null)
        {
            request.CertificateExtensions.Add(Extra);
        }

        var generator = Hash == HashAlgorithmName.SHA1 ? new Sha1Generator(IssuerKey) : X509SignatureGenerator.CreateForECDsa(IssuerKey);
        using var made = request.Create(
            new X500DistinguishedName(IssuerName), generator, NotBefore, NotAfter, SiteAuthority.NewSerial());
        return SigningCertificate.Parse(made.RawData).Require();
    }

    public static SignatureManifest Manifest(TestSite site, SigningCertificate certificate) =>
        site.Physicist.Manifest() with { Certificate = certificate.Fingerprint, Signer = certificate.Subject };

    public byte[] Cms(byte[] manifest, SigningCertificate certificate, bool detached = true, SignedCms? addTo = null)
    {
        using var bare = X509CertificateLoader.LoadCertificate(certificate.ToDer());
        using var signing = Key is RSA rsa ? bare.CopyWithPrivateKey(rsa) : bare.CopyWithPrivateKey((ECDsa)Key);
        var signer = new CmsSigner(SubjectIdentifierType.IssuerAndSerialNumber, signing)
        {
            DigestAlgorithm = new Oid("2.16.840.1.101.3.4.2.1"),
            IncludeOption = X509IncludeOption.EndCertOnly,
        };
        if (!WithoutAttributes)
        {
            signer.SignedAttributes.Add(new Pkcs9SigningTime(AttributeTime.UtcDateTime));
        }

        OnSigner?.Invoke(signer);
        var cms = addTo ?? new SignedCms(new ContentInfo(manifest), detached);
        cms.ComputeSignature(signer);
        return cms.Encode();
    }

    public static byte[] Replace(byte[] bytes, string from, string to)
    {
        var at = bytes.AsSpan().IndexOf(Encoding.UTF8.GetBytes(from));
        Assert.True(at >= 0, $"'{from}' is not in the bytes");
        var result = (byte[])bytes.Clone();
        Encoding.UTF8.GetBytes(to, result.AsSpan(at));
        return result;
    }

    public void Dispose()
    {
        Key.Dispose();
        IssuerKey.Dispose();
    }

    /// <summary>ECDSA with SHA-1 (1.2.840.10045.4.1), which the platform's own generator refuses to make.</summary>
    private sealed class Sha1Generator(ECDsa key) : X509SignatureGenerator
    {
        public override byte[] GetSignatureAlgorithmIdentifier(HashAlgorithmName hashAlgorithm) =>
            [0x30, 0x09, 0x06, 0x07, 0x2A, 0x86, 0x48, 0xCE, 0x3D, 0x04, 0x01];

        public override byte[] SignData(byte[] data, HashAlgorithmName hashAlgorithm) =>
            key.SignData(data, HashAlgorithmName.SHA1, DSASignatureFormat.Rfc3279DerSequence);

        protected override PublicKey BuildPublicKey() => CreateForECDsa(key).PublicKey;
    }
}
