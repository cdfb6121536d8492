using ProtoLedger.Regression.Evaluation;

namespace ProtoLedger.Regression.Tests.Store;

/// <summary>What the stored expectations say about the stored protocols. Limits are those of the invented department.</summary>
public sealed class StoredExpectationsTests
{
    private const string RepetitionTime = "/series/0/readout/RepetitionTime";
    private const string InversionTime = "/series/0/preparations/0/InversionTime";

    private static readonly EvaluationInput Unedited = StoredDocuments.Input(StoredDocuments.Protocol("brain-standard"), "linden-3t");

    // The unedited fluid-nulled series must hold as surely as the edit must fail; tissue spreads are those of the catalogue.
    [Fact]
    public void FluidNulledSeries_Unedited_HoldsWithAtLeast95Percent()
    {
        var outcome = Fluid(new VersionEvaluation().Evaluate(Unedited, Unedited));
        Assert.InRange(outcome.Probability, 0.95, 1);
        Assert.Equal(Verdict.Holds, outcome.Verdict);
    }

    [Fact]
    public void FluidNulledSeries_RepetitionTimeCutAlone_FailsWithAtLeast95Percent()
    {
        var cut = StoredDocuments.Input(StoredDocuments.Protocol("brain-standard", (RepetitionTime, 6000)), "linden-3t");
        var outcome = Fluid(new VersionEvaluation().Evaluate(cut, Unedited));
        Assert.InRange(outcome.Probability, 0, 0.05);
        Assert.Equal(Verdict.Fails, outcome.Verdict);
    }

    // Null of fluid at a repetition time of 6000 ms: T1 4350 ms, train of 240 ms, f = 0.96 (closed form 1938 ms).
    [Fact]
    public void FluidNulledSeries_CutAndNulledAgain_HoldsAtACostInContrast()
    {
        var evaluation = new VersionEvaluation();
        var again = StoredDocuments.Input(StoredDocuments.Protocol("brain-standard", (RepetitionTime, 6000), (InversionTime, 1938)), "linden-3t");
        var (before, after) = (evaluation.Evaluate(Unedited, Unedited), evaluation.Evaluate(again, Unedited));
        Assert.InRange(Fluid(after).Probability, 0.95, 1);
        Assert.True(Nominal(after, "contrastRatio", "lesion", "white-matter") < 0.95 * Nominal(before, "contrastRatio", "lesion", "white-matter"));
        Assert.True(Nominal(after, "contrastRatio", "grey-matter", "white-matter") < 0.95 * Nominal(before, "contrastRatio", "grey-matter", "white-matter"));
        Assert.True(Nominal(after, "signal", "white-matter", null) < 0.95 * Nominal(before, "signal", "white-matter", null));
    }

    public static TheoryData<string> ProtocolIds => [.. StoredDocuments.Protocols.Select(protocol => protocol.Id)];

    [Theory]
    [MemberData(nameof(ProtocolIds))]
    public void NewestVersion_OfEveryProtocol_HoldsWhatIsExpectedOfIt(string id)
    {
        var protocol = StoredDocuments.Protocol(id);
        foreach (var scanner in ((Protocols.Documents.ProtocolDocument)protocol.Document).Scanners)
        {
            var input = StoredDocuments.Input(protocol, scanner);
            var outcomes = new VersionEvaluation().Evaluate(input, input).Expectations;
            Assert.NotEmpty(outcomes);
            Assert.All(outcomes, outcome => Assert.Equal((id, Verdict.Holds, Verdict.Holds), (id, outcome.NominalVerdict, outcome.Verdict)));
        }
    }

    private static ExpectationOutcome Fluid(EvaluationResult result) => result.Expectations.Single(outcome => outcome.Observable.Observable == "residualRatio");

    private static double Nominal(EvaluationResult result, string observable, string tissue, string? reference) =>
        result.Nominal[result.IndexOf(new ObservableKey("axial-fluid-nulled-t2", observable, tissue, reference, ObservableKey.NominalCondition))];
}
