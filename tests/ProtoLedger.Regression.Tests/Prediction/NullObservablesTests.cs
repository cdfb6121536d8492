using ProtoLedger.Physics.Prediction;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Prediction;
using ProtoLedger.Regression.Sampling;
using ProtoLedger.Regression.Tests.Fixtures;

namespace ProtoLedger.Regression.Tests.Prediction;

public sealed class NullObservablesTests
{
    [Theory]
    [InlineData("csf")]
    [InlineData("white-matter")]
    public void Find_ManyDraws_AgreesWithTheRootFinder(string tissue)
    {
        var input = Documents.Input();
        var context = SeriesContext.Create(input, input.Protocol.Document.Series[0], new TissueDraws(SamplePlan.Default));
        var lanes = new SignalCells(context, [.. Enumerable.Range(-1, 120)]).Lanes(tissue, ConditionPoints.Nominal);
        var found = NullObservables.Find(context, 0, lanes);
        var exact = NullTimes.Find(context.Acquisition, 0, context.Setting, lanes);
        Assert.All(found.Zip(exact), pair => Assert.Equal(pair.Second!.Value, pair.First, 0.2));
    }

    [Fact]
    public void Window_FluidAgainstWhiteMatter_EndsWhereTheRatioIsAQuarter()
    {
        var input = Documents.Input();
        var context = SeriesContext.Create(input, input.Protocol.Document.Series[0], new TissueDraws(SamplePlan.Default));
        var request = new ObservableRequest("nullWindow", "csf", "white-matter", ConditionPoints.Nominal);
        var width = SeriesEvaluation.Compute(context, [-1], [request], []).Read(request).Shown[0];
        double Ratio(double time)
        {
            var moved = context with { Acquisition = NullObservables.WithInversionTime(context.Acquisition, 0, time) };
            var residual = new ObservableRequest("residualRatio", "csf", "white-matter", ConditionPoints.Nominal);
            return SeriesEvaluation.Compute(moved, [-1], [residual], []).Read(residual).Shown[0];
        }

        double End(double inside, double outside)
        {
            for (var i = 0; i < 60; i++)
                (inside, outside) = Ratio((inside + outside) / 2) <= NullObservables.DarkRatio ? ((inside + outside) / 2, outside) : (inside, (inside + outside) / 2);
            return inside;
        }

        Assert.Equal(End(2404, 3000) - End(2404, 1900), width, 2.0);
    }
}
