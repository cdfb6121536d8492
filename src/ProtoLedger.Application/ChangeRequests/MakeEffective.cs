using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>When and where an approved version becomes effective.</summary>
/// <param name="Id">Request.</param>
/// <param name="ExpectedRowVersion">Row version that the client read.</param>
/// <param name="At">UTC, not before now; null for now.</param>
/// <param name="Scanners">Some of the protocol's scanners; null or empty for all.</param>
public sealed record Effectiveness(long Id, long ExpectedRowVersion, DateTime? At = null, IReadOnlyList<string>? Scanners = null);

/// <summary>Says that the approved version of a request is effective, now or later, on all or some scanners.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="ledger">Records it.</param>
public sealed class MakeEffective(Commands commands, DocumentShelf shelf, LedgerWriter ledger)
{
    /// <summary>Scanner of a fact about a document that is no protocol.</summary>
    internal const string Everywhere = "*";
    private static readonly CommandKind Kind = new("make-effective", Rule, NeedsKey: true);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Release;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="step">Which request, when and where.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<ChangeRequestView>> RunAsync(Caller caller, Effectiveness step, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, Proposals.Subject(step.Id), step, command => ReleaseAsync(command, step), cancellationToken);

    private async Task<Outcome<ChangeRequestView>> ReleaseAsync(Command command, Effectiveness step)
    {
        var (row, refusal) = await Proposals.TakeAsync(command, step.Id, step.ExpectedRowVersion, "make effective", ChangeRequestState.Approved);
        if (row is null)
            return refusal!;
        var at = UtcTime.Cut(step.At ?? command.Now);
        if (at.Kind != DateTimeKind.Utc)
            return Invalid.Field("/at", at.ToString("O"), "a time with Z or an offset", "A time without a zone is ambiguous.");
        if (at < command.Now)
            return Invalid.Field("/at", VersionFacts.Time(at), $"not before {VersionFacts.Time(command.Now)}", "What was effective in the past cannot be changed.");
        var (scanners, unknown) = Scanners(shelf.Read(row.Sha256, row.Bytes), step.Scanners);
        if (scanners is null)
            return unknown!;
        var facts = new List<Fact>();
        foreach (var scanner in scanners)
        {
            var fact = new EffectiveRow(row.Key, row.Version!.Value, scanner, at, command.Now, command.Actor.Name, row.Id, Imported: false);
            await command.Stores.Facts.AddEffectiveAsync(fact, command.Cancellation);
            facts.Add(VersionFacts.Of(fact));
        }

        await ledger.AppendAsync(command, [.. facts]);
        await command.Stores.Runs.EnqueueAsync(RunCause.Effective, null, RunPriority.Decision, command.Now, command.Cancellation);
        if (row.Key.Kind != DocumentKind.Protocol && at == command.Now)
            await RestartReviewsAsync(command);
        return await Proposals.KeepAsync(command, shelf, row);
    }

    /// <summary>What proposals under review were predicted from is no longer what is effective: their reports are made anew and signatures on the old ones dropped.</summary>
    private async Task RestartReviewsAsync(Command command)
    {
        foreach (var id in await command.Stores.ChangeRequests.UnderReviewAsync(command.Cancellation))
        {
            if (await command.Stores.ChangeRequests.FindAsync(id, forUpdate: true, command.Cancellation) is { State: ChangeRequestState.UnderReview } waiting)
                await SubmitChangeRequest.ReviewAsync(command, shelf, ledger, waiting with { Round = waiting.Round + 1 }, "change-request-recomputed");
        }
    }

    private static (IReadOnlyList<string>? Scanners, Refusal? Refusal) Scanners(LedgerDocument document, IReadOnlyList<string>? wanted)
    {
        var some = wanted is { Count: > 0 };
        if (document is not ProtocolDocument protocol)
            return some ? (null, Invalid.Field("/scanners", string.Join(", ", wanted!), "none", "Only protocols are effective scanner by scanner.")) : ([Everywhere], null);
        var foreign = (wanted ?? []).FirstOrDefault(scanner => !protocol.Scanners.Contains(scanner));
        return foreign is not null
            ? (null, Invalid.Field("/scanners", foreign, string.Join(", ", protocol.Scanners), $"{protocol.Id} is not assigned to {foreign}."))
            : (some ? [.. wanted!.Distinct(StringComparer.Ordinal)] : protocol.Scanners, null);
    }
}
