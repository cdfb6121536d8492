using System.Text.Json.Nodes;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Commanding;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Application.Accounts;

/// <summary>A revocation.</summary>
/// <param name="Account">Whose certificate.</param>
/// <param name="Reason">Why.</param>
public sealed record RevocationRequest(string Account, string? Reason);

/// <summary>Ends a signing certificate. What it signed before stays good.</summary>
/// <param name="commands">Runs it.</param>
/// <param name="ledger">Records it.</param>
public sealed class RevokeCertificate(Commands commands, LedgerWriter ledger)
{
    private static readonly CommandKind Kind = new("revoke-certificate", Rule);

    /// <summary>Who may.</summary>
    public static RoleRule Rule => RoleRule.KeepAccounts;

    /// <summary>Runs it.</summary>
    /// <param name="caller">Who asks.</param>
    /// <param name="request">Whose, and why.</param>
    /// <param name="cancellationToken">Stops it.</param>
    public Task<Outcome<bool>> RunAsync(Caller caller, RevocationRequest request, CancellationToken cancellationToken) =>
        commands.WriteAsync(caller, Kind, request.Account, request, command => RevokeAsync(command, request), cancellationToken);

    /// <summary>The fact of a revocation.</summary>
    internal static Fact Fact(RevocationRow row, string account) => new("certificate-revoked", $"account/{account}", Values(row));

    /// <summary>Every value of a revocation.</summary>
    internal static JsonObject Values(RevocationRow row) => new()
    {
        ["certificateSha256"] = Convert.ToHexStringLower(row.CertificateSha256),
        ["revokedAt"] = VersionFacts.Time(row.RevokedAt),
        ["revokedBy"] = row.RevokedBy,
        ["reason"] = row.Reason,
    };

    private async Task<Outcome<bool>> RevokeAsync(Command command, RevocationRequest request)
    {
        if (Proposals.Reason(request.Reason) is { } noReason)
            return noReason;
        if (await command.Stores.Keys.FindPersonKeyAsync(request.Account, command.Cancellation) is not { } key)
            return new NotFound($"The account {request.Account} has no valid certificate.");
        var row = new RevocationRow(key.CertificateSha256, command.Now, command.Actor.Name, request.Reason!);
        await command.Stores.Keys.AddRevocationAsync(row, command.Cancellation);
        await ledger.AppendAsync(command, Fact(row, request.Account));
        return true;
    }
}
