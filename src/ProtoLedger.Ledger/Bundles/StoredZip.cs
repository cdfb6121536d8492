using System.Buffers.Binary;
using System.Text;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>
/// The only zip form that a bundle has (PKWARE APPNOTE 4.3): entries stored without compression, no extra fields,
/// comments, attributes or descriptors, a fixed date, no gap. So the same contents give the same bytes for ever, nothing
/// can expand on unpacking, and every byte of a file can be checked.
/// </summary>
internal static class StoredZip
{
    public const int LocalLength = 30;
    public const int CentralLength = 46;
    public const int EndLength = 22;
    public const int MostEntries = 65_000;

    private const ushort Version = 10;
    private const ushort FixedDate = 0x0021; // 1980-01-01, the earliest that the format knows.

    public static byte[] LocalHeader(StoredEntry entry)
    {
        var header = new byte[LocalLength + entry.Name.Length];
        BinaryPrimitives.WriteUInt32LittleEndian(header, 0x04034B50);
        Common(header.AsSpan(4), entry);
        Encoding.ASCII.GetBytes(entry.Name, header.AsSpan(LocalLength));
        return header;
    }

    public static byte[] CentralHeader(StoredEntry entry)
    {
        var header = new byte[CentralLength + entry.Name.Length];
        BinaryPrimitives.WriteUInt32LittleEndian(header, 0x02014B50);
        BinaryPrimitives.WriteUInt16LittleEndian(header.AsSpan(4), Version);
        Common(header.AsSpan(6), entry);
        BinaryPrimitives.WriteUInt32LittleEndian(header.AsSpan(42), entry.Offset);
        Encoding.ASCII.GetBytes(entry.Name, header.AsSpan(CentralLength));
        return header;
    }

    public static byte[] End(int entries, uint centralLength, uint centralOffset)
    {
        var end = new byte[EndLength];
        BinaryPrimitives.WriteUInt32LittleEndian(end, 0x06054B50);
        BinaryPrimitives.WriteUInt16LittleEndian(end.AsSpan(8), (ushort)entries);
        BinaryPrimitives.WriteUInt16LittleEndian(end.AsSpan(10), (ushort)entries);
        BinaryPrimitives.WriteUInt32LittleEndian(end.AsSpan(12), centralLength);
        BinaryPrimitives.WriteUInt32LittleEndian(end.AsSpan(16), centralOffset);
        return end;
    }

    /// <summary>The 26 bytes that both headers share, from "version needed" to "extra length".</summary>
    private static void Common(Span<byte> fields, StoredEntry entry)
    {
        BinaryPrimitives.WriteUInt16LittleEndian(fields, Version);
        BinaryPrimitives.WriteUInt16LittleEndian(fields[8..], FixedDate);
        BinaryPrimitives.WriteUInt32LittleEndian(fields[10..], entry.Crc);
        BinaryPrimitives.WriteUInt32LittleEndian(fields[14..], entry.Size);
        BinaryPrimitives.WriteUInt32LittleEndian(fields[18..], entry.Size);
        BinaryPrimitives.WriteUInt16LittleEndian(fields[22..], (ushort)entry.Name.Length);
    }
}

/// <summary>One entry of a stored zip.</summary>
internal sealed record StoredEntry(string Name, uint Crc, uint Size, uint Offset);
