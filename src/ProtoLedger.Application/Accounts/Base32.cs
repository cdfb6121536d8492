using System.Text;

namespace ProtoLedger.Application.Accounts;

/// <summary>Base32 of RFC 4648 without padding: how authenticator programs take a secret.</summary>
internal static class Base32
{
    private const string Alphabet = "ABCDEFGHIJKLMNOPQRSTUVWXYZ234567";

    /// <summary>The text form.</summary>
    public static string Encode(ReadOnlySpan<byte> bytes)
    {
        var text = new StringBuilder();
        var (buffer, bits) = (0, 0);
        foreach (var value in bytes)
        {
            (buffer, bits) = (((buffer << 8) | value) & 0xFFFF, bits + 8);
            for (; bits >= 5; bits -= 5)
                text.Append(Alphabet[(buffer >> (bits - 5)) & 31]);
        }

        if (bits > 0)
            text.Append(Alphabet[(buffer << (5 - bits)) & 31]);
        return text.ToString();
    }

    /// <summary>The bytes; an empty array for what is no Base32 text.</summary>
    public static byte[] Decode(string text)
    {
        var bytes = new List<byte>();
        var (buffer, bits) = (0, 0);
        foreach (var letter in text)
        {
            var value = Alphabet.IndexOf(letter, StringComparison.Ordinal);
            if (value < 0)
                return [];
            (buffer, bits) = (((buffer << 5) | value) & 0xFFFF, bits + 5);
            if (bits < 8)
                continue;
            bits -= 8;
            bytes.Add((byte)((buffer >> bits) & 0xFF));
        }

        return [.. bytes];
    }
}
