using System.ComponentModel.DataAnnotations;
using System.Security.Cryptography;
using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Accounts;

internal static class AccountEndpoints
{
    private const string Folder = "/api/v1/accounts";

    internal static IEndpointRouteBuilder MapAccounts(this IEndpointRouteBuilder routes)
    {
        var group = routes.MapGroup(Folder).WithTags("Accounts");
        group.MapGet("", ListAsync).WithName("ListAccounts").WithSummary("Accounts by name").Needs(KeepAccounts.Rule);
        group.MapPost("", CreateAsync).WithName("CreateAccount").WithSummary("Make an account").Needs(KeepAccounts.Rule).NeedsIdempotencyKey()
            .Takes<CreateAccountRequest>("""{"name":"a.lindqvist","displayName":"A. Lindqvist","roles":["technologist"],"password":"fourteen grey herons"}""")
            .Refuses(Problems.InvalidContent, Problems.Clash);
        group.MapPatch("/{name}", ChangeAsync).WithName("ChangeAccount").WithSummary("Change roles, password, or disable; a disabled account's sessions end").Needs(KeepAccounts.Rule)
            .Takes<ChangeAccountRequest>("""{"disabled":true}""").Refuses(Problems.Missing, Problems.InvalidContent, Problems.Clash);
        group.MapPost("/{name}/certificate", EnrolAsync).WithName("EnrolSigner").WithSummary("Give a person a new signing key under a passphrase; an earlier key is revoked").Needs(EnrolSigner.Rule).NeedsIdempotencyKey()
            .Takes<EnrolRequest>("""{"passphrase":"seven lanterns on the quay"}""").Refuses(Problems.Missing, Problems.InvalidContent, Problems.Clash);
        group.MapDelete("/{name}/certificate", RevokeAsync).WithName("RevokeCertificate").WithSummary("Revoke a person's certificate").Needs(RevokeCertificate.Rule)
            .Refuses(Problems.MalformedRequest, Problems.Missing, Problems.InvalidContent);
        return routes;
    }

    private static async Task<Results<Ok<PageResponse<AccountView>>, Problem>> ListAsync(Caller caller, KeepAccounts useCase, CancellationToken cancellationToken) =>
        (await useCase.ListAsync(caller, cancellationToken)).ToOk(items => new PageResponse<AccountView>(items));

    private static async Task<Results<Created<AccountView>, Problem>> CreateAsync(
        Caller caller, KeepAccounts useCase, Body<CreateAccountRequest> body, CancellationToken cancellationToken)
    {
        var outcome = await useCase.CreateAsync(
            caller, new NewAccount(body.Value.Name, body.Value.DisplayName, body.Value.Roles, body.Value.Password), cancellationToken);
        return outcome.Succeeded ? TypedResults.Created($"{Folder}/{outcome.Value.Name}", outcome.Value) : Problems.From(outcome.Refusal);
    }

    private static async Task<Results<Ok<AccountView>, Problem>> ChangeAsync(
        Caller caller, KeepAccounts useCase, string name, Body<ChangeAccountRequest> body, CancellationToken cancellationToken) =>
        (await useCase.ChangeAsync(caller, new AccountChange(name, body.Value.Roles, body.Value.Disabled, body.Value.Password), cancellationToken)).ToOk();

    private static async Task<Results<Ok<CertificateResponse>, Problem>> EnrolAsync(
        Caller caller, EnrolSigner useCase, string name, Body<EnrolRequest> body, CancellationToken cancellationToken) =>
        (await useCase.RunAsync(caller, new Enrolment(name, body.Value.Passphrase), cancellationToken)).ToOk(CertificateResponse.From);

    private static async Task<Results<NoContent, Problem>> RevokeAsync(
        Caller caller, RevokeCertificate useCase, string name, string? reason, CancellationToken cancellationToken)
    {
        var query = new Query();
        var why = query.RequiredText("reason", reason);
        query.Demand();
        var outcome = await useCase.RunAsync(caller, new RevocationRequest(name, why), cancellationToken);
        return outcome.Succeeded ? TypedResults.NoContent() : Problems.From(outcome.Refusal);
    }
}

/// <summary>A new account.</summary>
/// <param name="Name">Lower-case letters, digits, dots and hyphens; never used again.</param>
/// <param name="DisplayName">Name as people say it, printed on signatures.</param>
/// <param name="Roles">Roles.</param>
/// <param name="Password">First password; none for a person who signs in elsewhere.</param>
internal sealed record CreateAccountRequest(
    [property: StringLength(64, MinimumLength = 1)] string Name,
    [property: StringLength(200, MinimumLength = 1)] string DisplayName,
    IReadOnlyList<string> Roles,
    [property: StringLength(1000, MinimumLength = 1)] string? Password = null);

/// <summary>What to change; what is missing stays.</summary>
/// <param name="Roles">All roles from now on.</param>
/// <param name="Disabled">Whether the account may sign in no more.</param>
/// <param name="Password">New password.</param>
internal sealed record ChangeAccountRequest(
    IReadOnlyList<string>? Roles = null, bool? Disabled = null, [property: StringLength(1000, MinimumLength = 1)] string? Password = null);

/// <summary>A signing passphrase, chosen by the person.</summary>
/// <param name="Passphrase">It cannot be recovered.</param>
internal sealed record EnrolRequest([property: StringLength(1000, MinimumLength = 1)] string Passphrase);

/// <summary>A person's certificate.</summary>
/// <param name="Account">Whose.</param>
/// <param name="Sha256">Of the certificate, hexadecimal.</param>
/// <param name="Pem">The certificate.</param>
/// <param name="EnrolledBy">Who enrolled the person.</param>
/// <param name="CreatedAt">UTC.</param>
internal sealed record CertificateResponse(string Account, string Sha256, string Pem, string EnrolledBy, DateTime CreatedAt)
{
    public static CertificateResponse From(CertificateView view) => new(
        view.Account, view.CertificateSha256, PemEncoding.WriteString("CERTIFICATE", view.Certificate) + "\n", view.EnrolledBy, view.CreatedAt);
}
