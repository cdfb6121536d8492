using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Repair;
using ProtoLedger.Regression.Tests.Fixtures;

namespace ProtoLedger.Regression.Tests.Repair;

public sealed class RepairSearchTests
{
    private static readonly VersionEvaluation Evaluation = new();

    [Fact]
    public void Offers_RepetitionTimeCut_OffersTheNullingInversionTimeFirst()
    {
        var broken = Documents.Input().With(("/series/0/readout/RepetitionTime", 6000));
        var offers = RepairSearch.Offers(Evaluation, broken, Documents.Input(), "fluid-dark");
        var setting = Assert.Single(offers[0].Settings);
        Assert.Equal("/preparations/0/InversionTime", setting.Pointer);
        // Null after an imperfect inversion f, train long against T1 ignored: T1 ln((1 + f)/(1 + f E)), E = exp(−(TR − TL)/T1) with TL the train's 240 ms.
        // Source: Bernstein, King, Zhou 2004 with f of Marques et al. 2010 (from memory); the odd refocusing of 150° leaves some ms.
        var expected = 4350 * Math.Log(1.96 / (1 + 0.96 * Math.Exp(-(6000 - 240) / 4350.0)));
        Assert.Equal(expected, setting.New, 25.0);
        Assert.All(offers, o => Assert.Equal(Verdict.Holds, o.Outcome.Verdict));
        Assert.Contains("costs", offers[0].Sentence, StringComparison.Ordinal);
        Assert.NotEmpty(offers[0].Cost.Moved);
    }

    [Fact]
    public void Offers_SmallestChange_OneStepLessFails()
    {
        var broken = Documents.Input().With(("/series/0/readout/RepetitionTime", 6000));
        var allowed = new RepairParameter("/readout/RepetitionTime", 6000, 9000, 50);
        var offer = Assert.Single(RepairSearch.Offers(Evaluation, broken, null, "fluid-dark", [allowed]));
        var value = offer.Settings[0].New;
        Assert.InRange(value, 6050, 9000);
        var less = Evaluation.Evaluate(broken.With(("/series/0/readout/RepetitionTime", value - 50))).Expectations.Single(o => o.Expectation.Id == "fluid-dark");
        Assert.NotEqual(Verdict.Holds, less.Verdict);
    }

    [Fact]
    public void Offers_NothingWithinTheLimits_IsEmpty()
    {
        var broken = Documents.Input().With(("/series/0/readout/RepetitionTime", 6000));
        Assert.Empty(RepairSearch.Offers(Evaluation, broken, null, "fluid-dark", [new RepairParameter("/geometry/PixelBandwidth", 100, 400, 10)]));
    }

    [Fact]
    public void CarryOver_FluidNulledToLowerField_FindsTheInversionTime()
    {
        var (original, target) = (Documents.Input(expectations: null), Documents.Input(Documents.OneFive, expectations: null));
        var key = new ObservableKey(Documents.FluidNulled, "residualRatio", "csf", "white-matter", "nominal");
        var result = CarryOver.Find(Evaluation, original, target, [key]);
        Assert.True(result.Kept, result.Sentence);
        Assert.All(result.Contrasts, c => Assert.InRange(Math.Abs(c.Carried - c.Original), 0, c.Tolerance));
    }

    [Fact]
    public void CarryOver_ContrastThatNoSettingKeeps_SaysSo()
    {
        var (original, target) = (Documents.Input(expectations: null), Documents.Input(Documents.OneFive, expectations: null));
        var key = new ObservableKey("axial-t1", "contrastRatio", "grey-matter", "white-matter", "nominal");
        var result = CarryOver.Find(
            Evaluation, original, target, [key],
            new Dictionary<string, IReadOnlyList<RepairParameter>> { ["axial-t1"] = [new("/geometry/PixelBandwidth", 100, 400, 10)] }, _ => 1e-6);
        Assert.False(result.Kept);
        Assert.StartsWith("No setting within the limits keeps axial-t1/contrastRatio", result.Sentence, StringComparison.Ordinal);
    }

    [Fact]
    public void SeriesParameters_SetAndGet_AreOneAnothersInverse()
    {
        var series = Documents.Input().Protocol.Document.Series[0].Acquisition;
        string[] pointers = ["/readout/RepetitionTime", "/readout/EchoTime", "/preparations/0/InversionTime", "/readout/RefocusingFlipAngles/0", "/timing/slices", "/geometry/matrix/1"];
        foreach (var pointer in pointers)
        {
            var value = ProtoLedger.Regression.Prediction.SeriesParameters.Get(series, pointer)!.Value + 3;
            Assert.Equal(value, ProtoLedger.Regression.Prediction.SeriesParameters.Get(ProtoLedger.Regression.Prediction.SeriesParameters.With(series, pointer, value), pointer));
        }

        Assert.Null(ProtoLedger.Regression.Prediction.SeriesParameters.Get(series, "/readout/readoutSpacing"));
        Assert.Throws<ArgumentException>(() => ProtoLedger.Regression.Prediction.SeriesParameters.With(series, "/preparations/3/InversionTime", 1));
    }
}
