using System.Buffers.Binary;

namespace ProtoLedger.Ledger.Checkpoints;

/// <summary>One signature line of a signed note: em dash, key name, base64 of key id and signature.</summary>
/// <param name="KeyName">Not empty, without white space and plus sign.</param>
/// <param name="KeyId">First four bytes of the key's hash, big-endian.</param>
/// <param name="Signature">Bytes as the key's algorithm defines them.</param>
public sealed record NoteSignature(string KeyName, uint KeyId, byte[] Signature)
{
    internal const string Prefix = "\u2014 ";

    /// <summary>The line without its line feed.</summary>
    internal string ToLine()
    {
        var bytes = new byte[4 + Signature.Length];
        BinaryPrimitives.WriteUInt32BigEndian(bytes, KeyId);
        Signature.CopyTo(bytes, 4);
        return $"{Prefix}{KeyName} {Convert.ToBase64String(bytes)}";
    }

    internal static NoteSignature Parse(string line)
    {
        if (!line.StartsWith(Prefix, StringComparison.Ordinal)
            || line[Prefix.Length..].Split(' ') is not [var name, var base64] || !NoteKey.IsName(name))
        {
            throw new FormatException("a signature line of the note is malformed");
        }

        var bytes = new byte[base64.Length];
        return Convert.TryFromBase64String(base64, bytes, out var length) && length > 4
            && Convert.ToBase64String(bytes.AsSpan(0, length)) == base64
            ? new NoteSignature(name, BinaryPrimitives.ReadUInt32BigEndian(bytes), bytes[4..length])
            : throw new FormatException("a signature line of the note has malformed base64");
    }
}
