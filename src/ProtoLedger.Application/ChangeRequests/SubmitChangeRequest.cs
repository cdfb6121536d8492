using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>A step on a request that needs nothing but the request.</summary>
/// <param name="Id">Request.</param>
/// <param name="ExpectedRowVersion">Row version that the client read.</param>
public sealed record ChangeRequestStep(long Id, long ExpectedRowVersion);

/// <summary>Puts a draft under review and starts the run that predicts what it does.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="ledger">Records it.</param>
public sealed class SubmitChangeRequest(Commands commands, DocumentShelf shelf, LedgerWriter ledger)
{
    private static readonly CommandKind Kind = new("submit-change-request", Rule, NeedsKey: true);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Propose;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks: the author.</param>
    /// <param name="step">Which request.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<ChangeRequestView>> RunAsync(Caller caller, ChangeRequestStep step, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, Proposals.Subject(step.Id), step, command => SubmitAsync(command, step), cancellationToken);

    /// <summary>Writes a request under review with a new run for its present content.</summary>
    internal static async Task<Outcome<ChangeRequestView>> ReviewAsync(
        Command command, DocumentShelf shelf, LedgerWriter ledger, ChangeRequestRow row, string factType)
    {
        var run = await command.Stores.Runs.EnqueueAsync(
            RunCause.Submit, row.Id, RunPriority.Edit, command.Now, command.Cancellation);
        var reviewed = row with { State = ChangeRequestState.UnderReview, RunId = run };
        return await Proposals.KeepAsync(command, shelf, reviewed, ledger, Proposals.Fact(factType, reviewed));
    }

    private async Task<Outcome<ChangeRequestView>> SubmitAsync(Command command, ChangeRequestStep step)
    {
        var (row, refusal) = await Proposals.TakeAsync(command, step.Id, step.ExpectedRowVersion, "submit", ChangeRequestState.Draft);
        if (row is null)
            return refusal!;
        if (row.Author != command.Actor.Name)
            return new Forbidden($"Only the author, {row.Author}, submits change request {row.Id}.");
        if (await Proposals.BaseAsync(command, row.Key, row.BaseVersion, row.Id) is { } moved)
            return moved;
        if (await Proposals.FitsAsync(command, shelf, shelf.Read(row.Sha256, row.Bytes)) is { } unfit)
            return unfit;
        return await ReviewAsync(command, shelf, ledger, row with { SubmittedAt = command.Now }, "change-request-submitted");
    }
}
