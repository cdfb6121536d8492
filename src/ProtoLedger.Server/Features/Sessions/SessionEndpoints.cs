using System.ComponentModel.DataAnnotations;
using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Sessions;

internal static class SessionEndpoints
{
    internal static IEndpointRouteBuilder MapSessions(this IEndpointRouteBuilder routes)
    {
        var group = routes.MapGroup("/api/v1/session").WithTags("Session");
        group.MapPost("", SignInAsync).WithName("SignIn").WithSummary("Sign in").Needs(SignIn.Rule)
            .Takes<SignInRequest>("""{"name":"t.okafor","password":"correct horse battery staple"}""")
            .Refuses(Problems.SignInNeeded, Problems.AccountLocked);
        group.MapGet("", Show).WithName("GetSession").WithSummary("Who is signed in").Needs(SignOut.Rule);
        group.MapDelete("", SignOutAsync).WithName("SignOut").WithSummary("Sign out; the token ends").Needs(SignOut.Rule);
        return routes;
    }

    private static async Task<Results<Ok<SessionResponse>, Problem>> SignInAsync(
        Caller caller, SignIn useCase, Body<SignInRequest> body, CancellationToken cancellationToken) =>
        (await useCase.RunAsync(caller, new Credentials(body.Value.Name, body.Value.Password, body.Value.Code), cancellationToken))
            .ToOk(session => new SessionResponse(session.Token, session.ExpiresAt, session.Actor.Name, session.Actor.DisplayName, session.Actor.Roles));

    private static Ok<PersonResponse> Show(Caller caller) =>
        TypedResults.Ok(new PersonResponse(caller.Actor.Name, caller.Actor.DisplayName, caller.Actor.Roles, caller.Actor.Scopes));

    private static async Task<Results<NoContent, Problem>> SignOutAsync(HttpContext context, Caller caller, SignOut useCase, CancellationToken cancellationToken)
    {
        // The gate took whoever asks from the one or the other.
        var secret = RoleGate.BearerToken(context.Request) ?? SessionCookie.Read(context.Request) ?? "";
        var outcome = await useCase.RunAsync(caller, secret, cancellationToken);
        return outcome.Succeeded ? TypedResults.NoContent() : Problems.From(outcome.Refusal);
    }
}

/// <summary>What is typed to sign in.</summary>
/// <param name="Name">Account name.</param>
/// <param name="Password">Password.</param>
/// <param name="Code">Six digits of the second factor, where the account has one.</param>
internal sealed record SignInRequest(
    [property: StringLength(200, MinimumLength = 1)] string Name,
    [property: StringLength(1000, MinimumLength = 1)] string Password,
    [property: StringLength(10)] string? Code = null);

/// <summary>A session.</summary>
/// <param name="Token">Send it as Authorization: Bearer.</param>
/// <param name="ExpiresAt">Absolute end, UTC; an idle session ends earlier.</param>
/// <param name="Name">Account name.</param>
/// <param name="DisplayName">Name as people say it.</param>
/// <param name="Roles">Roles.</param>
internal sealed record SessionResponse(string Token, DateTime ExpiresAt, string Name, string DisplayName, IReadOnlyList<string> Roles);

/// <summary>Who is signed in.</summary>
/// <param name="Name">Account name.</param>
/// <param name="DisplayName">Name as people say it.</param>
/// <param name="Roles">Roles.</param>
/// <param name="Scopes">Scopes of an API token; none for a session.</param>
internal sealed record PersonResponse(string Name, string DisplayName, IReadOnlyList<string> Roles, IReadOnlyList<string>? Scopes);
