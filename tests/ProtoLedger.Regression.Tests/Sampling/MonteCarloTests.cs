using ProtoLedger.Physics.Prediction;
using ProtoLedger.Protocols.Catalogue;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Tests.Fixtures;

namespace ProtoLedger.Regression.Tests.Sampling;

/// <summary>512 scrambled draws against 10⁶ plain ones: System.Random, Box and Muller, log-normal by the textbook formula; only the engine is shared.</summary>
public sealed class MonteCarloTests
{
    private const int Plain = 1_000_000;
    private const int Batch = 50_000;

    [Theory]
    [InlineData(0, "axial-fluid-nulled-t2", "residualRatio", "csf", 0.35)]
    [InlineData(1, "axial-t1", "contrastRatio", "grey-matter", 0.8)]
    [InlineData(2, "axial-t2star", "contrastRatio", "csf", 0.75)]
    public void Evaluate_Probability_LiesWithinTwoStandardErrorsOfPlainMonteCarlo(int series, string id, string observable, string tissue, double limit)
    {
        var expectations = $$"""
            format: 1
            kind: expectations
            id: brain
            title: Brain
            protocol: brain
            expectations:
              - {id: e, title: e, why: e, series: {{id}}, observable: {name: {{observable}}, tissue: {{tissue}}, reference: white-matter}, conditions: [nominal], basis: absolute, relation: atMost, limit: {{limit}}}
            """;
        var input = Documents.Input(expectations: expectations);
        var outcome = new VersionEvaluation().Evaluate(input).Expectations.Single();

        var acquisition = SeriesMapping.Resolve(input.Protocol.Document.Series[series], input.Scanner.Document).Require();
        var random = new Random(20260101 + series);
        var ratios = new double[Plain];
        var (first, second) = (new LaneTable(Batch), new LaneTable(Batch));
        for (var start = 0; start < Plain; start += Batch)
        {
            Fill(first, input, tissue, random);
            Fill(second, input, "white-matter", random);
            for (var i = 0; i < Batch; i++)
                first.InversionEfficiencyOffset[i] = second.InversionEfficiencyOffset[i] = 0.02 * Normal(random);
            var (a, b) = (SignalPredictor.Predict(acquisition, new(3), first), SignalPredictor.Predict(acquisition, new(3), second));
            for (var i = 0; i < Batch; i++)
                ratios[start + i] = a.Magnitude[i] / b.Magnitude[i];
        }

        var probability = ratios.Count(r => r <= limit) / (double)Plain;
        var error = 2 * Math.Sqrt(probability * (1 - probability) / 512);
        Assert.InRange(outcome.Probability, probability - error, probability + error);
        Array.Sort(ratios);
        // The density of a ratio near its 5 % and 95 % quantiles turns two standard errors of the probability into these quantiles.
        var margin = 2 * VerdictRule.StandardError(512);
        Assert.InRange(outcome.Low, ratios[(int)(Plain * (0.05 - margin))], ratios[(int)(Plain * (0.05 + margin))]);
        Assert.InRange(outcome.High, ratios[(int)(Plain * (0.95 - margin))], ratios[(int)(Plain * (0.95 + margin))]);
    }

    private static void Fill(LaneTable lanes, EvaluationInput input, string name, Random random)
    {
        var row = input.Catalogue.Document.Tissues.Single(t => t.Name == name);
        var field = row.Fields.Single(f => f.FieldStrength == 3);
        for (var i = 0; i < lanes.Count; i++)
        {
            lanes.T1[i] = LogNormal(field.T1, random);
            lanes.T2[i] = LogNormal(field.T2, random);
            lanes.T2Star[i] = LogNormal(field.T2Star!, random);
            lanes.ProtonDensity[i] = LogNormal(row.ProtonDensity, random);
        }
    }

    private static double LogNormal(MeasuredValue value, Random random)
    {
        var variance = Math.Log(1 + value.Sd * value.Sd / (value.Mean * value.Mean));
        return Math.Exp(Math.Log(value.Mean) - variance / 2 + Math.Sqrt(variance) * Normal(random));
    }

    private static double Normal(Random random) =>
        Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
}
