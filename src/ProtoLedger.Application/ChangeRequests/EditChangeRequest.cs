using System.Security.Cryptography;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>New content of a request.</summary>
/// <param name="Id">Request.</param>
/// <param name="ExpectedRowVersion">Row version that the client read.</param>
/// <param name="Document">JSON of the whole document, UTF-8.</param>
/// <param name="Reason">New reason, or null to keep it.</param>
public sealed record EditedChangeRequest(long Id, long ExpectedRowVersion, byte[] Document, string? Reason);

/// <summary>Changes the content of a draft or of a request under review; under review every signature is dropped and the run starts anew.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
/// <param name="ledger">Records it.</param>
public sealed class EditChangeRequest(Commands commands, DocumentShelf shelf, LedgerWriter ledger)
{
    private static readonly CommandKind Kind = new("edit-change-request", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Propose;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks: the author.</param>
    /// <param name="request">New content.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<ChangeRequestView>> RunAsync(Caller caller, EditedChangeRequest request, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, Proposals.Subject(request.Id), request, command => EditAsync(command, request), cancellationToken);

    private async Task<Outcome<ChangeRequestView>> EditAsync(Command command, EditedChangeRequest request)
    {
        var (row, refusal) = await Proposals.TakeAsync(
            command, request.Id, request.ExpectedRowVersion, "edit", ChangeRequestState.Draft, ChangeRequestState.UnderReview);
        if (row is null)
            return refusal!;
        if (row.Author != command.Actor.Name)
            return new Forbidden($"Only the author, {row.Author}, edits change request {row.Id}.");
        if (request.Reason is not null && Proposals.Reason(request.Reason) is { } noReason)
            return noReason;
        var (document, fault) = await Proposals.ReadAsync(command, shelf, row.Key, request.Document);
        if (document is null)
            return fault!;
        var sha256 = SHA256.HashData(document.CanonicalBytes);
        if (await CreateChangeRequest.SameAsBaseAsync(command, row.Key, row.BaseVersion, sha256) is { } same)
            return same;
        var edited = row with { Bytes = document.CanonicalBytes, Sha256 = sha256, Reason = request.Reason ?? row.Reason };
        return edited.State == ChangeRequestState.Draft
            ? await Proposals.KeepAsync(command, shelf, edited)
            : await SubmitChangeRequest.ReviewAsync(command, shelf, ledger, edited with { Round = row.Round + 1 }, "change-request-edited");
    }
}
