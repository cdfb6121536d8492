using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Bundles;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Bundles;

internal static class BundleEndpoints
{
    internal static IEndpointRouteBuilder MapBundles(this IEndpointRouteBuilder routes)
    {
        routes.MapGet("/api/v1/bundles", ExportAsync).WithName("GetBundle").WithTags("Bundles")
            .WithSummary("A binder with its proofs as a zip file that verifies offline")
            .Needs(ExportBundle.Rule).Produces(StatusCodes.Status200OK, contentType: "application/zip")
            .Refuses(Problems.MalformedRequest, Problems.Missing, Problems.InvalidContent);
        return routes;
    }

    private static async Task<IResult> ExportAsync(
        Caller caller, ExportBundle useCase, TimeProvider clock, string? protocol, string? scanner, string? from, string? to, CancellationToken cancellationToken)
    {
        var query = new Query();
        var period = (From: query.Time("from", from) ?? DateTime.UnixEpoch, Until: query.Time("to", to) ?? clock.GetUtcNow().UtcDateTime);
        query.Demand();
        var bundle = await useCase.RunAsync(caller, new BundleRequest(protocol, scanner, period.From, period.Until), cancellationToken);
        return bundle.Succeeded
            ? TypedResults.Stream(output => bundle.Value.WriteAsync(output, cancellationToken), "application/zip", bundle.Value.FileName)
            : Problems.From(bundle.Refusal);
    }
}
