using Microsoft.AspNetCore.Identity;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Application.Accounts;

/// <summary>Password rules of NIST SP 800-63B-4 section 3.1.1: length, no known or derived word, no composition rules, no ageing.</summary>
public sealed class Passwords
{
    /// <summary>Fewest characters where the password is the only factor.</summary>
    public const int Shortest = 15;

    /// <summary>Most characters; the rule asks for at least 64.</summary>
    public const int Longest = 256;

    private static readonly Lazy<HashSet<string>> Common = new(ReadCommon);
    private readonly PasswordHasher<string> hasher = new();
    private readonly Lazy<string> decoy;

    /// <summary>On the platform's hasher.</summary>
    public Passwords() => decoy = new Lazy<string>(() => hasher.HashPassword("", Guid.NewGuid().ToString()));

    /// <summary>Refuses a password or passphrase that is too short, too long, common, or made of the account's own words.</summary>
    /// <param name="password">As typed.</param>
    /// <param name="pointer">JSON pointer of the field.</param>
    /// <param name="words">Words of the account: name and display name.</param>
    internal static Refusal? Refuse(string? password, string pointer, params string[] words)
    {
        var limit = $"{Shortest} to {Longest} characters, not a common one";
        var length = password?.EnumerateRunes().Count() ?? 0;
        if (length is < Shortest or > Longest)
            return Invalid.Field(pointer, $"{length} characters", limit, $"It must have {Shortest} to {Longest} characters.");
        var plain = Normal(password!);
        if (Common.Value.Contains(plain) || plain.Distinct().Count() < 5)
            return Invalid.Field(pointer, null, limit, "It is on the list of common passwords, or repeats a few characters.");
        return words.SelectMany(word => word.Split(' ', '.', '-')).Any(word => word.Length >= 5 && plain.Contains(Normal(word), StringComparison.Ordinal))
            ? Invalid.Field(pointer, null, limit, "It contains the name of the account.")
            : null;
    }

    /// <summary>Hash of a password, taken as typed, to be stored.</summary>
    internal string Hash(string password) => hasher.HashPassword("", password);

    /// <summary>True when it is the password; without a stored hash as much time is spent.</summary>
    internal bool Verify(string? stored, string password) =>
        hasher.VerifyHashedPassword("", stored ?? decoy.Value, password) != PasswordVerificationResult.Failed && stored is not null;

    private static string Normal(string text) => new([.. text.ToLowerInvariant().Where(char.IsLetterOrDigit)]);

    private static HashSet<string> ReadCommon()
    {
        using var stream = typeof(Passwords).Assembly.GetManifestResourceStream("ProtoLedger.Application.Accounts.common-passwords.txt")!;
        using var reader = new StreamReader(stream);
        return [.. reader.ReadToEnd().Split('\n', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries).Select(Normal)];
    }
}
