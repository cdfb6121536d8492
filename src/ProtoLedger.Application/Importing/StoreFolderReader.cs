using System.Security.Cryptography;
using System.Text;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Protocols.Store;
using ProtoLedger.Protocols.Validation;

namespace ProtoLedger.Application.Importing;

/// <summary>A protocol store, read and checked as a whole.</summary>
/// <param name="Entries">History, oldest first, each with its document.</param>
/// <param name="People">People of the demonstration; empty without <c>people.yaml</c>.</param>
internal sealed record StoreContent(IReadOnlyList<StoreEntry> Entries, IReadOnlyList<StorePerson> People);

/// <summary>One event of the history with its document.</summary>
/// <param name="History">The event.</param>
/// <param name="Document">The document.</param>
/// <param name="FileSha256">Hash of the file as it stands.</param>
internal sealed record StoreEntry(HistoryEntry History, ParseResult.Parsed Document, byte[] FileSha256);

/// <summary>Reads a folder <c>protocol-store/</c>. Every fault is named with file, line and pointer; nothing is taken from a store that has one.</summary>
internal sealed class StoreFolderReader(string folder)
{
    private const int MostErrors = 200;
    private const int LargestFile = 1 << 20;
    private static readonly UTF8Encoding Strict = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);
    private readonly List<FieldError> errors = [];

    /// <summary>The content, or every fault.</summary>
    public (StoreContent? Content, Invalid? Refusal) Read()
    {
        var history = List("history.yaml", StoreReader.ReadHistory) ?? [];
        var people = File.Exists(Path.Combine(folder, "people.yaml")) ? List("people.yaml", StoreReader.ReadPeople) ?? [] : [];
        var entries = history.Select(Entry).OfType<StoreEntry>().ToList();
        if (errors.Count == 0)
            Stray(history);
        if (errors.Count == 0)
            Fit(entries);
        return errors.Count == 0
            ? (new StoreContent(entries, people), null)
            : (null, new Invalid($"The store has {errors.Count} faults; nothing was imported. First: {errors[0].Pointer}: {errors[0].Detail}", errors));
    }

    private IReadOnlyList<T>? List<T>(string file, Func<string, MappingResult<IReadOnlyList<T>>> read)
    {
        if (Text(file) is not { } text)
            return null;
        switch (read(text.Text))
        {
            case MappingResult<IReadOnlyList<T>>.Mapped(var list):
                return list;
            case MappingResult<IReadOnlyList<T>>.Refused(var faults):
                Add(file, faults);
                break;
        }

        return null;
    }

    private StoreEntry? Entry(HistoryEntry entry)
    {
        if (Text(entry.Path) is not { } text)
            return null;
        switch (DocumentReader.ReadYaml(text.Text, entry.Kind))
        {
            case ParseResult.Parsed parsed when parsed.Document.Id == entry.Id:
                return new StoreEntry(entry, parsed, text.Sha256);
            case ParseResult.Parsed parsed:
                Add(entry.Path, [new DocumentError("/id", $"\"{parsed.Document.Id}\"", $"\"{entry.Id}\"", "The file names another document than the history.")]);
                break;
            case ParseResult.Refused refused:
                Add(entry.Path, refused.Errors);
                break;
        }

        return null;
    }

    private (string Text, byte[] Sha256)? Text(string file)
    {
        var path = Path.Combine(folder, file.Replace('/', Path.DirectorySeparatorChar));
        try
        {
            if (new FileInfo(path) is { Exists: true, Length: > LargestFile } large)
            {
                Add(file, [new DocumentError("", $"{large.Length} bytes", $"at most {LargestFile} bytes", "The file is too large.")]);
                return null;
            }

            var bytes = File.ReadAllBytes(path);
            return (Strict.GetString(bytes), SHA256.HashData(bytes));
        }
        catch (DecoderFallbackException)
        {
            Add(file, [new DocumentError("", null, "UTF-8", "The file is not UTF-8.")]);
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            Add(file, [new DocumentError("", null, "a readable file", "The file is missing or cannot be read.")]);
        }

        return null;
    }

    /// <summary>A document that no history speaks of would be lost without a word.</summary>
    private void Stray(IReadOnlyList<HistoryEntry> history)
    {
        var known = history.Select(entry => entry.Path).ToHashSet(StringComparer.Ordinal);
        var folders = Enum.GetValues<DocumentKind>().Select(StoreFolder.Of).Append("proposals");
        foreach (var file in folders.Select(name => Path.Combine(folder, name)).Where(Directory.Exists)
            .SelectMany(name => Directory.EnumerateFiles(name, "*.yaml", SearchOption.AllDirectories))
            .Select(path => Path.GetRelativePath(folder, path).Replace('\\', '/')).Order(StringComparer.Ordinal))
        {
            if (!known.Contains(file))
                Add(file, [new DocumentError("", null, "an entry of history.yaml", "No entry of the history speaks of this file.")]);
        }
    }

    /// <summary>The newest versions must fit each other, and every older protocol must find what it names.</summary>
    private void Fit(List<StoreEntry> entries)
    {
        var versions = entries.Where(entry => entry.History.Version is not null).ToList();
        var newest = versions.GroupBy(entry => (entry.History.Kind, entry.History.Id)).Select(group => group.Last()).ToList();
        var set = new DocumentSet(newest.Select(entry => entry.Document.Document));
        foreach (var entry in newest)
            Add(entry.History.Path, CrossDocumentValidation.Validate(entry.Document.Document, set));
        foreach (var entry in entries.Except(newest))
        {
            if (entry.Document.Document is not ProtocolDocument protocol)
                continue;
            foreach (var scanner in protocol.Scanners.Where(id => set.Find<ScannerDocument>(DocumentKind.Scanner, id) is null))
                Add(entry.History.Path, [new DocumentError("/scanners", $"\"{scanner}\"", null, "There is no scanner of this name in the store.")]);
            if (set.Find<ConditionsDocument>(DocumentKind.Conditions, protocol.Conditions) is null)
                Add(entry.History.Path, [new DocumentError("/conditions", $"\"{protocol.Conditions}\"", null, "There is no conditions document of this name in the store.")]);
        }
    }

    private void Add(string file, IReadOnlyList<DocumentError> faults)
    {
        foreach (var fault in faults.Take(MostErrors - Math.Min(MostErrors, errors.Count)))
        {
            var place = fault.Line is { } line ? $"{file}:{line}:{fault.Column}" : file;
            errors.Add(new FieldError($"{place}#{fault.Pointer}", fault.Value, fault.Limit ?? "", fault.Detail));
        }
    }
}
