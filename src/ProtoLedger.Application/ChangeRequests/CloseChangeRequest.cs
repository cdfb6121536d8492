using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>A step on a request that says why.</summary>
/// <param name="Id">Request.</param>
/// <param name="ExpectedRowVersion">Row version that the client read.</param>
/// <param name="Reason">Why.</param>
public sealed record ReasonedStep(long Id, long ExpectedRowVersion, string? Reason);

/// <summary>The author takes a request back.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="ledger">Records it.</param>
public sealed class WithdrawChangeRequest(Commands commands, DocumentShelf shelf, LedgerWriter ledger)
{
    private static readonly CommandKind Kind = new("withdraw-change-request", Rule, NeedsKey: true);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Propose;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks: the author.</param>
    /// <param name="step">Which request and why.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<ChangeRequestView>> RunAsync(Caller caller, ReasonedStep step, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, Proposals.Subject(step.Id), step, command => WithdrawAsync(command, step), cancellationToken);

    private async Task<Outcome<ChangeRequestView>> WithdrawAsync(Command command, ReasonedStep step)
    {
        if (Proposals.Reason(step.Reason) is { } noReason)
            return noReason;
        var (row, refusal) = await Proposals.TakeAsync(
            command, step.Id, step.ExpectedRowVersion, "withdraw", ChangeRequestState.Draft, ChangeRequestState.UnderReview);
        if (row is null)
            return refusal!;
        if (row.Author != command.Actor.Name)
            return new Forbidden($"Only the author, {row.Author}, withdraws change request {row.Id}.");
        var closed = row with
        {
            State = ChangeRequestState.Withdrawn, DecidedAt = command.Now, DecidedBy = command.Actor.Name, DecisionReason = step.Reason,
        };
        return await Proposals.KeepAsync(command, shelf, closed, ledger, Proposals.Fact("change-request-withdrawn", closed));
    }
}

/// <summary>A reviewer refuses a request.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="ledger">Records it.</param>
public sealed class DeclineChangeRequest(Commands commands, DocumentShelf shelf, LedgerWriter ledger)
{
    private static readonly CommandKind Kind = new("decline-change-request", Rule, NeedsKey: true);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Decline;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks: not the author.</param>
    /// <param name="step">Which request and why.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<ChangeRequestView>> RunAsync(Caller caller, ReasonedStep step, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, Proposals.Subject(step.Id), step, command => DeclineAsync(command, step), cancellationToken);

    private async Task<Outcome<ChangeRequestView>> DeclineAsync(Command command, ReasonedStep step)
    {
        if (Proposals.Reason(step.Reason) is { } noReason)
            return noReason;
        var (row, refusal) = await Proposals.TakeAsync(command, step.Id, step.ExpectedRowVersion, "decline", ChangeRequestState.UnderReview);
        if (row is null)
            return refusal!;
        if (row.Author == command.Actor.Name)
            return new Forbidden("Authors do not decide on their own request; withdraw it instead.");
        var closed = row with
        {
            State = ChangeRequestState.Declined, DecidedAt = command.Now, DecidedBy = command.Actor.Name, DecisionReason = step.Reason,
        };
        return await Proposals.KeepAsync(command, shelf, closed, ledger, Proposals.Fact("change-request-declined", closed));
    }
}
