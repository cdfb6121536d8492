using System.Numerics;
using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;

namespace ProtoLedger.Ledger.Signatures;

/// <summary>
/// The site's own certificate authority (ECDSA P-256): issues person certificates and revocation lists. It cannot sign
/// an approval itself, because its certificate lacks the key usage for that.
/// </summary>
public sealed class SiteAuthority : IDisposable
{
    private const int SerialLength = 16;
    private readonly ECDsa key;
    private readonly string site;

    private SiteAuthority(SigningCertificate certificate, ECDsa key) =>
        (Certificate, this.key, site) = (certificate, key, certificate.Subject.DisplayName);

    /// <summary>The self-signed certificate: the trust anchor that reviewers keep.</summary>
    public SigningCertificate Certificate { get; }

    /// <summary>Makes a new authority with a new key.</summary>
    /// <param name="site">Name of the site, for example "Linden Hospital ProtoLedger".</param>
    /// <param name="notBefore">First moment of validity.</param>
    /// <param name="notAfter">Last moment of validity.</param>
    public static SiteAuthority Create(string site, DateTimeOffset notBefore, DateTimeOffset notAfter)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(site);
        var key = ECDsa.Create(ECCurve.NamedCurves.nistP256);
        var name = new X500DistinguishedNameBuilder();
        name.AddCommonName(site);
        var request = new CertificateRequest(name.Build(), key, HashAlgorithmName.SHA256);
        request.CertificateExtensions.Add(X509BasicConstraintsExtension.CreateForCertificateAuthority(0));
        request.CertificateExtensions.Add(new X509KeyUsageExtension(X509KeyUsageFlags.KeyCertSign | X509KeyUsageFlags.CrlSign, critical: true));
        request.CertificateExtensions.Add(new X509SubjectKeyIdentifierExtension(request.PublicKey, critical: false));
        using var certificate = request.Create(
            request.SubjectName, X509SignatureGenerator.CreateForECDsa(key), notBefore, notAfter, NewSerial());
        return new SiteAuthority(SigningCertificate.Parse(certificate.RawData).Require(), key);
    }

    /// <summary>Takes up a stored authority.</summary>
    /// <param name="certificate">Its certificate.</param>
    /// <param name="privateKey">PKCS #8 DER as <see cref="ExportPrivateKey"/> gave it.</param>
    /// <exception cref="CryptographicException">The key cannot be read or does not belong to the certificate.</exception>
    public static SiteAuthority Load(SigningCertificate certificate, ReadOnlySpan<byte> privateKey)
    {
        ArgumentNullException.ThrowIfNull(certificate);
        var key = ECDsa.Create();
        key.ImportPkcs8PrivateKey(privateKey, out _);
        return key.ExportSubjectPublicKeyInfo().AsSpan().SequenceEqual(certificate.PublicKey)
            ? new SiteAuthority(certificate, key)
            : throw new CryptographicException("The private key does not belong to the authority's certificate.");
    }

    /// <summary>A fresh positive serial number of 16 bytes from the operating system's randomness.</summary>
    public static byte[] NewSerial()
    {
        var serial = RandomNumberGenerator.GetBytes(SerialLength);
        serial[0] = (byte)(serial[0] & 0x7F | 0x40);
        return serial;
    }

    /// <summary>The secret, PKCS #8 DER, not encrypted.</summary>
    public byte[] ExportPrivateKey() => key.ExportPkcs8PrivateKey();

    /// <summary>Issues a certificate, also for renewal (same person, same or new key, new serial number).</summary>
    /// <param name="person">Account and display name, neither empty.</param>
    /// <param name="publicKey"><see cref="PersonKey.PublicKey"/>.</param>
    /// <param name="notBefore">First moment of validity.</param>
    /// <param name="notAfter">Last moment, within the authority's own validity.</param>
    /// <param name="serial">Positive number, big-endian, not used before; see <see cref="NewSerial"/>.</param>
    public SigningCertificate Issue(
        Person person, ReadOnlySpan<byte> publicKey, DateTimeOffset notBefore, DateTimeOffset notAfter, ReadOnlySpan<byte> serial)
    {
        ArgumentNullException.ThrowIfNull(person);
        ArgumentException.ThrowIfNullOrWhiteSpace(person.Account);
        ArgumentException.ThrowIfNullOrWhiteSpace(person.DisplayName);
        var name = new X500DistinguishedNameBuilder();
        name.Add(Oids.AccountAttribute, person.Account);
        name.AddCommonName(person.DisplayName);
        name.AddOrganizationName(site);
        var request = new CertificateRequest(
            name.Build(), System.Security.Cryptography.X509Certificates.PublicKey.CreateFromSubjectPublicKeyInfo(publicKey, out _),
            HashAlgorithmName.SHA256);
        request.CertificateExtensions.Add(X509BasicConstraintsExtension.CreateForEndEntity(critical: true));
        request.CertificateExtensions.Add(
            new X509KeyUsageExtension(X509KeyUsageFlags.DigitalSignature | X509KeyUsageFlags.NonRepudiation, critical: true));
        request.CertificateExtensions.Add(new X509EnhancedKeyUsageExtension([new Oid(Oids.DocumentSigning)], critical: false));
        request.CertificateExtensions.Add(new X509SubjectKeyIdentifierExtension(request.PublicKey, critical: false));
        request.CertificateExtensions.Add(KeyIdentifier());
        using var certificate = request.Create(
            new X500DistinguishedName(Certificate.SubjectName), X509SignatureGenerator.CreateForECDsa(key), notBefore, notAfter, serial);
        return SigningCertificate.Parse(certificate.RawData).Require();
    }

    /// <summary>Issues a revocation list (DER) with every revocation up to now.</summary>
    /// <param name="revocations">All of them, not only new ones.</param>
    /// <param name="number">Rises with each list.</param>
    /// <param name="thisUpdate">As of when the list is complete.</param>
    /// <param name="nextUpdate">When the next one comes at the latest.</param>
    public byte[] IssueRevocationList(
        IEnumerable<Revocation> revocations, long number, DateTimeOffset thisUpdate, DateTimeOffset nextUpdate)
    {
        ArgumentNullException.ThrowIfNull(revocations);
        var builder = new CertificateRevocationListBuilder();
        foreach (var revocation in revocations)
        {
            builder.AddEntry(Convert.FromHexString(revocation.Serial), revocation.Time, (X509RevocationReason)revocation.Reason);
        }

        return builder.Build(
            new X500DistinguishedName(Certificate.SubjectName), X509SignatureGenerator.CreateForECDsa(key),
            new BigInteger(number), nextUpdate, HashAlgorithmName.SHA256, KeyIdentifier(), thisUpdate);
    }

    /// <inheritdoc/>
    public void Dispose() => key.Dispose();

    private X509AuthorityKeyIdentifierExtension KeyIdentifier() =>
        X509AuthorityKeyIdentifierExtension.CreateFromSubjectKeyIdentifier(
            new X509SubjectKeyIdentifierExtension(
                System.Security.Cryptography.X509Certificates.PublicKey.CreateFromSubjectPublicKeyInfo(Certificate.PublicKey, out _),
                critical: false));
}
