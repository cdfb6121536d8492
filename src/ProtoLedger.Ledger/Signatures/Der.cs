using System.Formats.Asn1;

namespace ProtoLedger.Ledger.Signatures;

/// <summary>Strict DER (X.690 section 10 and 11): only one way to write each value is accepted.</summary>
internal static class Der
{
    /// <summary>Reads one value and demands that nothing follows and that every part of it is DER.</summary>
    /// <exception cref="FormatException">Not DER.</exception>
    public static AsnReader Open(ReadOnlyMemory<byte> bytes, string name)
    {
        try
        {
            var reader = new AsnReader(bytes, AsnEncodingRules.DER);
            var value = reader.PeekEncodedValue();
            if (value.Length != bytes.Length)
            {
                throw new FormatException($"{name} is followed by {bytes.Length - value.Length} bytes that do not belong to it");
            }

            Walk(new AsnReader(value, AsnEncodingRules.DER), 0);
            return reader;
        }
        catch (AsnContentException fault)
        {
            throw new FormatException($"{name} is not DER", fault);
        }
    }

    /// <summary>Runs <paramref name="read"/> and turns structure faults into <see cref="FormatException"/>.</summary>
    public static T Read<T>(string name, Func<T> read)
    {
        try
        {
            return read();
        }
        catch (AsnContentException fault)
        {
            throw new FormatException($"{name} has another structure than expected", fault);
        }
    }

    private static void Walk(AsnReader reader, int depth)
    {
        if (depth > 32)
        {
            throw new AsnContentException("Nested too deeply.");
        }

        while (reader.HasData)
        {
            var tag = reader.PeekTag();
            if (tag.IsConstructed)
            {
                if (tag.TagClass == TagClass.Universal && !tag.HasSameClassAndValue(Asn1Tag.SetOf) && !tag.HasSameClassAndValue(Asn1Tag.Sequence))
                {
                    throw new AsnContentException("Only sequences and sets are constructed in DER.");
                }

                // A set is written in the order of its members' bytes; the reader checks that for universal sets.
                Walk(tag.HasSameClassAndValue(Asn1Tag.SetOf) ? reader.ReadSetOf() : reader.ReadSequence(tag), depth + 1);
            }
            else
            {
                Primitive(reader, tag);
            }
        }
    }

    private static void Primitive(AsnReader reader, Asn1Tag tag)
    {
        switch (tag.TagClass == TagClass.Universal ? (UniversalTagNumber)tag.TagValue : UniversalTagNumber.OctetString)
        {
            case UniversalTagNumber.Boolean:
                reader.ReadBoolean();
                break;
            case UniversalTagNumber.Integer:
                reader.ReadIntegerBytes();
                break;
            case UniversalTagNumber.BitString:
                reader.ReadBitString(out _);
                break;
            case UniversalTagNumber.Null:
                reader.ReadNull();
                break;
            case UniversalTagNumber.ObjectIdentifier:
                reader.ReadObjectIdentifier();
                break;
            default:
                reader.ReadEncodedValue();
                break;
        }
    }
}
