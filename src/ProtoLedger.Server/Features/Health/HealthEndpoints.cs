using Microsoft.AspNetCore.Http.HttpResults;
using Npgsql;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Stores;
using ProtoLedger.Server.Hosting;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Health;

internal static class HealthEndpoints
{
    internal static IEndpointRouteBuilder MapHealth(this IEndpointRouteBuilder routes)
    {
        var group = routes.MapGroup("/health").WithTags("Health").Needs(RoleRule.Anyone);
        group.MapGet("/live", Live).WithName("GetLive").WithSummary("Whether the process answers");
        group.MapGet("/ready", ReadyAsync).WithName("GetReady").WithSummary("Whether the start has finished and the database answers")
            .Refuses(Problems.NotReadyYet, Problems.DatabaseAway);
        return routes;
    }

    private static Ok<HealthResponse> Live() => TypedResults.Ok(new HealthResponse("live"));

    private static async Task<Results<Ok<HealthResponse>, Problem>> ReadyAsync(Readiness readiness, ITransactions transactions, CancellationToken cancellationToken)
    {
        try
        {
            await transactions.ReadAsync(stores => stores.Ledger.SizeAsync(cancellationToken), cancellationToken);
        }
        catch (Exception error) when (error is NpgsqlException or StoreUnavailableException)
        {
            return Problems.DatabaseIsAway();
        }

        return readiness.IsStarted
            ? TypedResults.Ok(new HealthResponse("ready"))
            : Problems.Of(Problems.NotReadyYet, "The first start imports documents and computes them; this ends by itself.").WithRetryAfter(TimeSpan.FromSeconds(2));
    }
}

/// <summary>State of the server.</summary>
/// <param name="Status">live or ready.</param>
internal sealed record HealthResponse(string Status);
