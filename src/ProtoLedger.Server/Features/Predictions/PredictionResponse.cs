using ProtoLedger.Application.Predictions;
using ProtoLedger.Physics.Acquisition;
using ProtoLedger.Physics.Prediction;

namespace ProtoLedger.Server.Features.Predictions;

/// <summary>Predicted signals. They come from a model and tissue values; they are no measurement and no diagnosis.</summary>
/// <param name="ModelId">The model that computed them.</param>
/// <param name="Assumptions">What the prediction takes for granted.</param>
/// <param name="Results">One for each tissue and condition, tissue by tissue.</param>
internal sealed record PredictionResponse(string ModelId, IReadOnlyList<Assumption> Assumptions, IReadOnlyList<PredictionResult> Results)
{
    public static PredictionResponse From(PredictionQuestion question, PredictionAnswer answer)
    {
        var echoes = answer.Signals.EchoTimes.Count;
        var points = question.Conditions;
        var results = new List<PredictionResult>();
        for (var lane = 0; lane < answer.Signals.Count; lane++)
        {
            var tissue = answer.Tissues[lane / points.Count];
            results.Add(new PredictionResult(
                tissue.Name,
                points[lane % points.Count],
                answer.Signals.EchoMagnitudes.AsSpan(lane * echoes, echoes).ToArray(),
                answer.Signals.Signed[lane],
                answer.Signals.Magnitude[lane],
                answer.Signals.LongitudinalBeforeExcitation[lane]));
        }

        return new PredictionResponse(answer.ModelId, answer.Signals.Assumptions, results);
    }
}

/// <summary>Signals of one tissue in one condition, relative to the equilibrium magnetisation of cerebrospinal fluid.</summary>
/// <param name="Tissue">Its name.</param>
/// <param name="Condition">The field point.</param>
/// <param name="Echoes">Magnitude of every echo.</param>
/// <param name="Signed">Signed signal at the effective echo.</param>
/// <param name="Magnitude">Magnitude at the effective echo.</param>
/// <param name="LongitudinalBeforeExcitation">Longitudinal magnetisation before the excitation, in units of equilibrium, −1 to 1.</param>
internal sealed record PredictionResult(
    string Tissue, FieldPoint Condition, IReadOnlyList<double> Echoes, double Signed, double Magnitude, double LongitudinalBeforeExcitation);
