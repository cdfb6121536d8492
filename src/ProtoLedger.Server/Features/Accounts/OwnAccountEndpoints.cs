using System.ComponentModel.DataAnnotations;
using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Accounts;

/// <summary>What people keep for themselves: API tokens and the second factor.</summary>
internal static class OwnAccountEndpoints
{
    private const string Tokens = "/api/v1/tokens";

    internal static IEndpointRouteBuilder MapOwnAccount(this IEndpointRouteBuilder routes)
    {
        var tokens = routes.MapGroup(Tokens).WithTags("Own account");
        tokens.MapGet("", ListAsync).WithName("ListTokens").WithSummary("Own API tokens").Needs(KeepTokens.Rule);
        tokens.MapPost("", CreateAsync).WithName("CreateToken").WithSummary("Make an API token; its secret is shown this once, so a repeated request makes another").Needs(KeepTokens.Rule)
            .Takes<TokenRequest>("""{"label":"nightly export","scopes":["read"],"days":90}""").Refuses(Problems.InvalidContent);
        tokens.MapDelete("/{sha256}", RevokeAsync).WithName("RevokeToken").WithSummary("End an API token").Needs(KeepTokens.Rule).Refuses(Problems.Missing);
        var factor = routes.MapGroup("/api/v1/session/second-factor").WithTags("Own account");
        factor.MapPost("", OfferAsync).WithName("OfferSecondFactor").WithSummary("A secret for an authenticator program; nothing is kept before it is confirmed").Needs(SetSecondFactor.Rule);
        factor.MapPut("", ConfirmAsync).WithName("ConfirmSecondFactor").WithSummary("Confirm the secret with a code; from then on signing in asks for one").Needs(SetSecondFactor.Rule)
            .Takes<SecondFactorRequest>("""{"secret":"GEZDGNBVGY3TQOJQGEZDGNBVGY3TQOJQ","code":"287082"}""").Refuses(Problems.Missing, Problems.InvalidContent);
        return routes;
    }

    private static async Task<Results<Ok<PageResponse<TokenView>>, Problem>> ListAsync(Caller caller, KeepTokens useCase, CancellationToken cancellationToken) =>
        (await useCase.ListAsync(caller, cancellationToken)).ToOk(items => new PageResponse<TokenView>(items));

    private static async Task<Results<Created<MadeToken>, Problem>> CreateAsync(
        Caller caller, KeepTokens useCase, Body<TokenRequest> body, CancellationToken cancellationToken)
    {
        var outcome = await useCase.CreateAsync(caller, new NewToken(body.Value.Label, body.Value.Scopes, body.Value.Days), cancellationToken);
        return outcome.Succeeded ? TypedResults.Created($"{Tokens}/{outcome.Value.Token.Sha256}", outcome.Value) : Problems.From(outcome.Refusal);
    }

    private static async Task<Results<NoContent, Problem>> RevokeAsync(Caller caller, KeepTokens useCase, string sha256, CancellationToken cancellationToken) =>
        Emptied(await useCase.RevokeAsync(caller, sha256, cancellationToken));

    private static async Task<Results<Ok<SecondFactorOffer>, Problem>> OfferAsync(Caller caller, SetSecondFactor useCase, CancellationToken cancellationToken) =>
        (await useCase.StartAsync(caller, cancellationToken)).ToOk();

    private static async Task<Results<NoContent, Problem>> ConfirmAsync(
        Caller caller, SetSecondFactor useCase, Body<SecondFactorRequest> body, CancellationToken cancellationToken) =>
        Emptied(await useCase.ConfirmAsync(caller, body.Value.Secret, body.Value.Code, cancellationToken));

    private static Results<NoContent, Problem> Emptied(Application.Outcomes.Outcome<bool> outcome) =>
        outcome.Succeeded ? TypedResults.NoContent() : Problems.From(outcome.Refusal);
}

/// <summary>A new API token.</summary>
/// <param name="Label">What the owner calls it.</param>
/// <param name="Scopes">read, propose; at least one.</param>
/// <param name="Days">Days until it expires.</param>
internal sealed record TokenRequest(
    [property: StringLength(100, MinimumLength = 1)] string Label, IReadOnlyList<string> Scopes, [property: Range(1.0, 366.0)] int Days);

/// <summary>The proof that the secret arrived.</summary>
/// <param name="Secret">As it was offered.</param>
/// <param name="Code">Six digits that the authenticator program shows.</param>
internal sealed record SecondFactorRequest(
    [property: StringLength(100, MinimumLength = 1)] string Secret, [property: StringLength(10, MinimumLength = 1)] string Code);
