using System.Text;
using ProtoLedger.Ledger.Checkpoints;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>
/// Keys that notes of this bundle are checked with: the reader's log keys of this origin and witnesses; without any log
/// key from outside the bundle's own, which then shows consistency but no origin.
/// </summary>
internal sealed class TrustedKeys
{
    private readonly List<NoteKey> keys;

    private TrustedKeys(List<NoteKey> keys) => this.keys = keys;

    public static TrustedKeys Choose(BundleFiles files, BundleTrust trust, string origin, Findings findings)
    {
        var own = OwnKey(files);
        if (own.Name != origin || own.IsWitness)
        {
            throw Fault(BundleNames.LogKey, $"it is no log key named '{origin}'");
        }

        var witnesses = trust.Keys.Where(k => k.IsWitness);
        var logKeys = trust.Keys.Where(k => !k.IsWitness).ToList();
        if (logKeys.Count == 0)
        {
            findings.OriginUnknown($"whose log this is: you gave no log key; the bundle's own key is {own}");
            return new TrustedKeys([own, .. witnesses]);
        }

        return logKeys.Contains(own)
            ? new TrustedKeys([own, .. witnesses])
            : throw Fault(BundleNames.LogKey, $"its key {own} is none of those that you trust");
    }

    /// <summary>Why the note does not count, or null.</summary>
    public string? Refusal(SignedNote note) => note.Verify(keys) switch
    {
        NoteVerification.BadSignature(var name) => $"the signature of key '{name}' is wrong",
        NoteVerification.NoKnownKey(var names) => $"none of the keys that count has signed it (signed by {string.Join(", ", names)})",
        NoteVerification.Valid(var good) when good.All(k => k.IsWitness) => "only witnesses have signed it, not the log",
        _ => null,
    };

    /// <summary>Witnesses that cosigned a note whose <see cref="Refusal"/> is null.</summary>
    public IEnumerable<string> Witnesses(SignedNote note) =>
        note.Verify(keys) is NoteVerification.Valid(var good) ? good.Where(k => k.IsWitness).Select(k => k.Name) : [];

    private static NoteKey OwnKey(BundleFiles files)
    {
        var text = Encoding.UTF8.GetString(files.Require(BundleNames.LogKey, BundlePart.Checkpoint).Span);
        return text.EndsWith('\n') && NoteKey.Parse(text[..^1]) is Parsed<NoteKey>.Good(var key)
            ? key
            : throw Fault(BundleNames.LogKey, "it is no note key");
    }

    private static BundleFaultException Fault(string entry, string detail) => new(new BundleFault(BundlePart.Checkpoint, entry, detail));
}
