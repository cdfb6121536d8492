namespace ProtoLedger.Ledger.Bundles;

/// <summary>The checksum of zip files (reflected polynomial 0xEDB88320, PKWARE APPNOTE 4.4.7).</summary>
internal static class Crc32
{
    private static readonly uint[] Table = [.. Enumerable.Range(0, 256).Select(i => Enumerable.Range(0, 8).Aggregate((uint)i, Step))];

    public static uint Of(ReadOnlySpan<byte> bytes)
    {
        var crc = uint.MaxValue;
        foreach (var b in bytes)
        {
            crc = Table[(crc ^ b) & 0xFF] ^ crc >> 8;
        }

        return ~crc;
    }

    private static uint Step(uint value, int bit) => (value & 1) == 1 ? 0xEDB88320 ^ value >> 1 : value >> 1;
}
