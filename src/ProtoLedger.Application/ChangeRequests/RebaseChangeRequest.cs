using System.Security.Cryptography;
using System.Text.Json.Nodes;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Comparison;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>
/// Moves a proposal onto the newest version: what the proposal changed is taken over, what others changed meanwhile stays.
/// A parameter that both changed to different values is refused by name. Under review every signature is dropped.
/// </summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="ledger">Records it.</param>
public sealed class RebaseChangeRequest(Commands commands, DocumentShelf shelf, LedgerWriter ledger)
{
    private static readonly CommandKind Kind = new("rebase-change-request", Rule, NeedsKey: true);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Propose;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks: the author.</param>
    /// <param name="step">Which request.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<ChangeRequestView>> RunAsync(Caller caller, ChangeRequestStep step, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, Proposals.Subject(step.Id), step, command => RebaseAsync(command, step), cancellationToken);

    private async Task<Outcome<ChangeRequestView>> RebaseAsync(Command command, ChangeRequestStep step)
    {
        var (row, refusal) = await Proposals.TakeAsync(
            command, step.Id, step.ExpectedRowVersion, "rebase", ChangeRequestState.Draft, ChangeRequestState.UnderReview);
        if (row is null)
            return refusal!;
        if (row.Author != command.Actor.Name)
            return new Forbidden($"Only the author, {row.Author}, rebases change request {row.Id}.");
        var newest = await command.Stores.Documents.NewestAsync(row.Key, command.Cancellation);
        if (newest == row.BaseVersion)
            return new Conflict($"Change request {row.Id} stands on the newest version, {newest}, already.");
        if (row.BaseVersion == 0)
            return new Conflict($"Change request {row.Id} proposes {row.Key} as new, but version {newest} exists: propose an edit of that instead.");
        var old = await command.Stores.Documents.FindAsync(row.Key, row.BaseVersion, command.Cancellation);
        var onto = await command.Stores.Documents.FindAsync(row.Key, newest, command.Cancellation);
        var (merged, conflict) = Merge(old!.Bytes, onto!.Bytes, row.Bytes);
        if (merged is null)
            return conflict!;
        var sha256 = SHA256.HashData(merged.CanonicalBytes);
        if (sha256.AsSpan().SequenceEqual(onto.Sha256))
            return new Conflict($"Version {newest} holds everything that change request {row.Id} proposes: withdraw it.");
        if (await Proposals.FitsAsync(command, shelf, merged.Document) is { } unfit)
            return unfit;
        var rebased = row with { BaseVersion = newest, Bytes = merged.CanonicalBytes, Sha256 = sha256, Round = row.Round + 1 };
        return row.State == ChangeRequestState.Draft
            ? await Proposals.KeepAsync(command, shelf, rebased)
            : await SubmitChangeRequest.ReviewAsync(command, shelf, ledger, rebased, "change-request-rebased");
    }

    /// <summary>Three ways: of the differences from the newest version to the proposal, those that the proposal itself made.</summary>
    internal static (ParseResult.Parsed? Merged, Refusal? Conflict) Merge(byte[] old, byte[] onto, byte[] proposal)
    {
        var own = DocumentDifference.Between(old, proposal).Changes;
        var theirs = DocumentDifference.Between(old, onto).Changes.ToDictionary(Place, StringComparer.Ordinal);
        var clashes = own
            .Where(change => theirs.TryGetValue(Place(change), out var other) && !JsonNode.DeepEquals(change.New, other.New))
            .Select(change => new FieldError(
                "/document" + change.Pointer, change.New?.ToJsonString(), theirs[Place(change)].New?.ToJsonString() ?? "removed",
                $"{change.Label} was changed in the newest version too, to another value."))
            .ToList();
        if (clashes.Count > 0)
            return (null, new Invalid("Proposal and newest version changed the same parameters; edit the proposal instead.", clashes));
        var mine = own.Select(Place).ToHashSet(StringComparer.Ordinal);
        var across = DocumentDifference.Between(onto, proposal);
        var taken = across.Changes.Where(change => mine.Contains(Place(change))).Select(change => change.Index).ToHashSet();
        return across.Hybrid(taken) switch
        {
            ParseResult.Parsed parsed => (parsed, null),
            ParseResult.Refused refused => (null, refused.Errors.ToRefusal()),
            var other => throw new InvalidOperationException(other.GetType().Name),
        };
    }

    private static string Place(ParameterChange change) => $"{change.SeriesId} {change.Name} {change.OldPointer ?? change.Pointer}";
}
