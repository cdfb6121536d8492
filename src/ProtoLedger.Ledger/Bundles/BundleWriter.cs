using System.Text;
using ProtoLedger.Ledger.Checkpoints;

namespace ProtoLedger.Ledger.Bundles;

/// <summary>Writes a bundle to a stream that need not seek. The same contents always give the same bytes.</summary>
public static class BundleWriter
{
    /// <summary>Writes everything.</summary>
    /// <param name="output">Written from its present position; not closed.</param>
    /// <param name="contents">What to write.</param>
    /// <param name="signer">The log's own key: signs the list of entries.</param>
    /// <param name="cancellationToken">Stops between two entries.</param>
    /// <exception cref="ArgumentException">A name is not allowed or occurs twice, or there is no first page.</exception>
    /// <returns>SHA-256 of <c>bundle.json</c>, to be printed or recorded outside.</returns>
    public static async Task<Digest> WriteAsync(
        Stream output, BundleContents contents, NoteSigner signer, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(output);
        ArgumentNullException.ThrowIfNull(contents);
        ArgumentNullException.ThrowIfNull(signer);
        var origin = Checkpoint.Parse(contents.Checkpoint.Text).Require().Origin;
        var zip = new Zip(output);
        foreach (var entry in Ordered(contents))
        {
            cancellationToken.ThrowIfCancellationRequested();
            await zip.AddAsync(entry.Name, await entry.ReadAsync(cancellationToken).ConfigureAwait(false), cancellationToken).ConfigureAwait(false);
        }

        await zip.AddAsync(BundleNames.Sums, BundleIndex.Sums(zip.Items), cancellationToken).ConfigureAwait(false);
        var index = new BundleIndex(origin, contents.Title, contents.Scope, zip.Items).ToBytes();
        await zip.AddAsync(BundleNames.Index, index, cancellationToken).ConfigureAwait(false);
        var note = signer.SignText(BundleIndex.NoteText(origin, index)).ToBytes();
        await zip.AddAsync(BundleNames.Note, note, cancellationToken).ConfigureAwait(false);
        await zip.EndAsync(cancellationToken).ConfigureAwait(false);
        return Digest.Of(index);
    }

    private static List<BundleEntry> Ordered(BundleContents contents)
    {
        List<BundleEntry> entries =
        [
            .. contents.Entries,
            new(BundleNames.Leaves, _ => ValueTask.FromResult(Lines(contents.Leaves))),
            BundleEntry.Of(BundleNames.Checkpoint, contents.Checkpoint.ToBytes()),
            BundleEntry.Of(BundleNames.LogKey, Encoding.UTF8.GetBytes($"{contents.LogKey}\n")),
            BundleEntry.Of(BundleNames.Authority, Encoding.ASCII.GetBytes(contents.Authority.ToPem())),
            BundleEntry.Of(BundleNames.Revocations, contents.RevocationList),
        ];
        if (!entries.Any(e => e.Name == BundleNames.FirstPage))
        {
            throw new ArgumentException($"A bundle has a first page, {BundleNames.FirstPage}.", nameof(contents));
        }

        var names = new HashSet<string>(StringComparer.OrdinalIgnoreCase) { BundleNames.Sums, BundleNames.Index, BundleNames.Note };
        foreach (var entry in entries)
        {
            if (BundleNames.Fault(entry.Name) is { } fault)
            {
                throw new ArgumentException($"'{entry.Name}': {fault}.", nameof(contents));
            }

            if (!names.Add(entry.Name))
            {
                throw new ArgumentException($"'{entry.Name}' occurs twice.", nameof(contents));
            }
        }

        // The first page first, so that a reader of the listing finds it; then by name.
        return [.. entries.OrderBy(e => e.Name != BundleNames.FirstPage).ThenBy(e => e.Name, StringComparer.Ordinal)];
    }

    private static byte[] Lines(IEnumerable<byte[]> leaves)
    {
        using var lines = new MemoryStream();
        foreach (var leaf in leaves)
        {
            lines.Write(leaf);
            lines.WriteByte((byte)'\n');
        }

        return lines.ToArray();
    }

    private sealed class Zip(Stream output)
    {
        private readonly List<StoredEntry> entries = [];
        private readonly List<BundleIndex.Item> items = [];
        private uint offset;

        public IReadOnlyList<BundleIndex.Item> Items => items;

        public async Task AddAsync(string name, byte[] content, CancellationToken cancellationToken)
        {
            var entry = new StoredEntry(name, Crc32.Of(content), (uint)content.Length, offset);
            entries.Add(entry);
            items.Add(new BundleIndex.Item(name, content.Length, Digest.Of(content)));
            await WriteAsync(StoredZip.LocalHeader(entry), cancellationToken).ConfigureAwait(false);
            await WriteAsync(content, cancellationToken).ConfigureAwait(false);
        }

        public async Task EndAsync(CancellationToken cancellationToken)
        {
            var start = offset;
            foreach (var entry in entries)
            {
                await WriteAsync(StoredZip.CentralHeader(entry), cancellationToken).ConfigureAwait(false);
            }

            await WriteAsync(StoredZip.End(entries.Count, offset - start, start), cancellationToken).ConfigureAwait(false);
        }

        private async Task WriteAsync(byte[] bytes, CancellationToken cancellationToken)
        {
            await output.WriteAsync(bytes, cancellationToken).ConfigureAwait(false);
            offset = checked(offset + (uint)bytes.Length);
        }
    }
}
