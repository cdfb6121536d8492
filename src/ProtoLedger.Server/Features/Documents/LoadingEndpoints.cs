using System.ComponentModel.DataAnnotations;
using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Stores;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Documents;

/// <summary>Facts about consoles: a version was entered by one person and checked by another.</summary>
internal static class LoadingEndpoints
{
    internal static IEndpointRouteBuilder MapLoadings(this IEndpointRouteBuilder routes)
    {
        routes.MapPost("/api/v1/protocols/{id}/versions/{version:int}/loadings", RecordAsync).WithName("RecordLoading").WithTags("Answers")
            .WithSummary("State that a version was entered at a console, or that the values entered there were checked by a second person")
            .Needs(RecordLoading.Rule).NeedsIdempotencyKey().Takes<LoadingRequest>("""{"scanner":"linden-3t","checked":false}""")
            .Refuses(Problems.Missing, Problems.InvalidContent, Problems.Clash);
        return routes;
    }

    private static async Task<Results<Ok<LoadedRow>, Problem>> RecordAsync(
        Caller caller, RecordLoading useCase, string id, int version, Body<LoadingRequest> body, CancellationToken cancellationToken) =>
        (await useCase.RunAsync(caller, new Loading(id, version, body.Value.Scanner, body.Value.Checked), cancellationToken)).ToOk();
}

/// <summary>What happened at a console.</summary>
/// <param name="Scanner">Scanner.</param>
/// <param name="Checked">False when the values were entered, true when a second person checked them.</param>
internal sealed record LoadingRequest([property: StringLength(100, MinimumLength = 1)] string Scanner, bool Checked = false);
