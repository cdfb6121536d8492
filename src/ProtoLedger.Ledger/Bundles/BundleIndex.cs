using System.Text;
using System.Text.Json.Nodes;
using ProtoLedger.Ledger.Canonical;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>Contents of <c>bundle.json</c>: what the bundle is about and every other entry with size and hash.</summary>
/// <param name="Origin">Origin of the log.</param>
/// <param name="Title">For people.</param>
/// <param name="Scope">What was asked for, in words: protocol, scanner, dates.</param>
/// <param name="Entries">In file order.</param>
internal sealed record BundleIndex(string Origin, string Title, string Scope, IReadOnlyList<BundleIndex.Item> Entries)
{
    private const string Kind = "protoledger-bundle";

    /// <summary>The canonical bytes.</summary>
    public byte[] ToBytes() => CanonicalJson.Write(new JsonObject
    {
        ["format"] = 1,
        ["kind"] = Kind,
        ["origin"] = Origin,
        ["title"] = Title,
        ["scope"] = Scope,
        ["entries"] = new JsonArray([.. Entries.Select(e => new JsonObject
        {
            ["name"] = e.Name,
            ["size"] = e.Size,
            ["sha256"] = e.Hash.ToString(),
        })]),
    });

    public static Parsed<BundleIndex> Parse(ReadOnlySpan<byte> bytes)
    {
        var owned = bytes.ToArray();
        return Parsed<BundleIndex>.From(() =>
        {
            var fields = CanonicalJson.Read(owned).Only("entries", "format", "kind", "origin", "scope", "title");
            if (fields.Integer("format") != 1 || fields.Text("kind") != Kind)
            {
                throw new FormatException("/format or /kind is not that of a bundle");
            }

            return new BundleIndex(
                fields.Text("origin"), fields.Text("title"), fields.Text("scope"),
                [.. fields.Objects("entries").Select(e => e.Only("name", "sha256", "size"))
                    .Select(e => new Item(e.Text("name"), e.Integer("size"), e.Digest("sha256")))]);
        });
    }

    /// <summary>
    /// Text of the note over the list. It has two lines and its first is no origin of a checkpoint, so that neither kind of
    /// note can stand in for the other.
    /// </summary>
    public static string NoteText(string origin, ReadOnlySpan<byte> index) => $"{origin} bundle\nsha256 {Digest.Of(index)}\n";

    /// <summary>Contents of <see cref="BundleNames.Sums"/> for the other entries.</summary>
    public static byte[] Sums(IEnumerable<Item> entries) =>
        Encoding.ASCII.GetBytes(string.Concat(entries.Where(e => e.Name != BundleNames.Sums).Select(e => $"{e.Hash}  {e.Name}\n")));

    /// <summary>One entry.</summary>
    /// <param name="Name">Name.</param>
    /// <param name="Size">Bytes.</param>
    /// <param name="Hash">SHA-256.</param>
    public sealed record Item(string Name, long Size, Digest Hash);
}
