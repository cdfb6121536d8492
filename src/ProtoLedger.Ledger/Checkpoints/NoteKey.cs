using System.Buffers.Binary;
using System.Globalization;
using System.Security.Cryptography;
using System.Text;

namespace ProtoLedger.Ledger.Checkpoints;

/// <summary>
/// A public note key. Text form (C2SP signed-note): <c>name+keyId+base64(algorithm || key)</c>.
/// Algorithm 0x01 signs the text itself with Ed25519; 0x04 is a witness's timestamped cosignature
/// (C2SP tlog-cosignature, cosignature/v1).
/// </summary>
public sealed record NoteKey
{
    private const byte Ed25519Algorithm = 0x01;
    private const byte CosignatureAlgorithm = 0x04;
    private readonly byte[] publicKey;

    internal NoteKey(string name, bool isWitness, ReadOnlySpan<byte> publicKey)
    {
        if (!IsName(name))
        {
            throw new ArgumentException($"'{name}' cannot name a key: not empty, no white space, no plus sign.", nameof(name));
        }

        (Name, IsWitness, this.publicKey) = (name, isWitness, publicKey.ToArray());
        Id = KeyId(name, Algorithm, publicKey);
    }

    /// <summary>Name on the signature lines.</summary>
    public string Name { get; }

    /// <summary>First four bytes, big-endian, of SHA-256(name || 0x0A || algorithm || key).</summary>
    public uint Id { get; }

    /// <summary>True for a witness's cosignature key.</summary>
    public bool IsWitness { get; }

    private byte Algorithm => IsWitness ? CosignatureAlgorithm : Ed25519Algorithm;

    /// <summary>The text form.</summary>
    public override string ToString() =>
        $"{Name}+{Id.ToString("x8", CultureInfo.InvariantCulture)}+{Convert.ToBase64String([Algorithm, .. publicKey])}";

    /// <summary>Reads the text form; the key id has to fit the key.</summary>
    public static Parsed<NoteKey> Parse(string text) => Parsed<NoteKey>.From(() =>
    {
        if (text.Split('+', 3) is not [var name, var id, var base64] || !IsName(name))
        {
            throw new FormatException("a note key reads name+id+base64");
        }

        Span<byte> bytes = stackalloc byte[Ed25519.KeyLength + 3];
        if (!Convert.TryFromBase64String(base64, bytes, out var length) || length != 1 + Ed25519.KeyLength
            || bytes[0] is not (Ed25519Algorithm or CosignatureAlgorithm))
        {
            throw new FormatException("the note key is no Ed25519 or cosignature key");
        }

        var key = new NoteKey(name, bytes[0] == CosignatureAlgorithm, bytes[1..length]);
        return key.ToString() == text ? key : throw new FormatException($"the key id {id} does not fit the key");
    });

    /// <inheritdoc/>
    public bool Equals(NoteKey? other) => other is not null && ToString() == other.ToString();

    /// <inheritdoc/>
    public override int GetHashCode() => (int)(Id & int.MaxValue);

    internal static bool IsName(string name) =>
        name.Length > 0 && !name.Any(c => char.IsWhiteSpace(c) || char.IsControl(c) || c == '+');

    internal static byte[] CosignedMessage(string noteText, ulong timestamp) =>
        Encoding.UTF8.GetBytes($"cosignature/v1\ntime {timestamp.ToString(CultureInfo.InvariantCulture)}\n{noteText}");

    internal bool Verify(string noteText, ReadOnlySpan<byte> signature)
    {
        if (!IsWitness)
        {
            return Ed25519.Verify(publicKey, Encoding.UTF8.GetBytes(noteText), signature);
        }

        return signature.Length == 8 + Ed25519.SignatureLength
            && Ed25519.Verify(publicKey, CosignedMessage(noteText, BinaryPrimitives.ReadUInt64BigEndian(signature)), signature[8..]);
    }

    private static uint KeyId(string name, byte algorithm, ReadOnlySpan<byte> key)
    {
        byte[] input = [.. Encoding.UTF8.GetBytes(name), (byte)'\n', algorithm, .. key];
        return BinaryPrimitives.ReadUInt32BigEndian(SHA256.HashData(input));
    }
}
