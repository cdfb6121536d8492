using System.Buffers.Binary;
using System.IO.Compression;

namespace ProtoLedger.Reports.Pictures;

/// <summary>Writes greyscale PNG files (ISO/IEC 15948): 8 bits, no interlace, rows filtered by the difference to the row above.</summary>
internal static class Png
{
    private const byte UpFilter = 2;
    private static readonly byte[] Signature = [0x89, 0x50, 0x4E, 0x47, 0x0D, 0x0A, 0x1A, 0x0A];
    private static readonly uint[] CrcTable = MakeCrcTable();

    /// <summary>Encodes an image.</summary>
    /// <param name="pixels">width × height values, row by row from the top, 0 black to 255 white.</param>
    /// <param name="width">&gt; 0.</param>
    /// <param name="height">&gt; 0.</param>
    /// <exception cref="ArgumentException">The number of pixels does not fit.</exception>
    public static byte[] Encode(ReadOnlySpan<byte> pixels, int width, int height)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(width);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(height);
        if (pixels.Length != width * height)
            throw new ArgumentException($"{width} × {height} pixels are needed, {pixels.Length} were given.", nameof(pixels));
        using var file = new MemoryStream();
        file.Write(Signature);
        var header = new byte[13];
        BinaryPrimitives.WriteInt32BigEndian(header, width);
        BinaryPrimitives.WriteInt32BigEndian(header.AsSpan(4), height);
        header[8] = 8; // bits a sample; colour type 0, greyscale, and the methods 0 follow
        Chunk(file, "IHDR"u8, header);
        Chunk(file, "IDAT"u8, Compress(pixels, width, height));
        Chunk(file, "IEND"u8, []);
        return file.ToArray();
    }

    private static byte[] Compress(ReadOnlySpan<byte> pixels, int width, int height)
    {
        using var packed = new MemoryStream();
        using (var zlib = new ZLibStream(packed, CompressionLevel.Optimal, leaveOpen: true))
        {
            var line = new byte[width + 1];
            line[0] = UpFilter;
            for (var y = 0; y < height; y++)
            {
                for (var x = 0; x < width; x++)
                    line[x + 1] = unchecked((byte)(pixels[(y * width) + x] - (y > 0 ? pixels[((y - 1) * width) + x] : 0)));
                zlib.Write(line);
            }
        }

        return packed.ToArray();
    }

    private static void Chunk(MemoryStream file, ReadOnlySpan<byte> type, ReadOnlySpan<byte> content)
    {
        Span<byte> word = stackalloc byte[4];
        BinaryPrimitives.WriteInt32BigEndian(word, content.Length);
        file.Write(word);
        file.Write(type);
        file.Write(content);
        BinaryPrimitives.WriteUInt32BigEndian(word, Crc(content, Crc(type, 0xFFFFFFFF)) ^ 0xFFFFFFFF);
        file.Write(word);
    }

    private static uint Crc(ReadOnlySpan<byte> bytes, uint crc)
    {
        foreach (var b in bytes)
            crc = CrcTable[(crc ^ b) & 0xFF] ^ (crc >> 8);
        return crc;
    }

    /// <summary>Annex D of the standard.</summary>
    private static uint[] MakeCrcTable()
    {
        var table = new uint[256];
        for (uint n = 0; n < table.Length; n++)
        {
            var c = n;
            for (var k = 0; k < 8; k++)
                c = (c & 1) != 0 ? 0xEDB88320 ^ (c >> 1) : c >> 1;
            table[n] = c;
        }

        return table;
    }
}
