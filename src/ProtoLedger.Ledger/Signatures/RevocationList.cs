using System.Formats.Asn1;

namespace ProtoLedger.Ledger.Signatures;

/// <summary>A revocation list (RFC 5280 section 5), read strictly. Reading says nothing about who signed it.</summary>
public sealed class RevocationList
{
    private readonly byte[] signedPart;
    private readonly byte[] signature;

    private RevocationList(byte[] der)
    {
        var outer = Der.Open(der, "the revocation list");
        (signedPart, signature, Entries, IssuerName, ThisUpdate) = Der.Read("the revocation list", () =>
        {
            var list = outer.ReadSequence();
            var signed = list.PeekEncodedValue().ToArray();
            var (entries, issuer, thisUpdate) = Fields(list.ReadSequence());
            Algorithm(list.ReadSequence());
            var signatureBits = list.ReadBitString(out var unused);
            list.ThrowIfNotEmpty();
            return unused == 0
                ? (signed, signatureBits, entries, issuer, thisUpdate)
                : throw new AsnContentException("Odd bits.");
        });
    }

    /// <summary>Every revocation on the list.</summary>
    public IReadOnlyList<Revocation> Entries { get; }

    /// <summary>As of when the list is complete, whole seconds.</summary>
    public DateTimeOffset ThisUpdate { get; }

    internal byte[] IssuerName { get; }

    /// <summary>Reads DER bytes.</summary>
    public static Parsed<RevocationList> Parse(ReadOnlySpan<byte> der)
    {
        var owned = der.ToArray();
        return Parsed<RevocationList>.From(() => new RevocationList(owned));
    }

    /// <summary>True if <paramref name="authority"/> signed the list.</summary>
    public bool IsSignedBy(SigningCertificate authority)
    {
        ArgumentNullException.ThrowIfNull(authority);
        return IssuerName.AsSpan().SequenceEqual(authority.SubjectName) && authority.Verify(signedPart, signature);
    }

    private static (List<Revocation> Entries, byte[] Issuer, DateTimeOffset ThisUpdate) Fields(AsnReader fields)
    {
        if (fields.ReadInteger() != 1)
        {
            throw new AsnContentException("Not version 2.");
        }

        Algorithm(fields.ReadSequence());
        var issuer = fields.ReadEncodedValue().ToArray();
        var thisUpdate = Time(fields);
        Time(fields);
        var entries = new List<Revocation>();
        if (fields.HasData && fields.PeekTag() == Asn1Tag.Sequence)
        {
            var list = fields.ReadSequence();
            while (list.HasData)
            {
                entries.Add(Entry(list.ReadSequence()));
            }
        }

        if (fields.HasData)
        {
            Extensions(fields.ReadSequence(new Asn1Tag(TagClass.ContextSpecific, 0)).ReadSequence(), Oids.CrlNumber, "2.5.29.35");
        }

        fields.ThrowIfNotEmpty();
        return (entries, issuer, thisUpdate);
    }

    private static Revocation Entry(AsnReader entry)
    {
        var serial = Convert.ToHexString(entry.ReadIntegerBytes().Span);
        var time = Time(entry);
        var reason = RevocationReason.Unspecified;
        if (entry.HasData)
        {
            foreach (var value in Extensions(entry.ReadSequence(), Oids.CrlReason))
            {
                reason = (RevocationReason)new AsnReader(value, AsnEncodingRules.DER).ReadEnumeratedValue<Reason>();
            }
        }

        return new Revocation(serial, time, reason);
    }

    /// <summary>Values of the extensions, all of which have to be among the known ones.</summary>
    private static List<byte[]> Extensions(AsnReader extensions, params string[] known)
    {
        var values = new List<byte[]>();
        while (extensions.HasData)
        {
            var extension = extensions.ReadSequence();
            var oid = extension.ReadObjectIdentifier();
            if (!known.Contains(oid))
            {
                throw new FormatException($"the revocation list has an extension {oid} that is not understood");
            }

            if (extension.PeekTag() == Asn1Tag.Boolean)
            {
                extension.ReadBoolean();
            }

            values.Add(extension.ReadOctetString());
        }

        return values;
    }

    private static void Algorithm(AsnReader algorithm)
    {
        if (algorithm.ReadObjectIdentifier() != Oids.EcdsaWithSha256 || algorithm.HasData)
        {
            throw new FormatException("the revocation list is not signed with ECDSA and SHA-256");
        }
    }

    private static DateTimeOffset Time(AsnReader reader) =>
        reader.PeekTag().HasSameClassAndValue(Asn1Tag.UtcTime) ? reader.ReadUtcTime() : reader.ReadGeneralizedTime();

    private enum Reason
    {
        Unspecified = 0,
        KeyCompromise = 1,
        AffiliationChanged = 3,
        Superseded = 4,
        CessationOfOperation = 5,
    }
}
