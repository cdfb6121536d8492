using System.Security.Cryptography;
using System.Security.Cryptography.Pkcs;
using System.Security.Cryptography.X509Certificates;

namespace ProtoLedger.Ledger.Signatures;

/// <summary>A person's unwrapped private key (ECDSA P-256). Lives as short as possible; dispose it after signing.</summary>
public sealed class PersonKey : IDisposable
{
    private readonly ECDsa key;

    private PersonKey(ECDsa key) => this.key = key;

    /// <summary>SubjectPublicKeyInfo, DER.</summary>
    public byte[] PublicKey => key.ExportSubjectPublicKeyInfo();

    /// <summary>Makes a new key from the operating system's randomness.</summary>
    public static PersonKey Generate() => new(ECDsa.Create(ECCurve.NamedCurves.nistP256));

    /// <summary>Signs a manifest: detached CMS (RFC 5652), DER, with the signer's certificate, content type, digest and signing time.</summary>
    /// <param name="manifest">Canonical bytes; its account, certificate and time have to fit.</param>
    /// <param name="certificate">The certificate of this key.</param>
    /// <exception cref="ArgumentException">Manifest, certificate and key do not belong together.</exception>
    public byte[] Sign(SignatureManifest manifest, SigningCertificate certificate)
    {
        ArgumentNullException.ThrowIfNull(manifest);
        ArgumentNullException.ThrowIfNull(certificate);
        if (manifest.Certificate != certificate.Fingerprint || manifest.Signer != certificate.Subject)
        {
            throw new ArgumentException("The manifest names another signer or certificate.", nameof(manifest));
        }

        if (!certificate.PublicKey.AsSpan().SequenceEqual(PublicKey))
        {
            throw new ArgumentException("The certificate is of another key.", nameof(certificate));
        }

        using var bare = X509CertificateLoader.LoadCertificate(certificate.ToDer());
        using var signing = bare.CopyWithPrivateKey(key);
        var signer = new CmsSigner(SubjectIdentifierType.IssuerAndSerialNumber, signing)
        {
            DigestAlgorithm = new Oid(Oids.Sha256),
            IncludeOption = X509IncludeOption.EndCertOnly,
        };
        signer.SignedAttributes.Add(new Pkcs9SigningTime(manifest.Time.UtcDateTime));
        var cms = new SignedCms(new ContentInfo(manifest.ToBytes()), detached: true);
        cms.ComputeSignature(signer);
        return cms.Encode();
    }

    /// <summary>Encrypts the key under a signing passphrase; see <see cref="WrappedKey"/>.</summary>
    /// <param name="passphrase">Not empty; taken as its UTF-8 bytes, unchanged.</param>
    /// <param name="certificate">The certificate of this key: account and fingerprint are bound to the result.</param>
    /// <param name="iterations">PBKDF2 rounds, from <see cref="WrappedKey.LeastIterations"/> to <see cref="WrappedKey.MostIterations"/>.</param>
    public WrappedKey Wrap(string passphrase, SigningCertificate certificate, int iterations = WrappedKey.LeastIterations) =>
        WrappedKey.Wrap(key, passphrase, certificate, iterations);

    /// <inheritdoc/>
    public void Dispose() => key.Dispose();

    internal static PersonKey FromPkcs8(ReadOnlySpan<byte> pkcs8)
    {
        var key = ECDsa.Create();
        key.ImportPkcs8PrivateKey(pkcs8, out _);
        return new PersonKey(key);
    }
}
