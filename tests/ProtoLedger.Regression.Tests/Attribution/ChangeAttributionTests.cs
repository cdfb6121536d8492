using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Tests.Fixtures;

namespace ProtoLedger.Regression.Tests.Attribution;

public sealed class ChangeAttributionTests
{
    private static readonly VersionEvaluation Evaluation = new();

    private static IReadOnlyList<AttributionResult> Attribute(EvaluationInput before, EvaluationInput after) =>
        ChangeAttribution.Attribute(Evaluation, before, after, Evaluation.Evaluate(before), Evaluation.Evaluate(after, before));

    private static AttributionResult Of(IEnumerable<AttributionResult> all, string key) => all.First(a => a.Observable.ToString() == key && a.Lane == "nominal");

    private static double Share(AttributionResult result, string name) => result.Shares.Single(s => s.Changes.Any(c => c.Change.Name == name)).Share;

    [Theory]
    [InlineData("axial-fluid-nulled-t2/signal(csf)@nominal")]
    [InlineData("axial-fluid-nulled-t2/contrastRatio(grey-matter,white-matter)@nominal")]
    [InlineData("axial-fluid-nulled-t2/signal(white-matter)@nominal")]
    public void Attribute_ThreeParameters_EqualsTheAverageOverTheSixOrders(string key)
    {
        (string Pointer, double Value)[] settings =
            [("/series/0/readout/RepetitionTime", 6500), ("/series/0/preparations/0/InversionTime", 2100), ("/series/0/readout/EchoTime", 80)];
        var before = Documents.Input(expectations: null);
        var result = Of(Attribute(before, before.With(settings)), key);
        // The oracle evaluates documents edited step by step through the public evaluation, in every order.
        var name = key.Contains("Ratio", StringComparison.Ordinal) ? "" : "signedSignal";
        double Value(IEnumerable<int> taken)
        {
            var evaluated = Evaluation.Evaluate(before.With([.. taken.Select(i => settings[i])]));
            double At(string observable, string tissue) =>
                evaluated.Nominal[evaluated.IndexOf(new(Documents.FluidNulled, observable, tissue, null, "nominal"))];
            return name.Length == 0 ? At("signedSignal", "grey-matter") / At("signedSignal", "white-matter") : At(name, result.Observable.Tissue!);
        }

        int[][] orders = [[0, 1, 2], [0, 2, 1], [1, 0, 2], [1, 2, 0], [2, 0, 1], [2, 1, 0]];
        string[] names = ["RepetitionTime", "InversionTime", "EchoTime"];
        for (var player = 0; player < 3; player++)
        {
            var average = orders.Average(order =>
            {
                var before = order.TakeWhile(i => i != player).ToArray();
                return Value([.. before, player]) - Value(before);
            });
            Assert.Equal(average, Share(result, names[player]), 1e-10);
        }
    }

    [Fact]
    public void Attribute_CancellingEdit_SignedPartsAreLargeAndMagnitudeIsUnchanged()
    {
        // The echo magnitude of a nulled tissue is the same as far below the null as above it: find such a time by bisection on the public evaluation.
        var before = Documents.Input(expectations: null).With(("/series/0/preparations/0/InversionTime", 2000));
        double Fluid(EvaluationInput input)
        {
            var result = Evaluation.Evaluate(input);
            return result.Nominal[result.IndexOf(ObservableKey.Parse("axial-fluid-nulled-t2/signedSignal(csf)@nominal"))];
        }

        var start = Fluid(before);
        Assert.True(start < -0.05);
        var (low, high) = (2400.0, 3500.0);
        for (var i = 0; i < 40; i++)
        {
            var middle = (low + high) / 2;
            (low, high) = Fluid(before.With(("/series/0/preparations/0/InversionTime", middle))) < -start ? (middle, high) : (low, middle);
        }

        var after = before.With(("/series/0/preparations/0/InversionTime", low), ("/series/0/geometry/sliceGap", 1));
        var result = Of(Attribute(before, after), "axial-fluid-nulled-t2/signedSignal(csf)@nominal");
        Assert.Equal(2 * -start, Share(result, "InversionTime"), 1e-6);
        var magnitudes = Attribute(before, after).FirstOrDefault(a => a.Observable.ToString() == "axial-fluid-nulled-t2/signal(csf)@nominal");
        Assert.True(magnitudes is null || Math.Abs(magnitudes.NewMagnitude - magnitudes.OldMagnitude) < 1e-6);
    }

    [Fact]
    public void Attribute_GapAlone_IsADummyForSignals()
    {
        var before = Documents.Input(expectations: null);
        var result = Of(Attribute(before, before.With(("/series/0/readout/RepetitionTime", 7000), ("/series/0/geometry/sliceGap", 1))), "axial-fluid-nulled-t2/signal(csf)@nominal");
        Assert.Equal(0, Share(result, "sliceGap"));
        Assert.Equal(result.NewSigned - result.OldSigned, Share(result, "RepetitionTime"), 1e-12);
    }

    [Fact]
    public void Attribute_EchoSpacingWithEchoTime_IsOnePlayer()
    {
        // 100 ms is no multiple of 9 ms, and 117 ms none of 10 ms: neither is valid apart.
        var before = Documents.Input(expectations: null);
        var after = before.With(("/series/0/readout/echoSpacing", 9), ("/series/0/readout/EchoTime", 117), ("/series/0/readout/RepetitionTime", 8000));
        var result = Of(Attribute(before, after), "axial-fluid-nulled-t2/signal(white-matter)@nominal");
        Assert.Equal(2, result.Shares.Count);
        Assert.Contains(result.Shares, s => s.Changes.Select(c => c.Change.Name).Order().SequenceEqual(["EchoTime", "echoSpacing"]));
        Assert.Equal(result.NewSigned - result.OldSigned, result.Shares.Sum(s => s.Share), 1e-12);
    }

    [Fact]
    public void Attribute_BlockRemoved_IsOnePlayer()
    {
        var before = Documents.Input(expectations: null);
        var after = Documents.Input(
            protocol: Documents.Brain.Replace("    preparations:\n      - {kind: inversion, InversionTime: 2404}\n", "", StringComparison.Ordinal), expectations: null)
            .With(("/series/0/readout/RepetitionTime", 8000));
        var result = Of(Attribute(before, after), "axial-fluid-nulled-t2/signal(csf)@nominal");
        Assert.Equal(2, result.Shares.Count);
        Assert.True(Math.Abs(result.Shares[0].Share) > 10 * Math.Abs(result.Shares[1].Share));
    }

    [Fact]
    public void Attribute_CatalogueEdit_NamesTheTissueValue()
    {
        var before = Documents.Input(expectations: null);
        var after = Documents.Input(
            catalogue: Documents.Catalogue.Replace("T1: {mean: 4350, sd: 350", "T1: {mean: 4100, sd: 350", StringComparison.Ordinal), expectations: null);
        var result = Of(Attribute(before, after), "axial-fluid-nulled-t2/signal(csf)@nominal");
        var share = Assert.Single(result.Shares);
        Assert.Contains("T1", share.Changes[0].Change.Label, StringComparison.Ordinal);
        Assert.True(share.Share > 0);
    }

    [Fact]
    public void Attribute_BrokenExpectation_AlsoAtItsWorstLane()
    {
        var before = Documents.Input();
        var worst = Attribute(before, before.With(("/series/0/readout/RepetitionTime", 6000))).Single(a => a.Lane == "worst" && a.Observable.Condition == "well-shimmed");
        var nominal = Of(Attribute(before, before.With(("/series/0/readout/RepetitionTime", 6000))), worst.Observable.ToString());
        Assert.True(worst.NewMagnitude > nominal.NewMagnitude);
    }

    [Fact]
    public void Attribute_AllowedRangeMovedAlong_ItIsNoCauseByItself()
    {
        // Neither the new time in the old range nor the old time in the new range is a valid document.
        var before = Documents.Input(protocol: Documents.BrainWithRange(8800, 9400), expectations: null);
        var after = Documents.Input(
            protocol: Documents.BrainWithRange(5800, 6400).Replace("RepetitionTime: 9000", "RepetitionTime: 6000", StringComparison.Ordinal), expectations: null);
        var result = Of(Attribute(before, after), "axial-fluid-nulled-t2/signal(csf)@nominal");
        Assert.Equal("RepetitionTime", Assert.Single(Assert.Single(result.Shares).Changes).Change.Name);
    }

    [Fact]
    public void Attribute_CatalogueEditAtAnotherField_IsNoPlayer()
    {
        var before = Documents.Input(expectations: null);
        var after = Documents.Input(
            catalogue: Documents.Catalogue
                .Replace("T1: {mean: 4350, sd: 350", "T1: {mean: 4100, sd: 350", StringComparison.Ordinal)
                .Replace("T1: {mean: 4300, sd: 400", "T1: {mean: 4000, sd: 400", StringComparison.Ordinal),
            expectations: null);
        Assert.Single(Of(Attribute(before, after), "axial-fluid-nulled-t2/signal(csf)@nominal").Shares);
    }
}
