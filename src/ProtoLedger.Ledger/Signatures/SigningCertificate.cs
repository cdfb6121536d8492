using System.Formats.Asn1;
using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;

namespace ProtoLedger.Ledger.Signatures;

/// <summary>A certificate, read strictly. Reading says nothing about trust: see <see cref="SignatureVerifier"/>.</summary>
public sealed class SigningCertificate
{
    private readonly byte[] der;
    private readonly byte[] signedPart;
    private readonly byte[] signature;

    private SigningCertificate(byte[] der)
    {
        this.der = der;
        Fingerprint = Digest.Of(der);
        (signedPart, SignatureAlgorithm, InnerSignatureAlgorithm, signature) = Split(der);
        using var certificate = X509CertificateLoader.LoadCertificate(der);
        Serial = certificate.SerialNumber;
        Subject = new Person(Attribute(certificate.SubjectName, Oids.AccountAttribute), Attribute(certificate.SubjectName, Oids.CommonName));
        SubjectName = certificate.SubjectName.RawData;
        IssuerName = certificate.IssuerName.RawData;
        IssuerText = certificate.IssuerName.Name;
        NotBefore = new DateTimeOffset(certificate.NotBefore.ToUniversalTime());
        NotAfter = new DateTimeOffset(certificate.NotAfter.ToUniversalTime());
        PublicKey = certificate.PublicKey.ExportSubjectPublicKeyInfo();
        foreach (var extension in certificate.Extensions)
        {
            Take(extension);
        }
    }

    /// <summary>SHA-256 of the DER bytes: what a ledger leaf pins.</summary>
    public Digest Fingerprint { get; }

    /// <summary>Serial number, upper-case hexadecimal.</summary>
    public string Serial { get; }

    /// <summary>Account and display name; empty texts where the certificate has none.</summary>
    public Person Subject { get; }

    /// <summary>First moment of validity, whole seconds.</summary>
    public DateTimeOffset NotBefore { get; }

    /// <summary>Last moment of validity, whole seconds.</summary>
    public DateTimeOffset NotAfter { get; }

    internal byte[] SubjectName { get; }

    internal byte[] IssuerName { get; }

    internal string IssuerText { get; }

    internal byte[] PublicKey { get; }

    internal string SignatureAlgorithm { get; }

    internal string InnerSignatureAlgorithm { get; }

    internal bool IsAuthority { get; private set; }

    internal X509KeyUsageFlags? KeyUsage { get; private set; }

    internal IReadOnlyList<string> ExtendedKeyUsage { get; private set; } = [];

    internal IReadOnlyList<string> UnknownCritical { get; private set; } = [];

    /// <summary>Reads a DER certificate.</summary>
    public static Parsed<SigningCertificate> Parse(ReadOnlySpan<byte> der)
    {
        var owned = der.ToArray();
        return Parsed<SigningCertificate>.From(() =>
        {
            try
            {
                return new SigningCertificate(owned);
            }
            catch (CryptographicException fault)
            {
                throw new FormatException("the certificate cannot be read", fault);
            }
        });
    }

    /// <summary>Reads a PEM file with exactly one certificate.</summary>
    public static Parsed<SigningCertificate> ParsePem(string pem)
    {
        if (!PemEncoding.TryFind(pem, out var fields) || pem[fields.Label] != "CERTIFICATE")
        {
            return new Parsed<SigningCertificate>.Bad("the file holds no PEM certificate");
        }

        return pem[fields.Location.End..].Contains("-----BEGIN", StringComparison.Ordinal)
            ? new Parsed<SigningCertificate>.Bad("the file holds more than one PEM block")
            : Parse(Convert.FromBase64String(pem[fields.Base64Data]));
    }

    /// <summary>The DER bytes, in a fresh array.</summary>
    public byte[] ToDer() => [.. der];

    /// <summary>PEM text that ends in a line feed.</summary>
    public string ToPem() => PemEncoding.WriteString("CERTIFICATE", der) + "\n";

    /// <summary>True if the public key is on the curve P-256.</summary>
    internal bool HasP256Key()
    {
        var reader = new AsnReader(PublicKey, AsnEncodingRules.DER).ReadSequence().ReadSequence();
        return reader.ReadObjectIdentifier() == Oids.EcPublicKey
            && reader.HasData && reader.PeekTag() == Asn1Tag.ObjectIdentifier && reader.ReadObjectIdentifier() == Oids.P256;
    }

    /// <summary>True if <paramref name="authority"/>'s P-256 key signed this certificate.</summary>
    internal bool IsSignedBy(SigningCertificate authority) => authority.Verify(signedPart, signature);

    /// <summary>True if this certificate's P-256 key made the DER signature over the SHA-256 of <paramref name="content"/>.</summary>
    internal bool Verify(ReadOnlySpan<byte> content, ReadOnlySpan<byte> derSignature)
    {
        using var key = ECDsa.Create();
        try
        {
            key.ImportSubjectPublicKeyInfo(PublicKey, out _);
            return key.VerifyData(content, derSignature, HashAlgorithmName.SHA256, DSASignatureFormat.Rfc3279DerSequence);
        }
        catch (CryptographicException)
        {
            return false;
        }
    }

    private static (byte[] Signed, string Algorithm, string InnerAlgorithm, byte[] Signature) Split(byte[] der)
    {
        var outer = Der.Open(der, "the certificate");
        return Der.Read("the certificate", () =>
        {
            var certificate = outer.ReadSequence();
            var signed = certificate.PeekEncodedValue().ToArray();
            var fields = certificate.ReadSequence();
            if (fields.PeekTag().TagClass == TagClass.ContextSpecific)
            {
                fields.ReadEncodedValue();
            }

            fields.ReadInteger();
            var inner = fields.ReadSequence().ReadObjectIdentifier();
            var algorithm = certificate.ReadSequence().ReadObjectIdentifier();
            var signature = certificate.ReadBitString(out var unused);
            certificate.ThrowIfNotEmpty();
            return unused == 0 ? (signed, algorithm, inner, signature) : throw new AsnContentException("Odd bits.");
        });
    }

    private static string Attribute(X500DistinguishedName name, string oid) =>
        name.EnumerateRelativeDistinguishedNames()
            .Where(part => !part.HasMultipleElements && part.GetSingleElementType().Value == oid)
            .Select(part => part.GetSingleElementValue())
            .FirstOrDefault() ?? "";

    private void Take(X509Extension extension)
    {
        switch (extension)
        {
            case X509BasicConstraintsExtension constraints:
                IsAuthority = constraints.CertificateAuthority;
                break;
            case X509KeyUsageExtension usage:
                KeyUsage = usage.KeyUsages;
                break;
            case X509EnhancedKeyUsageExtension usage:
                ExtendedKeyUsage = [.. usage.EnhancedKeyUsages.Cast<Oid>().Select(o => o.Value ?? "")];
                break;
            default:
                if (extension.Critical)
                {
                    UnknownCritical = [.. UnknownCritical, extension.Oid?.Value ?? ""];
                }

                break;
        }
    }
}
