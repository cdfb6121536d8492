using System.Collections.Concurrent;
using System.Formats.Asn1;
using System.Security.Cryptography;

namespace ProtoLedger.Ledger.Signatures;

/// <summary>
/// The one form of a detached CMS (RFC 5652) that this program writes: one signer by issuer and serial number, one
/// certificate, three signed attributes, ECDSA P-256 with SHA-256. Reading takes the file apart, writes it again from its
/// parts and demands equal bytes. General CMS readers, the platform's among them, accept many changed bytes; here each
/// byte is either the only possible one, or covered by the signature, or the signature value itself.
/// </summary>
internal sealed class SignatureFile
{
    private static readonly Asn1Tag Zero = new(TagClass.ContextSpecific, 0);

    private SignatureFile(SigningCertificate certificate, Digest contentDigest, DateTimeOffset signingTime, byte[] signature) =>
        (Certificate, ContentDigest, SigningTime, Signature) = (certificate, contentDigest, signingTime, signature);

    public SigningCertificate Certificate { get; }

    public Digest ContentDigest { get; }

    public DateTimeOffset SigningTime { get; }

    public byte[] Signature { get; }

    /// <summary>Either the file or the verdict that refuses it.</summary>
    /// <param name="bytes">The whole file.</param>
    /// <param name="known">Certificates met before, by their bytes' hash; new ones are added.</param>
    public static (SignatureFile? File, SignatureVerdict? Refusal) Read(
        byte[] bytes, ConcurrentDictionary<Digest, Parsed<SigningCertificate>> known)
    {
        try
        {
            var outer = Der.Open(bytes, "the file");
            return Der.Read("the file", () => Read(outer.ReadSequence(), bytes, known));
        }
        catch (FormatException fault)
        {
            return (null, new SignatureVerdict.Malformed(fault.Message));
        }
    }

    /// <summary>The DER bytes that the signature value covers.</summary>
    public byte[] SignedAttributes()
    {
        var writer = new AsnWriter(AsnEncodingRules.DER);
        WriteAttributes(writer, Asn1Tag.SetOf);
        return writer.Encode();
    }

    private static (SignatureFile?, SignatureVerdict?) Read(
        AsnReader content, byte[] bytes, ConcurrentDictionary<Digest, Parsed<SigningCertificate>> known)
    {
        Demand(content.ReadObjectIdentifier() == Oids.SignedData, "it is not signed data");
        var signedData = content.ReadSequence(Zero).ReadSequence();
        signedData.ReadInteger();
        signedData.ReadSetOf();
        signedData.ReadSequence();
        Demand(signedData.PeekTag().HasSameClassAndValue(Zero), "it has no certificate");
        var certificates = signedData.ReadSequence(Zero);
        var der = certificates.ReadEncodedValue().ToArray();
        Demand(!certificates.HasData, "it has more than one certificate");
        if (known.GetOrAdd(Digest.Of(der), _ => SigningCertificate.Parse(der)) is not Parsed<SigningCertificate>.Good(var certificate))
        {
            return (null, new SignatureVerdict.CertificateMalformed("it is not one DER certificate"));
        }

        Demand(signedData.PeekTag().HasSameClassAndValue(Asn1Tag.SetOf), "it carries revocation lists");
        var signers = signedData.ReadSetOf();
        return Count(signers) is var count and not 1
            ? (null, new SignatureVerdict.WrongSignerCount(count))
            : Signer(signers.ReadSequence(), certificate, bytes);
    }

    private static (SignatureFile?, SignatureVerdict?) Signer(AsnReader signer, SigningCertificate certificate, byte[] bytes)
    {
        signer.ReadInteger();
        signer.ReadEncodedValue();
        if (Foreign(signer, Oids.Sha256, "the signature's digest") is { } weakDigest)
        {
            return (null, weakDigest);
        }

        Demand(signer.PeekTag().HasSameClassAndValue(Zero), "it has no signed attributes");
        var (digest, time) = Attributes(signer.ReadSetOf(Zero));
        if (Foreign(signer, Oids.EcdsaWithSha256, "the signature") is { } weakSignature)
        {
            return (null, weakSignature);
        }

        var file = new SignatureFile(certificate, digest, time, signer.ReadOctetString());
        Demand(file.Encode().AsSpan().SequenceEqual(bytes), "it is not written as this program writes it");
        return (file, null);
    }

    private static (Digest Digest, DateTimeOffset Time) Attributes(AsnReader attributes)
    {
        (Digest? digest, DateTimeOffset? time) = (null, null);
        while (attributes.HasData)
        {
            var attribute = attributes.ReadSequence();
            var oid = attribute.ReadObjectIdentifier();
            var values = attribute.ReadSetOf();
            switch (oid)
            {
                case Oids.ContentType:
                    break;
                case Oids.MessageDigest:
                    var hash = values.ReadOctetString();
                    Demand(hash.Length == Digest.Length, "its digest has a wrong length");
                    digest = new Digest(hash);
                    break;
                case Oids.SigningTime:
                    time = values.ReadUtcTime();
                    break;
                default:
                    throw new FormatException($"it has a signed attribute {oid} that does not belong there");
            }
        }

        return (digest ?? throw new FormatException("it has no message digest"), time ?? throw new FormatException("it has no signing time"));
    }

    /// <summary>Writes the file from its parts, by the letter of RFC 5652.</summary>
    private byte[] Encode()
    {
        var writer = new AsnWriter(AsnEncodingRules.DER);
        using (writer.PushSequence())
        {
            writer.WriteObjectIdentifier(Oids.SignedData);
            using (writer.PushSequence(Zero))
            using (writer.PushSequence())
            {
                writer.WriteInteger(1);
                using (writer.PushSetOf())
                {
                    WriteSha256(writer);
                }

                using (writer.PushSequence())
                {
                    writer.WriteObjectIdentifier(Oids.Data);
                }

                using (writer.PushSetOf(Zero))
                {
                    writer.WriteEncodedValue(Certificate.ToDer());
                }

                using (writer.PushSetOf())
                {
                    WriteSigner(writer);
                }
            }
        }

        return writer.Encode();
    }

    private void WriteSigner(AsnWriter writer)
    {
        using var signer = writer.PushSequence();
        writer.WriteInteger(1);
        using (writer.PushSequence())
        {
            writer.WriteEncodedValue(Certificate.IssuerName);
            writer.WriteInteger(Convert.FromHexString(Certificate.Serial));
        }

        WriteSha256(writer);
        WriteAttributes(writer, Zero);
        using (writer.PushSequence())
        {
            writer.WriteObjectIdentifier(Oids.EcdsaWithSha256);
        }

        writer.WriteOctetString(Signature);
    }

    private void WriteAttributes(AsnWriter writer, Asn1Tag tag)
    {
        using var attributes = writer.PushSetOf(tag);
        WriteAttribute(writer, Oids.ContentType, w => w.WriteObjectIdentifier(Oids.Data));
        WriteAttribute(writer, Oids.SigningTime, w => w.WriteUtcTime(SigningTime));
        WriteAttribute(writer, Oids.MessageDigest, w => w.WriteOctetString(ContentDigest.ToArray()));
    }

    private static void WriteAttribute(AsnWriter writer, string oid, Action<AsnWriter> value)
    {
        using var attribute = writer.PushSequence();
        writer.WriteObjectIdentifier(oid);
        using var values = writer.PushSetOf();
        value(writer);
    }

    private static void WriteSha256(AsnWriter writer)
    {
        using var algorithm = writer.PushSequence();
        writer.WriteObjectIdentifier(Oids.Sha256);
    }

    /// <summary>Reads one algorithm identifier; a verdict if it is another than <paramref name="oid"/>.</summary>
    private static SignatureVerdict.WeakAlgorithm? Foreign(AsnReader reader, string oid, string where)
    {
        var actual = reader.ReadSequence().ReadObjectIdentifier();
        return actual == oid ? null : new SignatureVerdict.WeakAlgorithm(where, new Oid(actual).FriendlyName ?? actual);
    }

    private static int Count(AsnReader reader)
    {
        var copy = reader.Clone();
        var count = 0;
        for (; copy.HasData; count++)
        {
            copy.ReadEncodedValue();
        }

        return count;
    }

    private static void Demand(bool condition, string otherwise)
    {
        if (!condition)
        {
            throw new FormatException(otherwise);
        }
    }
}
