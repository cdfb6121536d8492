using System.Globalization;

namespace ProtoLedger.Ledger.Checkpoints;

/// <summary>The state of a log (C2SP tlog-checkpoint v1.0.0): which log, how many leaves, which root.</summary>
/// <param name="Origin">Name of the log: not empty, no control characters, plus sign or white space at its ends.</param>
/// <param name="Size">Leaves, ≥ 0.</param>
/// <param name="Root">RFC 9162 root of the first <paramref name="Size"/> leaves.</param>
public sealed record Checkpoint(string Origin, long Size, Digest Root)
{
    /// <summary>
    /// Short form that is printed on a report: size, a colon and the first 16 hexadecimal digits of the root in groups of
    /// four, <c>42:1a2b-3c4d-5e6f-7081</c>. It stands for the checkpoint in print; the signed note is the proof.
    /// </summary>
    public string ShortHash
    {
        get
        {
            var hex = Root.ToString();
            return $"{Size.ToString(CultureInfo.InvariantCulture)}:{hex[..4]}-{hex[4..8]}-{hex[8..12]}-{hex[12..16]}";
        }
    }

    /// <summary>The note text: origin line, decimal size, base64 root, each ended by a line feed.</summary>
    /// <exception cref="ArgumentException">The origin or size breaks its rule.</exception>
    public string ToNoteText()
    {
        if (!IsOrigin(Origin))
        {
            throw new ArgumentException($"'{Origin}' cannot be an origin line.");
        }

        ArgumentOutOfRangeException.ThrowIfNegative(Size);
        return $"{Origin}\n{Size.ToString(CultureInfo.InvariantCulture)}\n{Root.ToBase64()}\n";
    }

    /// <summary>
    /// Reads a note text strictly. Extension lines after the root, which the specification allows but advises against, are refused.
    /// </summary>
    public static Parsed<Checkpoint> Parse(string text) => Parsed<Checkpoint>.From(() =>
    {
        var lines = text.Split('\n');
        if (lines is not [var origin, var size, var root, ""])
        {
            throw new FormatException("a checkpoint has three lines: origin, size, root");
        }

        if (!IsOrigin(origin))
        {
            throw new FormatException("the origin line of the checkpoint is not valid");
        }

        if (!long.TryParse(size, NumberStyles.None, CultureInfo.InvariantCulture, out var leaves)
            || leaves.ToString(CultureInfo.InvariantCulture) != size)
        {
            throw new FormatException("the size line of the checkpoint is not a decimal number without leading zeros");
        }

        Span<byte> hash = stackalloc byte[Digest.Length];
        if (root.Length != 44 || !Convert.TryFromBase64String(root, hash, out var length)
            || length != Digest.Length || Convert.ToBase64String(hash) != root)
        {
            throw new FormatException("the root line of the checkpoint is not the base64 of 32 bytes");
        }

        return new Checkpoint(origin, leaves, new Digest(hash));
    });

    private static bool IsOrigin(string text) =>
        text.Length > 0 && text.Trim() == text && !text.Contains('+', StringComparison.Ordinal) && !text.Any(char.IsControl);
}
