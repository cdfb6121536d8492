using System.Security.Cryptography;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Protocols.Store;

namespace ProtoLedger.Application.Importing;

/// <summary>What an import brought.</summary>
/// <param name="Versions">Versions recorded as imported.</param>
/// <param name="Proposals">Declined and withdrawn proposals recorded.</param>
/// <param name="People">People of the demonstration, in the order of the file.</param>
/// <param name="RunId">The first regression run.</param>
public sealed record ImportResult(int Versions, int Proposals, IReadOnlyList<StorePerson> People, long RunId);

/// <summary>
/// Takes the history of a protocol store into an empty database, all or nothing. It is recorded as imported, with the dates
/// that it states and the hash of each file, and never signed.
/// </summary>
/// <param name="commands">Runs it.</param>
/// <param name="ledger">Records it.</param>
public sealed class ImportStore(Commands commands, LedgerWriter ledger)
{
    private static readonly CommandKind Kind = new("import-store", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.SystemOnly;

    /// <summary>Runs it.</summary>
    /// <param name="folder">Folder with <c>history.yaml</c>.</param>
    /// <param name="cancellationToken">Stops it.</param>
    /// <returns>Refused with file, line and pointer of every fault, and when the database holds documents already.</returns>
    public async Task<Outcome<ImportResult>> RunAsync(string folder, CancellationToken cancellationToken)
    {
        var (content, refusal) = new StoreFolderReader(folder).Read();
        return content is null
            ? refusal!
            : await commands.WriteAsync(Caller.System, Kind, "protocol-store", new { }, command => ImportAsync(command, content), cancellationToken);
    }

    private async Task<Outcome<ImportResult>> ImportAsync(Command command, StoreContent content)
    {
        await command.Stores.Ledger.LockAsync(command.Cancellation);
        if (await command.Stores.Documents.CountAsync(command.Cancellation) > 0)
            return new Conflict("The database holds documents already; only an empty one takes an import.");
        var facts = new List<Fact>();
        foreach (var entry in content.Entries)
            facts.AddRange(entry.History.Version is null ? await ProposalAsync(command, entry, content.People) : await VersionAsync(command, entry));
        await ledger.AppendAsync(command, [.. facts]);
        var run = await command.Stores.Runs.EnqueueAsync(RunCause.Import, null, RunPriority.Edit, command.Now, command.Cancellation);
        var versions = content.Entries.Count(entry => entry.History.Version is not null);
        return new ImportResult(versions, content.Entries.Count - versions, content.People, run);
    }

    private static async Task<IReadOnlyList<Fact>> VersionAsync(Command command, StoreEntry entry)
    {
        var (history, key) = (entry.History, new DocumentKey(entry.History.Kind, entry.History.Id));
        var stated = UtcTime.Cut(history.StatedTime.UtcDateTime);
        var version = new StoredVersion(
            key, history.Version!.Value, entry.Document.CanonicalBytes, SHA256.HashData(entry.Document.CanonicalBytes), history.BaseVersion ?? 0,
            command.Now, command.Actor.Name, history.StatedBy, history.Reason, null, Imported: true, stated, history.Source, entry.FileSha256);
        await command.Stores.Documents.AddAsync(version, command.Cancellation);
        var facts = new List<Fact> { VersionFacts.Of(version) };
        var scanners = entry.Document.Document is ProtocolDocument protocol ? protocol.Scanners : [MakeEffective.Everywhere];
        foreach (var scanner in scanners)
        {
            var effective = new EffectiveRow(key, version.Version, scanner, stated, command.Now, history.StatedBy, null, Imported: true);
            await command.Stores.Facts.AddEffectiveAsync(effective, command.Cancellation);
            facts.Add(VersionFacts.Of(effective));
        }

        return facts;
    }

    private static async Task<IReadOnlyList<Fact>> ProposalAsync(Command command, StoreEntry entry, IReadOnlyList<StorePerson> people)
    {
        var (history, stated) = (entry.History, UtcTime.Cut(entry.History.StatedTime.UtcDateTime));
        var row = new ChangeRequestRow(
            0, new DocumentKey(history.Kind, history.Id), history.BaseVersion ?? 0, entry.Document.CanonicalBytes,
            SHA256.HashData(entry.Document.CanonicalBytes), history.Reason, history.StatedBy,
            people.FirstOrDefault(person => person.Name == history.StatedBy)?.DisplayName ?? history.StatedBy,
            history.Outcome == HistoryOutcome.Declined ? ChangeRequestState.Declined : ChangeRequestState.Withdrawn,
            RowVersion: 1, Round: 1, CreatedAt: stated, SubmittedAt: stated, DecidedAt: stated,
            DecidedBy: history.DecidedBy ?? history.StatedBy, DecisionReason: history.DecisionReason ?? "not stated", Imported: true, Source: history.Source);
        row = row with { Id = await command.Stores.ChangeRequests.AddAsync(row, command.Cancellation) };
        return [Proposals.Fact("proposal-imported", row)];
    }
}
