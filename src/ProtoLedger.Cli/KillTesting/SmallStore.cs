using ProtoLedger.Protocols.Store;

namespace ProtoLedger.Cli.KillTesting;

/// <summary>A part of a protocol store that a run computes within seconds: the first version of one protocol and everything that it needs.</summary>
internal static class SmallStore
{
    private const string EntryMark = "\n  - ";

    /// <summary>Copies the part.</summary>
    /// <param name="store">A protocol store.</param>
    /// <param name="protocol">Identifier of the protocol.</param>
    /// <param name="target">Folder to write to.</param>
    public static void Write(string store, string protocol, string target)
    {
        var history = File.ReadAllText(Path.Combine(store, "history.yaml"));
        var entries = StoreReader.ReadHistory(history).Require();
        var texts = history.Split(EntryMark);
        var kept = entries.Select((entry, i) => (entry, text: texts[i + 1]))
            .Where(e => e.entry.Version is not null && e.entry.Kind switch
            {
                Protocols.Documents.DocumentKind.Protocol => e.entry.Id == protocol && e.entry.Version == 1,
                Protocols.Documents.DocumentKind.Expectations => false,
                _ => true,
            })
            .ToList();
        foreach (var path in kept.Select(k => k.entry.Path).Append("people.yaml"))
        {
            var copy = Path.Combine(target, path);
            Directory.CreateDirectory(Path.GetDirectoryName(copy)!);
            File.Copy(Path.Combine(store, path), copy, overwrite: true);
        }

        File.WriteAllText(Path.Combine(target, "history.yaml"), texts[0] + EntryMark + string.Join(EntryMark, kept.Select(k => k.text.TrimEnd())) + "\n");
    }
}
