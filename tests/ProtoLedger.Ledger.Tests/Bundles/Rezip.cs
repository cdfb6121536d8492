using ProtoLedger.Ledger.Bundles;
using ProtoLedger.Ledger.Checkpoints;

namespace ProtoLedger.Ledger.Tests.Bundles;

/// <summary>Takes a bundle apart and puts it together again in ways that the writer would never do.</summary>
internal sealed class Rezip
{
    private readonly List<(string Name, byte[] Content)> entries;

    public Rezip(byte[] bundle) =>
        entries = [.. new StoredZipReader(bundle).Read().Select(e => (e.Name, e.Content.ToArray()))];

    public IEnumerable<string> Names => entries.Select(e => e.Name);

    public byte[] this[string name] => entries.Single(e => e.Name == name).Content;

    public Rezip Set(string name, byte[] content)
    {
        entries[entries.FindIndex(e => e.Name == name)] = (name, content);
        return this;
    }

    public Rezip Remove(string name)
    {
        entries.RemoveAll(e => e.Name == name);
        return this;
    }

    public Rezip Insert(int at, string name, byte[] content)
    {
        entries.Insert(at, (name, content));
        return this;
    }

    public Rezip Swap(int a, int b)
    {
        (entries[a], entries[b]) = (entries[b], entries[a]);
        return this;
    }

    /// <summary>Makes SHA256SUMS and bundle.json fit again, and the note with the given key; without a key the old note stays.</summary>
    public Rezip Reindex(NoteSigner? signer)
    {
        var old = BundleIndex.Parse(this[BundleNames.Index]).Require();
        BundleIndex.Item Item(string name) => new(name, this[name].Length, Digest.Of(this[name]));
        var items = Names.Where(n => n is not (BundleNames.Index or BundleNames.Note)).ToList();
        Set(BundleNames.Sums, BundleIndex.Sums(items.Select(Item)));
        Set(BundleNames.Index, (old with { Entries = [.. items.Select(Item)] }).ToBytes());
        return signer is null
            ? this
            : Set(BundleNames.Note, signer.SignText(BundleIndex.NoteText(old.Origin, this[BundleNames.Index])).ToBytes());
    }

    /// <summary>A well-formed stored zip of whatever the entries now are.</summary>
    public byte[] ToBytes()
    {
        using var output = new MemoryStream();
        var headers = new List<StoredEntry>();
        foreach (var (name, content) in entries)
        {
            headers.Add(new StoredEntry(name, Crc32.Of(content), (uint)content.Length, (uint)output.Position));
            output.Write(StoredZip.LocalHeader(headers[^1]));
            output.Write(content);
        }

        var start = (uint)output.Position;
        headers.ForEach(h => output.Write(StoredZip.CentralHeader(h)));
        output.Write(StoredZip.End(headers.Count, (uint)output.Position - start, start));
        return output.ToArray();
    }
}
