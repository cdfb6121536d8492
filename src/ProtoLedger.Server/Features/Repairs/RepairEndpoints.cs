using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Repairs;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Repairs;

internal static class RepairEndpoints
{
    private const string RepairExample =
        """
        {"protocol":"brain-standard","scanner":"linden-3t","expectation":"axial-fluid-nulled-dark",
         "parameters":[{"pointer":"/preparations/0/InversionTime","low":1500,"high":2800,"step":5}]}
        """;

    private const string CarryExample =
        """
        {"protocol":"brain-standard","fromScanner":"linden-3t","toScanner":"birch-15t",
         "contrasts":["axial-fluid-nulled-t2/residualRatio(csf,white-matter)@nominal"]}
        """;

    internal static IEndpointRouteBuilder MapRepairs(this IEndpointRouteBuilder routes)
    {
        routes.MapPost("/api/v1/repairs", RepairAsync)
            .WithName("OfferRepairs").WithTags("Repairs").WithSummary("Smallest changes that make an expectation hold, with their cost")
            .WithDescription("Stores nothing. An offer is a prediction from models and published tissue values; confirm it on a phantom or volunteer.")
            .Needs(OfferRepairs.Rule)
            .Takes<RepairRequest>(RepairExample)
            .Refuses(Problems.InvalidContent, Problems.Missing);
        routes.MapPost("/api/v1/carry-overs", CarryAsync)
            .WithName("CarryProtocolOver").WithTags("Repairs").WithSummary("Parameters that keep chosen contrasts on another scanner")
            .WithDescription("Stores nothing. Says so where no setting within the limits keeps them.")
            .Needs(CarryProtocolOver.Rule)
            .Takes<CarryOverRequest>(CarryExample)
            .Refuses(Problems.InvalidContent, Problems.Missing);
        return routes;
    }

    private static async Task<Results<Ok<RepairsResponse>, Problem>> RepairAsync(
        Body<RepairRequest> body, Caller caller, OfferRepairs useCase, CancellationToken cancellationToken)
    {
        var question = body.Value.ToQuestion();
        return question.Succeeded
            ? (await useCase.RunAsync(caller, question.Value, cancellationToken)).ToOk(RepairsResponse.From)
            : Problems.From(question.Refusal);
    }

    private static async Task<Results<Ok<CarryOverResponse>, Problem>> CarryAsync(
        Body<CarryOverRequest> body, Caller caller, CarryProtocolOver useCase, CancellationToken cancellationToken)
    {
        var question = body.Value.ToQuestion();
        return question.Succeeded
            ? (await useCase.RunAsync(caller, question.Value, cancellationToken)).ToOk(CarryOverResponse.From)
            : Problems.From(question.Refusal);
    }
}
