using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.Documents;

/// <summary>A version at a console.</summary>
/// <param name="Protocol">Protocol.</param>
/// <param name="Version">Version.</param>
/// <param name="Scanner">Scanner.</param>
/// <param name="Checked">False: it was entered. True: a second person checked it.</param>
public sealed record Loading(string Protocol, int Version, string Scanner, bool Checked);

/// <summary>Records that a version was entered at a console, and that a second person checked it there.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="ledger">Records it.</param>
public sealed class RecordLoading(Commands commands, DocumentShelf shelf, LedgerWriter ledger)
{
    private static readonly CommandKind Kind = new("record-loading", Rule, NeedsKey: true);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Load;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who entered or checked.</param>
    /// <param name="loading">What.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<LoadedRow>> RunAsync(Caller caller, Loading loading, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, $"protocol/{loading.Protocol}/{loading.Version}@{loading.Scanner}", loading, command => RecordAsync(command, loading), cancellationToken);

    private async Task<Outcome<LoadedRow>> RecordAsync(Command command, Loading loading)
    {
        var key = new DocumentKey(DocumentKind.Protocol, loading.Protocol);
        if (await command.Stores.Documents.FindAsync(key, loading.Version, command.Cancellation) is not { } version)
            return new NotFound($"There is no version {loading.Version} of {key}.");
        if (shelf.Read(version) is ProtocolDocument document && !document.Scanners.Contains(loading.Scanner))
            return Invalid.Field("/scanner", loading.Scanner, string.Join(", ", document.Scanners), $"{loading.Protocol} is not assigned to {loading.Scanner}.");
        await command.Stores.Ledger.LockAsync(command.Cancellation);
        var last = (await command.Stores.Facts.LoadedAsync(loading.Protocol, command.Cancellation)).LastOrDefault(fact => fact.Scanner == loading.Scanner);
        if (loading.Checked && (last is null || last.Version != loading.Version || last.Step != LoadedFacts.Entered))
            return new Conflict($"Version {loading.Version} was not entered at {loading.Scanner} last; enter it first.");
        if (loading.Checked && last!.Account == command.Actor.Name)
            return new Forbidden("Whoever entered the values does not check them.");
        var row = new LoadedRow(
            loading.Protocol, loading.Version, loading.Scanner, loading.Checked ? LoadedFacts.Checked : LoadedFacts.Entered, command.Actor.Name, command.Now);
        await command.Stores.Facts.AddLoadedAsync(row, command.Cancellation);
        await ledger.AppendAsync(command, new Fact(LoadedFacts.Type, $"{VersionFacts.Subject(key, loading.Version)}@{loading.Scanner}", LoadedFacts.Values(row)));
        return row;
    }
}
