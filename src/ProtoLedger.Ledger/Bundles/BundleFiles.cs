namespace ProtoLedger.Ledger.Bundles;

/// <summary>Entries of a bundle by name, in file order.</summary>
internal sealed class BundleFiles(IReadOnlyList<(string Name, ReadOnlyMemory<byte> Content)> entries)
{
    private readonly Dictionary<string, ReadOnlyMemory<byte>> byName = entries.ToDictionary(e => e.Name, e => e.Content, StringComparer.Ordinal);

    public IReadOnlyList<string> Names { get; } = [.. entries.Select(e => e.Name)];

    public ReadOnlyMemory<byte> this[string name] => byName[name];

    /// <summary>The entry's bytes; null where it is missing. (A bare null would turn into empty memory here.)</summary>
    public ReadOnlyMemory<byte>? Find(string name) => byName.TryGetValue(name, out var content) ? content : default(ReadOnlyMemory<byte>?);

    public ReadOnlyMemory<byte> Require(string name, BundlePart part) =>
        Find(name) ?? throw new BundleFaultException(new BundleFault(part, name, "the entry is missing"));
}
