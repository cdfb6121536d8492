using System.Security.Cryptography;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Protocols.Documents;

namespace ProtoLedger.Application.ChangeRequests;

/// <summary>A proposed document.</summary>
/// <param name="Kind">Kind.</param>
/// <param name="DocumentId">Identifier.</param>
/// <param name="BaseVersion">Newest version, on which the proposal stands; 0 for a new document.</param>
/// <param name="Document">JSON of the whole document, UTF-8.</param>
/// <param name="Reason">Why.</param>
public sealed record NewChangeRequest(DocumentKind Kind, string DocumentId, int BaseVersion, byte[] Document, string? Reason);

/// <summary>Writes a draft of a change.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="shelf">Documents.</param>
public sealed class CreateChangeRequest(Commands commands, DocumentShelf shelf)
{
    private static readonly CommandKind Kind = new("create-change-request", Rule, NeedsKey: true);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.Propose;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="request">What is proposed.</param>
    /// <param name="cancellationToken">Stops it.</param>
    /// <returns>The draft; refused when the document or the reason is not valid, or the base is not the newest version.</returns>
    public Task<Outcome<ChangeRequestView>> RunAsync(Caller caller, NewChangeRequest request, CancellationToken cancellationToken)
    {
        var key = new DocumentKey(request.Kind, request.DocumentId);
        return commands.WriteAsync(caller, Kind, key.ToString(), request, command => CreateAsync(command, key, request), cancellationToken);
    }

    private async Task<Outcome<ChangeRequestView>> CreateAsync(Command command, DocumentKey key, NewChangeRequest request)
    {
        if (Proposals.Reason(request.Reason) is { } noReason)
            return noReason;
        if (await Proposals.BaseAsync(command, key, request.BaseVersion, except: 0) is { } moved)
            return moved;
        var (document, refusal) = await Proposals.ReadAsync(command, shelf, key, request.Document);
        if (document is null)
            return refusal!;
        var sha256 = SHA256.HashData(document.CanonicalBytes);
        if (await SameAsBaseAsync(command, key, request.BaseVersion, sha256) is { } same)
            return same;
        var row = new ChangeRequestRow(
            0, key, request.BaseVersion, document.CanonicalBytes, sha256, request.Reason!, command.Actor.Name, command.Actor.DisplayName,
            ChangeRequestState.Draft, RowVersion: 1, Round: 1, CreatedAt: command.Now);
        var id = await command.Stores.ChangeRequests.AddAsync(row, command.Cancellation);
        return await (row with { Id = id }).ViewAsync(command.Stores, shelf, command.Cancellation);
    }

    /// <summary>Refuses a proposal that proposes nothing.</summary>
    internal static async Task<Refusal?> SameAsBaseAsync(Command command, DocumentKey key, int baseVersion, byte[] sha256)
    {
        if (baseVersion == 0)
            return null;
        var stored = await command.Stores.Documents.FindAsync(key, baseVersion, command.Cancellation);
        return stored is not null && stored.Sha256.AsSpan().SequenceEqual(sha256)
            ? Invalid.Field("/document", $"version {baseVersion}", "a document that differs from its base", "The proposal changes nothing.")
            : null;
    }
}
