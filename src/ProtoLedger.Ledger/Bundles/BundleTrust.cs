using System.Text;
using ProtoLedger.Ledger.Checkpoints;
using ProtoLedger.Ledger.Signatures;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>What a reader trusts from outside the bundle. Without it a bundle can only be called consistent.</summary>
/// <param name="Authorities">Certificates of site authorities.</param>
/// <param name="Keys">Note keys: the log's own and witnesses'.</param>
public sealed record BundleTrust(IReadOnlyList<SigningCertificate> Authorities, IReadOnlyList<NoteKey> Keys)
{
    /// <summary>Nothing is trusted.</summary>
    public static BundleTrust None { get; } = new([], []);

    /// <summary>
    /// Reads the files of a trust folder: <c>*.pem</c> holds one certificate, <c>*.vkey</c> one note key a line; other
    /// names are a fault, so that a misspelt file is not taken for trust that is not there.
    /// </summary>
    /// <param name="files">Name and bytes of each file.</param>
    public static Parsed<BundleTrust> Parse(IEnumerable<(string Name, byte[] Content)> files)
    {
        ArgumentNullException.ThrowIfNull(files);
        return Parsed<BundleTrust>.From(() =>
        {
            var (authorities, keys) = (new List<SigningCertificate>(), new List<NoteKey>());
            foreach (var (name, content) in files.OrderBy(f => f.Name, StringComparer.Ordinal))
            {
                var text = Encoding.UTF8.GetString(content);
                if (name.EndsWith(".pem", StringComparison.Ordinal))
                {
                    authorities.Add(Require(name, SigningCertificate.ParsePem(text)));
                }
                else if (name.EndsWith(".vkey", StringComparison.Ordinal))
                {
                    keys.AddRange(text.Split('\n', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries)
                        .Select(line => Require(name, NoteKey.Parse(line))));
                }
                else
                {
                    throw new FormatException($"{name}: a trust folder holds *.pem and *.vkey files");
                }
            }

            return new BundleTrust(authorities, keys);
        });
    }

    private static T Require<T>(string name, Parsed<T> parsed) => parsed switch
    {
        Parsed<T>.Bad(var reason) => throw new FormatException($"{name}: {reason}"),
        _ => parsed.Require(),
    };
}
