using System.Buffers.Binary;
using System.Security.Cryptography;
using System.Text;

namespace ProtoLedger.Ledger.Checkpoints;

/// <summary>A private note key: the server's own for checkpoints, or a witness's.</summary>
public sealed class NoteSigner
{
    private readonly byte[] seed;

    private NoteSigner(string name, bool isWitness, byte[] seed)
    {
        this.seed = seed;
        PublicKey = new NoteKey(name, isWitness, Ed25519.PublicKey(seed));
    }

    /// <summary>What verifiers need.</summary>
    public NoteKey PublicKey { get; }

    /// <summary>Makes a new key from the operating system's randomness.</summary>
    /// <param name="name">Key name; for a log's own key the origin of its checkpoints.</param>
    public static NoteSigner Generate(string name) => new(name, false, RandomNumberGenerator.GetBytes(Ed25519.KeyLength));

    /// <summary>Takes up a stored key.</summary>
    /// <param name="name">Key name.</param>
    /// <param name="seed">32 bytes as <see cref="ExportSeed"/> gave them.</param>
    public static NoteSigner FromSeed(string name, ReadOnlySpan<byte> seed) => new(name, false, Checked(seed));

    /// <summary>A witness's cosignature key from its 32-byte seed.</summary>
    public static NoteSigner WitnessFromSeed(string name, ReadOnlySpan<byte> seed) => new(name, true, Checked(seed));

    /// <summary>The secret, 32 bytes.</summary>
    public byte[] ExportSeed() => [.. seed];

    /// <summary>Signs a checkpoint.</summary>
    public SignedNote Sign(Checkpoint checkpoint)
    {
        ArgumentNullException.ThrowIfNull(checkpoint);
        return SignText(checkpoint.ToNoteText());
    }

    /// <summary>Cosigns a note as a witness at a time (whole seconds are signed).</summary>
    public NoteSignature Cosign(SignedNote note, DateTimeOffset time)
    {
        ArgumentNullException.ThrowIfNull(note);
        if (!PublicKey.IsWitness)
        {
            throw new InvalidOperationException("Only a witness's key cosigns.");
        }

        var seconds = checked((ulong)time.ToUnixTimeSeconds());
        var signature = new byte[8 + Ed25519.SignatureLength];
        BinaryPrimitives.WriteUInt64BigEndian(signature, seconds);
        Ed25519.Sign(seed, NoteKey.CosignedMessage(note.Text, seconds)).CopyTo(signature, 8);
        return new NoteSignature(PublicKey.Name, PublicKey.Id, signature);
    }

    /// <summary>Signs a text that ends in a line feed.</summary>
    internal SignedNote SignText(string text) =>
        PublicKey.IsWitness
            ? throw new InvalidOperationException("A witness's key only cosigns.")
            : new SignedNote(text, [new NoteSignature(PublicKey.Name, PublicKey.Id, Ed25519.Sign(seed, Encoding.UTF8.GetBytes(text)))]);

    private static byte[] Checked(ReadOnlySpan<byte> seed) =>
        seed.Length == Ed25519.KeyLength
            ? seed.ToArray()
            : throw new ArgumentException($"An Ed25519 seed has {Ed25519.KeyLength} bytes, not {seed.Length}.", nameof(seed));
}
