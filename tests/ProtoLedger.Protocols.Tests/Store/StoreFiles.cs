using System.Collections.Concurrent;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Store;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Protocols.Tests.Store;

/// <summary>The protocol store of the repository.</summary>
internal static class StoreFiles
{
    private static readonly ConcurrentDictionary<string, ParseResult.Parsed> Parsed = new();

    public static string Folder { get; } = SourceTree.Of("protocol-store");

    public static IReadOnlyList<HistoryEntry> History { get; } = StoreReader.ReadHistory(Text("history.yaml")).Require();

    public static IReadOnlyList<StorePerson> People { get; } = StoreReader.ReadPeople(Text("people.yaml")).Require();

    /// <summary>Paths of all documents, below the folder, with forward slashes.</summary>
    public static IReadOnlyList<string> Documents { get; } =
    [
        .. Directory.EnumerateFiles(Folder, "*.yaml", SearchOption.AllDirectories)
            .Select(path => Path.GetRelativePath(Folder, path).Replace('\\', '/'))
            .Where(path => path.Contains('/', StringComparison.Ordinal))
            .Order(StringComparer.Ordinal),
    ];

    public static string Text(string path) => File.ReadAllText(Path.Combine(Folder, path));

    public static ParseResult.Parsed Read(string path) => Parsed.GetOrAdd(path, _ => Samples.Read(Text(path)));

    public static ParseResult.Parsed Read(HistoryEntry entry) => Read(entry.Path);

    /// <summary>The newest version of every document.</summary>
    public static DocumentSet Newest() => new(History.Where(entry => entry.Version is not null).Select(entry => Read(entry).Document));
}
