using Microsoft.AspNetCore.Http.HttpResults;
using ProtoLedger.Application.Predictions;
using ProtoLedger.Server.Http;

namespace ProtoLedger.Server.Features.Predictions;

internal static class PredictionEndpoints
{
    private const string Example =
        """
        {"series":{"preparations":[{"kind":"inversion","InversionTime":2400,"pulse":"adiabatic"}],
         "readout":{"kind":"echoTrain","RepetitionTime":9000,"EchoTime":120,"ExcitationFlipAngle":90,"echoSpacing":10,"EchoTrainLength":24,"RefocusingFlipAngles":[150]}},
         "tissues":[{"name":"cerebrospinal fluid","T1":4300,"T2":2000,"protonDensity":1},{"name":"white matter","T1":830,"T2":75,"protonDensity":0.7}],
         "conditions":[{"b1Scale":1,"offResonanceHz":0,"unpreparedInflow":0}],"pulses":"modelled","fieldStrength":3}
        """;

    internal static IEndpointRouteBuilder MapPredictions(this IEndpointRouteBuilder routes)
    {
        routes.MapPost("/api/v1/predictions", PredictAsync)
            .WithName("Predict").WithTags("Predictions").WithSummary("Predict the signals of a series")
            .WithDescription("Needs no stored protocol. Predictions come from models and published tissue values; they are no measurement and no diagnosis.")
            .Needs(PredictSeries.Rule)
            .Takes<PredictionRequest>(Example)
            .Refuses(Problems.InvalidContent);
        return routes;
    }

    private static async Task<Results<Ok<PredictionResponse>, Problem>> PredictAsync(
        Body<PredictionRequest> body, PredictSeries useCase, CancellationToken cancellationToken)
    {
        var question = body.Value.ToQuestion();
        if (!question.Succeeded)
            return Problems.From(question.Refusal);
        var answer = await useCase.RunAsync(question.Value, cancellationToken);
        return answer.ToOk(value => PredictionResponse.From(question.Value, value));
    }
}
