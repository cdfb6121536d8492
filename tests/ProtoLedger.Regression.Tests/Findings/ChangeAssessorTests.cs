using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Regression.Tests.Fixtures;

namespace ProtoLedger.Regression.Tests.Findings;

public sealed class ChangeAssessorTests
{
    private static readonly VersionEvaluation Evaluation = new();

    private static ChangeAssessment Assess(params (string Pointer, double Value)[] settings) => ChangeAssessor.Assess(
        Evaluation,
        [.. ((string[])[Documents.Three, Documents.OneFive]).Select(scanner => new EditOnScanner(Documents.Input(scanner), Documents.Input(scanner).With(settings)))]);

    [Fact]
    public void Assess_RepetitionTimeCut_SaysThatFluidTurnsBrightAndWhy()
    {
        var assessment = Assess(("/series/0/readout/RepetitionTime", 6000));
        var first = assessment.Headlines[0];
        Assert.Equal(Transition.NewlyFails, first.Transition);
        Assert.Contains("ventricles and sulci turn from", first.Sentence, StringComparison.Ordinal);
        Assert.Contains("cause: RepetitionTime 9000 to 6000 ms", first.Sentence, StringComparison.Ordinal);
        Assert.Contains("worse for more than 99 % of plausible tissue values", first.Sentence, StringComparison.Ordinal);
        Assert.DoesNotMatch("[0-9]\\.[0-9]{3}|% of M0", string.Join(" ", assessment.Headlines.Select(h => h.Sentence)));
        Assert.Equal(2, assessment.Scanners.Count);
        Assert.Contains(assessment.LeftOut, o => o.Effect == "magnetisation transfer");
        Assert.Contains(assessment.NextSteps, s => s.ByWhom == "physicist");
    }

    [Fact]
    public void Assess_PairedExpectation_ComparesWithTheStateBeforeTheEdit()
    {
        var finding = Assess(("/series/0/readout/RepetitionTime", 6000)).Scanners.Single(s => s.ScannerId == "three").Findings.Single(f => f.ExpectationId == "no-brighter-fluid");
        Assert.Equal((Transition.NewlyFails, 1.0), (finding.Transition, finding.Before));
        Assert.Contains("times that of before", finding.Sentence, StringComparison.Ordinal);
    }

    [Fact]
    public void Assess_TimeCut_BalanceSaysScanTimeFalls()
    {
        var line = Assess(("/series/0/readout/RepetitionTime", 6000)).Scanners[0].Balance.Single(b => b.What == "scan time");
        Assert.Equal((FindingDirection.Better, 108.0, 72.0), (line.Direction, line.Before!.Value, line.After!.Value));
        Assert.Equal("2 concatenations, as before", line.Note);
    }

    /// <summary>Noise of another acceleration rests on a geometry factor that no document knows; the line says so.</summary>
    [Fact]
    public void Assess_AccelerationRaised_SaysThatNoiseIsNotComparable()
    {
        var line = Assess(("/series/0/geometry/acceleration", 3)).Scanners[0].Balance.Single(b => b.What == "noise");

        Assert.Equal("old = 1; other reconstruction: acceleration 2 against 3: the geometry factor is unknown", line.Note);
    }

    [Fact]
    public void Assess_RenulledInversion_FluidHoldsAndTheCostIsNamed()
    {
        var input = Documents.Input().With(("/series/0/readout/RepetitionTime", 6000));
        var (_, time) = ProtoLedger.Regression.Repair.RepairSearch.NullingInversionTime(Evaluation, input, Documents.FluidNulled, "csf")!.Value;
        var assessment = Assess(("/series/0/readout/RepetitionTime", 6000), ("/series/0/preparations/0/InversionTime", Math.Round(time)));
        Assert.DoesNotContain(assessment.Scanners.SelectMany(s => s.Findings), f => f.Transition == Transition.NewlyFails && f.ExpectationId == "fluid-dark");
        var sentences = assessment.Scanners.Single(s => s.ScannerId == "three").Findings.Select(f => f.Sentence).ToArray();
        Assert.Contains(sentences, s => s.StartsWith("white matter gives less signal", StringComparison.Ordinal));
        Assert.Contains(sentences, s => s.StartsWith("grey matter turns from about as bright as white matter to darker", StringComparison.Ordinal));
        Assert.Contains(sentences, s => s.StartsWith("lesions and white matter are told apart less", StringComparison.Ordinal));
    }

    [Fact]
    public void Assess_NoteAlone_NothingToSay()
    {
        var before = Documents.Input();
        var after = Documents.Input(protocol: Documents.Brain.Replace("title: Brain", "title: Brain, routine", StringComparison.Ordinal));
        var assessment = ChangeAssessor.Assess(Evaluation, [new(before, after)]);
        Assert.Single(assessment.Changes);
        Assert.Empty(assessment.Headlines);
        Assert.Empty(assessment.NextSteps);
    }

    [Theory]
    [InlineData(0.05, "black")]
    [InlineData(1.0, "about as bright as white matter")]
    [InlineData(0.4, "dark grey")]
    [InlineData(2.5, "much brighter than white matter")]
    public void Brightness_Ratio_GivesTheWord(double ratio, string word) => Assert.Equal(word, PlainWords.Brightness(ratio, "white matter"));
}
