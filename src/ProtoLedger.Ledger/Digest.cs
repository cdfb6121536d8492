using System.Runtime.CompilerServices;
using System.Security.Cryptography;

namespace ProtoLedger.Ledger;

/// <summary>A SHA-256 value, 32 bytes, compared by content. Text form: 64 lower-case hexadecimal digits.</summary>
public readonly struct Digest : IEquatable<Digest>
{
    /// <summary>Length in bytes.</summary>
    public const int Length = 32;

    private readonly Content content;

    /// <summary>Takes the 32 bytes of <paramref name="bytes"/>.</summary>
    /// <exception cref="ArgumentException">Not 32 bytes long.</exception>
    public Digest(ReadOnlySpan<byte> bytes)
    {
        if (bytes.Length != Length)
        {
            throw new ArgumentException($"A SHA-256 value has {Length} bytes, not {bytes.Length}.", nameof(bytes));
        }

        bytes.CopyTo(content);
    }

    /// <summary>SHA-256 of <paramref name="bytes"/>.</summary>
    public static Digest Of(ReadOnlySpan<byte> bytes)
    {
        Span<byte> hash = stackalloc byte[Length];
        SHA256.HashData(bytes, hash);
        return new Digest(hash);
    }

    /// <summary>Reads exactly 64 lower-case hexadecimal digits; false for anything else.</summary>
    public static bool TryParse(string? text, out Digest digest)
    {
        digest = default;
        if (text is not { Length: 2 * Length } || text.Any(c => c is not ((>= '0' and <= '9') or (>= 'a' and <= 'f'))))
        {
            return false;
        }

        digest = new Digest(Convert.FromHexString(text));
        return true;
    }

    /// <summary>Reads exactly 64 lower-case hexadecimal digits.</summary>
    /// <exception cref="FormatException">Anything else.</exception>
    public static Digest Parse(string text) =>
        TryParse(text, out var digest) ? digest : throw new FormatException("Expected 64 lower-case hexadecimal digits.");

    /// <summary>The bytes, in a fresh array.</summary>
    public byte[] ToArray() => ((ReadOnlySpan<byte>)content).ToArray();

    /// <summary>Writes the 32 bytes to the start of <paramref name="destination"/>.</summary>
    public void CopyTo(Span<byte> destination) => ((ReadOnlySpan<byte>)content).CopyTo(destination);

    /// <summary>Standard base64 with padding, 44 characters.</summary>
    public string ToBase64() => Convert.ToBase64String(content);

    /// <inheritdoc/>
    public override string ToString() => Convert.ToHexStringLower(content);

    /// <inheritdoc/>
    public bool Equals(Digest other) => ((ReadOnlySpan<byte>)content).SequenceEqual(other.content);

    /// <inheritdoc/>
    public override bool Equals(object? obj) => obj is Digest other && Equals(other);

    /// <inheritdoc/>
    public override int GetHashCode() => BitConverter.ToInt32(content);

    /// <summary>Equal bytes.</summary>
    public static bool operator ==(Digest left, Digest right) => left.Equals(right);

    /// <summary>Different bytes.</summary>
    public static bool operator !=(Digest left, Digest right) => !left.Equals(right);

    [InlineArray(Length)]
    private struct Content
    {
        private byte first;
    }
}
