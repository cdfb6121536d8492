using System.Buffers.Binary;
using System.Text;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>
/// Reads a <see cref="StoredZip"/> from its first byte to its last and refuses the first deviation, before anything is
/// unpacked. A size is believed only as far as the file really goes on.
/// </summary>
internal sealed class StoredZipReader(ReadOnlyMemory<byte> file)
{
    private readonly List<StoredEntry> entries = [];
    private readonly List<(string Name, ReadOnlyMemory<byte> Content)> contents = [];
    private readonly HashSet<string> names = new(StringComparer.OrdinalIgnoreCase);
    private int position;

    /// <summary>Entries in file order.</summary>
    /// <exception cref="BundleFaultException">The first deviation.</exception>
    public IReadOnlyList<(string Name, ReadOnlyMemory<byte> Content)> Read()
    {
        while (Signature() == 0x04034B50)
        {
            ReadEntry();
        }

        var start = (uint)position;
        foreach (var entry in entries)
        {
            Demand(StoredZip.CentralHeader(entry), entry.Name, "its record in the zip directory is not the one that belongs to it");
        }

        if (Signature() == 0x02014B50)
        {
            throw Fault("zip directory", "it has more records than the file has entries (a duplicate or hidden entry)");
        }

        Demand(StoredZip.End(entries.Count, (uint)position - start, start), "end of the zip file", "it is not the one that belongs to the entries");
        return position == file.Length
            ? contents
            : throw Fault("end of the zip file", $"{file.Length - position} bytes follow that do not belong to the bundle");
    }

    private void ReadEntry()
    {
        var header = Next(StoredZip.LocalLength, "zip entry", "the file ends within its header");
        var nameLength = BinaryPrimitives.ReadUInt16LittleEndian(header[26..]);
        var name = Encoding.Latin1.GetString(Peek(StoredZip.LocalLength, nameLength, "zip entry", "the file ends within its name"));
        if (BundleNames.Fault(name) is { } wrong)
        {
            throw Fault(Printable(name), wrong);
        }

        if (!names.Add(name))
        {
            throw Fault(name, "the name occurs twice (upper and lower case count as equal)");
        }

        if (entries.Count == StoredZip.MostEntries)
        {
            throw Fault(name, $"a bundle has at most {StoredZip.MostEntries} entries");
        }

        Check(name, header);
        var entry = new StoredEntry(
            name, BinaryPrimitives.ReadUInt32LittleEndian(header[14..]), BinaryPrimitives.ReadUInt32LittleEndian(header[22..]), (uint)position);
        Demand(StoredZip.LocalHeader(entry), name, "its zip header is not in the only form that is accepted (version, flags, date, extra fields)");
        if (entry.Size > file.Length - position)
        {
            throw Fault(name, $"it declares {entry.Size} bytes, {file.Length - position} are left in the file");
        }

        var content = file.Slice(position, (int)entry.Size);
        position += content.Length;
        if (Crc32.Of(content.Span) != entry.Crc)
        {
            throw Fault(name, "its bytes do not have the checksum that the zip header states");
        }

        entries.Add(entry);
        contents.Add((name, content));
    }

    private static void Check(string name, ReadOnlySpan<byte> header)
    {
        var method = BinaryPrimitives.ReadUInt16LittleEndian(header[8..]);
        var (packed, size) = (BinaryPrimitives.ReadUInt32LittleEndian(header[18..]), BinaryPrimitives.ReadUInt32LittleEndian(header[22..]));
        if (method != 0)
        {
            throw Fault(name, $"it is compressed (method {method}, {packed} bytes declared to unpack to {size}), bundle entries are stored");
        }

        if (packed != size)
        {
            throw Fault(name, $"it declares {packed} bytes packed but {size} unpacked, though it is not compressed");
        }
    }

    private uint Signature() =>
        file.Length - position >= 4 ? BinaryPrimitives.ReadUInt32LittleEndian(file.Span[position..]) : 0;

    private ReadOnlySpan<byte> Next(int length, string entry, string otherwise) => Peek(0, length, entry, otherwise);

    private ReadOnlySpan<byte> Peek(int ahead, int length, string entry, string otherwise) =>
        length <= file.Length - position - ahead ? file.Span.Slice(position + ahead, length) : throw Fault(entry, otherwise);

    private void Demand(byte[] expected, string entry, string otherwise)
    {
        if (!Next(expected.Length, entry, "the file ends within it").SequenceEqual(expected))
        {
            throw Fault(entry, otherwise);
        }

        position += expected.Length;
    }

    private static string Printable(string name) =>
        new([.. name.Take(80).Select(c => c is >= ' ' and < '\u007F' ? c : '?')]);

    private static BundleFaultException Fault(string entry, string detail) => new(new BundleFault(BundlePart.Container, entry, detail));
}
