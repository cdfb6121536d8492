using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>What goes into a bundle.</summary>
/// <param name="Title">For people.</param>
/// <param name="Scope">What was asked for, in words: protocol, scanner, dates.</param>
/// <param name="Checkpoint">Signed checkpoint, with witnesses' cosignatures where there are any.</param>
/// <param name="LogKey">The key that signed it.</param>
/// <param name="Leaves">Bytes of all leaves that the checkpoint covers, from the first.</param>
/// <param name="Authority">The site authority's certificate.</param>
/// <param name="RevocationList">Its revocation list, DER, made at or after the newest signature in the bundle.</param>
/// <param name="Entries">Pages, contents, signatures; in any order. <see cref="BundleNames.FirstPage"/> has to be among them.</param>
public sealed record BundleContents(
    string Title, string Scope, SignedNote Checkpoint, NoteKey LogKey, IEnumerable<byte[]> Leaves,
    SigningCertificate Authority, byte[] RevocationList, IReadOnlyList<BundleEntry> Entries);

/// <summary>One entry, whose bytes are fetched only when its turn comes.</summary>
/// <param name="Name">See <see cref="BundleNames"/>.</param>
/// <param name="ReadAsync">Fetches the bytes; called once.</param>
public sealed record BundleEntry(string Name, Func<CancellationToken, ValueTask<byte[]>> ReadAsync)
{
    /// <summary>An entry whose bytes are at hand.</summary>
    public static BundleEntry Of(string name, byte[] content) => new(name, _ => ValueTask.FromResult(content));

    /// <summary>A page for people: <c>index.html</c>, or below <c>pages/</c>.</summary>
    public static BundleEntry Page(string name, byte[] content) =>
        Of(name == BundleNames.FirstPage ? name : BundleNames.Pages + name, content);

    /// <summary>A content that a leaf refers to by hash.</summary>
    public static BundleEntry Blob(Digest hash, Func<CancellationToken, ValueTask<byte[]>> read) => new(BundleNames.Blob(hash), read);

    /// <summary>Manifest and signature file of the signature whose leaf has this index; signed files follow by <see cref="Signed"/>.</summary>
    public static IReadOnlyList<BundleEntry> Signature(long leafIndex, byte[] manifest, byte[] cms) =>
    [
        Of(BundleNames.InSignature(leafIndex, BundleNames.Manifest), manifest),
        Of(BundleNames.InSignature(leafIndex, BundleNames.SignatureFile), cms),
    ];

    /// <summary>A signed file, under its name in the manifest.</summary>
    public static BundleEntry Signed(long leafIndex, string name, Func<CancellationToken, ValueTask<byte[]>> read) =>
        new(BundleNames.InSignature(leafIndex, name), read);
}
