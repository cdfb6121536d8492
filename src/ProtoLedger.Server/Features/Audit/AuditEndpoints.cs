using System.Globalization;
using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.History;
using ProtoLedger.Application.Stores;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Audit;

internal static class AuditEndpoints
{
    private const int UsualEvents = 100;
    private const int MostEvents = 1000;

    internal static IEndpointRouteBuilder MapAudit(this IEndpointRouteBuilder routes)
    {
        routes.MapGet("/api/v1/audit", ListAsync).WithName("ListAuditEvents").WithTags("Audit trail").WithSummary("Events, newest first; reading them is an event")
            .Needs(ReadAudit.Rule).Refuses(Problems.MalformedRequest);
        return routes;
    }

    private static async Task<Results<Ok<PageResponse<AuditEvent>>, Problem>> ListAsync(
        HttpContext context, Caller caller, ReadAudit useCase, string? actor, string? action, string? outcome, string? from, string? until, string? before, string? limit,
        CancellationToken cancellationToken)
    {
        var query = new Query();
        var filter = new AuditFilter(
            actor, action, outcome, query.Time("from", from), query.Time("until", until), query.Number("before", before, 1, long.MaxValue),
            (int)(query.Number("limit", limit, 1, MostEvents) ?? UsualEvents));
        query.Demand();
        var page = await useCase.ListAsync(caller, filter, cancellationToken);
        if (page.Succeeded && page.Value.Count == filter.Limit)
            Paging.AddNext(context, "before", page.Value[^1].Number.ToString(CultureInfo.InvariantCulture));
        return page.ToOk(items => new PageResponse<AuditEvent>(items));
    }
}
