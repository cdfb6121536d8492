using System.CommandLine;
using System.Globalization;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Formats;
using ProtoLedger.Protocols.Store;

namespace ProtoLedger.Cli;

/// <summary><c>export DIR</c>: writes every stored version as canonical YAML, one file a version, in the layout of a protocol store.</summary>
internal static class ExportCommand
{
    private const int PageSize = 200;

    public static Command Create()
    {
        var folder = new Argument<DirectoryInfo>("DIR") { Description = "Folder to write to." };
        var command = new Command("export", "Write every stored version of every document as YAML.") { folder };
        command.SetAction((result, cancellationToken) => Installation.RunAsync(
            installation => RunAsync(installation.Get<ReadDocuments>(), result.GetRequiredValue(folder), result.InvocationConfiguration.Output, cancellationToken),
            result.InvocationConfiguration.Error,
            cancellationToken));
        return command;
    }

    private static async Task<int> RunAsync(ReadDocuments documents, DirectoryInfo folder, TextWriter output, CancellationToken cancellationToken)
    {
        var written = 0;
        foreach (var kind in DocumentKinds.All)
        {
            string? after = null;
            do
            {
                var page = Demand(await documents.ListAsync(Caller.System, kind, after, PageSize, cancellationToken));
                foreach (var document in page)
                    for (var version = 1; version <= document.Newest; version++, written++)
                        await WriteAsync(documents, new DocumentKey(kind, document.Id), version, folder, cancellationToken);
                after = page.Count == PageSize ? page[^1].Id : null;
            }
            while (after is not null);
        }

        await output.WriteLineAsync($"wrote {written} versions to {folder.FullName}");
        return ExitCodes.Good;
    }

    private static async Task WriteAsync(ReadDocuments documents, DocumentKey key, int version, DirectoryInfo folder, CancellationToken cancellationToken)
    {
        var detail = Demand(await documents.VersionAsync(Caller.System, key, version, cancellationToken));
        var path = Path.Combine(folder.FullName, StoreFolder.Of(key.Kind), key.Id, string.Create(CultureInfo.InvariantCulture, $"v{version:0000}.yaml"));
        Directory.CreateDirectory(Path.GetDirectoryName(path)!);
        // Written aside and moved, so that a cut export leaves no half file.
        await File.WriteAllTextAsync(path + ".part", YamlExport.Write(detail.Bytes), cancellationToken);
        File.Move(path + ".part", path, overwrite: true);
    }

    private static T Demand<T>(Outcome<T> outcome) => outcome.Succeeded ? outcome.Value : throw new InvalidOperationException(outcome.Refusal.Detail);
}
