using System.Text;

namespace ProtoLedger.Ledger.Checkpoints;

/// <summary>
/// A signed note (C2SP signed-note v1.0.0): text that ends in a line feed, an empty line, one or more signature lines.
/// </summary>
/// <param name="Text">Signed text, ends in a line feed.</param>
/// <param name="Signatures">1 to <see cref="MostSignatures"/>.</param>
public sealed record SignedNote(string Text, IReadOnlyList<NoteSignature> Signatures)
{
    /// <summary>The specification asks verifiers for at least 16; more than this many lines are refused.</summary>
    public const int MostSignatures = 64;

    /// <summary>Longest note that is read, bytes.</summary>
    public const int MostBytes = 64 * 1024;

    private static readonly UTF8Encoding Strict = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>The bytes of the note.</summary>
    public byte[] ToBytes() => Strict.GetBytes(Text + "\n" + string.Concat(Signatures.Select(s => s.ToLine() + "\n")));

    /// <summary>The same note with one more signature at the end, for example a witness's.</summary>
    public SignedNote With(NoteSignature signature) => this with { Signatures = [.. Signatures, signature] };

    /// <summary>Reads a note strictly: valid UTF-8, no control character but line feed, nothing after the last signature.</summary>
    public static Parsed<SignedNote> Parse(ReadOnlySpan<byte> bytes)
    {
        var owned = bytes.ToArray();
        return Parsed<SignedNote>.From(() =>
        {
            var text = Decode(owned);
            var border = text.LastIndexOf("\n\n", StringComparison.Ordinal);
            if (border < 0 || !text.EndsWith('\n'))
            {
                throw new FormatException("a note has a text, an empty line and signature lines");
            }

            var lines = text[(border + 2)..].Split('\n');
            if (lines.Length is < 2 or > MostSignatures + 1)
            {
                throw new FormatException($"a note has 1 to {MostSignatures} signatures");
            }

            return new SignedNote(text[..(border + 1)], [.. lines[..^1].Select(NoteSignature.Parse)]);
        });
    }

    /// <summary>
    /// Checks the signatures: those of unknown keys are ignored, a known key's signature that fails spoils the note, and at
    /// least one known key has to have signed.
    /// </summary>
    public NoteVerification Verify(IReadOnlyCollection<NoteKey> knownKeys)
    {
        ArgumentNullException.ThrowIfNull(knownKeys);
        var good = new List<NoteKey>();
        foreach (var signature in Signatures)
        {
            foreach (var key in knownKeys.Where(k => k.Name == signature.KeyName && k.Id == signature.KeyId))
            {
                if (!key.Verify(Text, signature.Signature))
                {
                    return new NoteVerification.BadSignature(key.Name);
                }

                if (!good.Contains(key))
                {
                    good.Add(key);
                }
            }
        }

        return good.Count > 0
            ? new NoteVerification.Valid(good)
            : new NoteVerification.NoKnownKey([.. Signatures.Select(s => s.KeyName)]);
    }

    private static string Decode(byte[] bytes)
    {
        if (bytes.Length > MostBytes)
        {
            throw new FormatException($"the note has {bytes.Length} bytes, at most {MostBytes} are read");
        }

        try
        {
            var text = Strict.GetString(bytes);
            return text.Any(c => char.IsControl(c) && c != '\n')
                ? throw new FormatException("the note has a control character")
                : text;
        }
        catch (DecoderFallbackException fault)
        {
            throw new FormatException("the note is not UTF-8", fault);
        }
    }
}

/// <summary>Outcome of checking a note's signatures.</summary>
public abstract record NoteVerification
{
    private NoteVerification()
    {
    }

    /// <summary>Signed by these known keys, each named once.</summary>
    public sealed record Valid(IReadOnlyList<NoteKey> Keys) : NoteVerification;

    /// <summary>A line names a known key but its signature is wrong.</summary>
    public sealed record BadSignature(string KeyName) : NoteVerification;

    /// <summary>None of the signing keys is known.</summary>
    /// <param name="KeyNames">Names on the signature lines.</param>
    public sealed record NoKnownKey(IReadOnlyList<string> KeyNames) : NoteVerification;
}
