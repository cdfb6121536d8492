using System.Globalization;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>Names of the entries of a bundle. The rule for names is narrow, so that unpacking is safe on every system.</summary>
public static class BundleNames
{
    /// <summary>List of all other entries, last but one in the file.</summary>
    public const string Index = "bundle.json";

    /// <summary>The log key's signed note over <see cref="Index"/>, last in the file.</summary>
    public const string Note = "bundle.note";

    /// <summary>For <c>sha256sum -c</c>: every entry but <see cref="Index"/>, <see cref="Note"/> and itself.</summary>
    public const string Sums = "SHA256SUMS";

    /// <summary>First page for people.</summary>
    public const string FirstPage = "index.html";

    /// <summary>The site authority's certificate.</summary>
    public const string Authority = "site-ca.pem";

    /// <summary>The authority's revocation list, DER.</summary>
    public const string Revocations = "revocations.crl";

    /// <summary>All leaves from the first, one canonical JSON object a line.</summary>
    public const string Leaves = "ledger/leaves.jsonl";

    /// <summary>Signed checkpoint over exactly these leaves.</summary>
    public const string Checkpoint = "ledger/checkpoint.txt";

    /// <summary>The log's public note key, for a reader who has no trust anchor from outside.</summary>
    public const string LogKey = "ledger/log.vkey";

    /// <summary>Name of a signed manifest within its signature's folder, and of its hash in the leaf.</summary>
    public const string Manifest = "manifest.json";

    /// <summary>Name of a signature file within its signature's folder, and of its hash in the leaf.</summary>
    public const string SignatureFile = "approval.p7s";

    /// <summary>Name under which a signature's leaf holds the SHA-256 of the signer's certificate (DER).</summary>
    public const string SignerCertificate = "certificate";

    internal const string Blobs = "blobs/";
    internal const string Signatures = "signatures/";
    internal const string Pages = "pages/";
    private const int MostCharacters = 200;

    /// <summary>Entry of a content, by its hash.</summary>
    public static string Blob(Digest hash) => $"{Blobs}{hash}";

    /// <summary>Entry in the folder of the signature whose leaf has this index.</summary>
    public static string InSignature(long leafIndex, string name) =>
        string.Create(CultureInfo.InvariantCulture, $"{Signatures}{leafIndex}/{name}");

    /// <summary>What is wrong with a name, or null: relative, forward slashes, ASCII letters, digits, point, hyphen and underscore.</summary>
    internal static string? Fault(string name)
    {
        if (name.Length is 0 or > MostCharacters)
        {
            return $"a name has 1 to {MostCharacters} characters";
        }

        foreach (var part in name.Split('/'))
        {
            if (part.Length == 0 || part[0] == '.' || part[^1] == '.' || !part.All(c => char.IsAsciiLetterOrDigit(c) || c is '.' or '-' or '_'))
            {
                return "the name is not a plain relative path (letters, digits, point, hyphen, underscore, forward slash)";
            }
        }

        return name is Index or Note or Sums or FirstPage or Authority or Revocations or Leaves or Checkpoint or LogKey
            || name.StartsWith(Blobs, StringComparison.Ordinal) || name.StartsWith(Signatures, StringComparison.Ordinal)
            || name.StartsWith(Pages, StringComparison.Ordinal)
            ? null
            : "no entry of this name belongs into a bundle";
    }

    /// <summary>Index of the leaf and file name of an entry in a signature's folder.</summary>
    internal static (long LeafIndex, string Name)? Signature(string name) =>
        name.StartsWith(Signatures, StringComparison.Ordinal) && name.Split('/') is [_, var number, var file]
            && long.TryParse(number, NumberStyles.None, CultureInfo.InvariantCulture, out var index)
            && InSignature(index, file) == name
            ? (index, file)
            : null;
}
