using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Prediction;

namespace ProtoLedger.Regression.Findings;

/// <summary>For how many tissue draws a number rose, old and new at the same draw.</summary>
internal static class PairedShares
{
    private static readonly HashSet<string> OfSignals = ["signal", "signedSignal", "contrastRatio", "contrastDifference", "residualRatio", "contrastToNoise"];

    internal static Dictionary<ObservableKey, double> Of(VersionEvaluation evaluation, EvaluationInput before, EvaluationInput after, RunDifference difference)
    {
        var shares = new Dictionary<ObservableKey, double>();
        var draws = Enumerable.Range(0, after.Sampling.Samples).ToArray();
        foreach (var group in difference.Moved.Select(m => m.Observable).Where(IsPairable).GroupBy(k => k.Series))
        {
            if (before.Protocol.Document.Series.FirstOrDefault(s => s.Id == group.Key) is not { } old
                || after.Protocol.Document.Series.FirstOrDefault(s => s.Id == group.Key) is not { } now)
                continue;
            var requests = group.Select(SeriesEvaluation.Request).ToArray();
            var was = SeriesEvaluation.Compute(evaluation.Context(before, old), draws, requests, []);
            var becomes = SeriesEvaluation.Compute(evaluation.Context(after, now), draws, requests, []);
            foreach (var key in group)
            {
                var (a, b) = (was.Read(SeriesEvaluation.Request(key)), becomes.Read(SeriesEvaluation.Request(key)));
                if (a.Because is null && b.Because is null)
                    shares[key] = (double)a.Shown.Zip(b.Shown).Count(pair => pair.Second > pair.First) / draws.Length;
            }
        }

        return shares;
    }

    private static bool IsPairable(ObservableKey key) => key.Condition == ObservableKey.NominalCondition && OfSignals.Contains(key.Observable);
}
