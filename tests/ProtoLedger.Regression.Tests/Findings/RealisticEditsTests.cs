using ProtoLedger.Regression.Attribution;
using ProtoLedger.Regression.Drift;
using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Tests.Fixtures;

namespace ProtoLedger.Regression.Tests.Findings;

/// <summary>Edits as departments make them: which number moves, by how much, and which parameter did it. Expected values are worked out beside each edit.</summary>
public sealed class RealisticEditsTests
{
    private static readonly VersionEvaluation Evaluation = new();

    // White matter at 3 T of the test catalogue.
    private const double T1 = 850, T2 = 72, T2Star = 50;

    private static double SpinEcho(double repetition, double echo, double t1 = T1, double t2 = T2) =>
        (1 - 2 * Math.Exp(-(repetition - echo / 2) / t1) + Math.Exp(-repetition / t1)) * Math.Exp(-echo / t2);

    private static double Gradient(double repetition, double echo, double degrees, double t1 = T1, double t2Star = T2Star)
    {
        var (e, a) = (Math.Exp(-repetition / t1), degrees * Math.PI / 180);
        return Math.Sin(a) * (1 - e) / (1 - e * Math.Cos(a)) * Math.Exp(-echo / t2Star);
    }

    public sealed record Edit(string Name, string Key, double Ratio, string Cause, params (string Pointer, double Value)[] Settings)
    {
        public override string ToString() => Name;
    }

    public static TheoryData<Edit> Edits => new(
        // Finite-TR spin echo: Haacke et al. 1999 (from memory).
        new Edit("T1 series, repetition time stretched", "axial-t1/signal(white-matter)", SpinEcho(700, 12) / SpinEcho(520, 12), "RepetitionTime", ("/series/1/readout/RepetitionTime", 700)),
        new Edit("T1 series, repetition time cut", "axial-t1/signal(white-matter)", SpinEcho(480, 12) / SpinEcho(520, 12), "RepetitionTime", ("/series/1/readout/RepetitionTime", 480)),
        new Edit("T1 series, echo time stretched", "axial-t1/signal(white-matter)", SpinEcho(520, 18) / SpinEcho(520, 12), "EchoTime", ("/series/1/readout/EchoTime", 18)),
        new Edit("T1 series, grey against white", "axial-t1/contrastRatio(grey-matter,white-matter)", SpinEcho(800, 12, 1480, 88) / SpinEcho(800, 12) / (SpinEcho(520, 12, 1480, 88) / SpinEcho(520, 12)), "RepetitionTime", ("/series/1/readout/RepetitionTime", 800)),
        // Ernst and Anderson 1966 (from memory).
        new Edit("gradient echo, flip angle raised", "axial-t2star/signal(white-matter)", Gradient(650, 20, 30) / Gradient(650, 20, 20), "ExcitationFlipAngle", ("/series/2/readout/ExcitationFlipAngle", 30)),
        new Edit("gradient echo, flip angle halved", "axial-t2star/signal(white-matter)", Gradient(650, 20, 10) / Gradient(650, 20, 20), "ExcitationFlipAngle", ("/series/2/readout/ExcitationFlipAngle", 10)),
        new Edit("gradient echo, echo time stretched", "axial-t2star/signal(white-matter)", Math.Exp(-2 / T2Star), "EchoTime", ("/series/2/readout/EchoTime", 22)),
        new Edit("gradient echo, grey against white", "axial-t2star/contrastRatio(grey-matter,white-matter)", Math.Exp(-2 / 58.0 + 2 / T2Star), "EchoTime", ("/series/2/readout/EchoTime", 22)),
        new Edit("gradient echo, repetition time stretched", "axial-t2star/signal(white-matter)", Gradient(900, 20, 20) / Gradient(650, 20, 20), "RepetitionTime", ("/series/2/readout/RepetitionTime", 900)),
        // Arithmetic: scan time is repetitions times repetition time.
        new Edit("fluid-nulled, concatenations raised", "axial-fluid-nulled-t2/scanTime", 1.5, "concatenations", ("/series/0/timing/concatenations", 3)),
        new Edit("fluid-nulled, train halved", "axial-fluid-nulled-t2/scanTime", 11 / 6.0, "EchoTrainLength", ("/series/0/readout/EchoTrainLength", 12)),
        new Edit("T1 series, averages doubled, time", "axial-t1/scanTime", 2, "NumberOfAverages", ("/series/1/geometry/NumberOfAverages", 2)),
        new Edit("T1 series, repetition time stretched, time", "axial-t1/scanTime", 700 / 520.0, "RepetitionTime", ("/series/1/readout/RepetitionTime", 700)),
        // Noise over signal goes with 1 / (voxel · root of sampling time): Edelstein et al. 1986, Macovski 1996 (from memory).
        new Edit("T1 series, averages doubled, noise", "axial-t1/relativeNoise", 1 / Math.Sqrt(2), "NumberOfAverages", ("/series/1/geometry/NumberOfAverages", 2)),
        new Edit("T1 series, thinner slices", "axial-t1/relativeNoise", 5 / 3.0, "SliceThickness", ("/series/1/geometry/SliceThickness", 3)),
        new Edit("T1 series, bandwidth doubled, noise", "axial-t1/relativeNoise", Math.Sqrt(2), "PixelBandwidth", ("/series/1/geometry/PixelBandwidth", 440)),
        new Edit("T1 series, bandwidth doubled, fat shift", "axial-t1/fatWaterShift", 0.5, "PixelBandwidth", ("/series/1/geometry/PixelBandwidth", 440)),
        new Edit("T1 series, acceleration", "axial-t1/relativeNoise", Math.Sqrt(2), "acceleration", ("/series/1/geometry/acceleration", 2)),
        new Edit("T1 series, finer matrix", "axial-t1/relativeNoise", 384.0 / 256, "matrix", ("/series/1/geometry/matrix/0", 384)),
        // Power goes with the repetition rate.
        new Edit("T1 series, repetition time stretched, power", "axial-t1/relativeRfPower", 520 / 700.0, "RepetitionTime", ("/series/1/readout/RepetitionTime", 700)));

    [Theory]
    [MemberData(nameof(Edits))]
    public void Edit_MovesTheNumberByTheExpectedRatioAndIsNamed(Edit edit)
    {
        ArgumentNullException.ThrowIfNull(edit);
        var before = Documents.Input(expectations: null);
        var after = before.With(edit.Settings);
        var (old, now) = (Evaluation.Evaluate(before), Evaluation.Evaluate(after));
        var key = ObservableKey.Parse(edit.Key + "@nominal");
        Assert.Equal(edit.Ratio, now.Nominal[now.IndexOf(key)] / old.Nominal[old.IndexOf(key)], 1e-6);
        var attribution = ChangeAttribution.Attribute(Evaluation, before, after, old, now).Single(a => a.Observable == key);
        var share = Assert.Single(attribution.Shares);
        Assert.Equal(edit.Cause, share.Changes[0].Change.Name);
    }

    [Fact]
    public void FatNulledSeries_CopiedDownInField_FatIsBrightAgain()
    {
        // TR ≫ T1: fat is 1 − (1 + f) exp(−TI/T1) of its signal, f = 0.96; null at 252 ms for T1 375, at 195 ms for T1 290.
        var protocol = Documents.Brain.Replace("InversionTime: 2404", "InversionTime: 252", StringComparison.Ordinal);
        double Fat(string scanner)
        {
            var result = Evaluation.Evaluate(Documents.Input(scanner, protocol, expectations: null));
            return result.Nominal[result.IndexOf(ObservableKey.Parse("axial-fluid-nulled-t2/signedSignal(fat)@nominal"))];
        }

        Assert.Equal(0, Fat(Documents.Three), 0.003);
        Assert.Equal(0.9 * Math.Exp(-100 / 85.0) * (1 - 1.96 * Math.Exp(-252 / 290.0)), Fat(Documents.OneFive), 0.006);
    }

    [Fact]
    public void AveragesWithMatchedBandwidth_MoveNoContrast()
    {
        var before = Documents.Input(expectations: null);
        var difference = RunDifference.Between(
            Evaluation.Evaluate(before), Evaluation.Evaluate(before.With(("/series/1/geometry/NumberOfAverages", 2), ("/series/1/geometry/PixelBandwidth", 440))));
        Assert.DoesNotContain(difference.Moved, m => m.Observable.Observable is "signal" or "contrastRatio" or "relativeNoise" or "weightingT1");
        Assert.Contains(difference.Moved, m => m.Observable.Observable == "scanTime");
    }

    [Fact]
    public void ScannerEdit_SwappedInversionPulse_IsNamedAsTheCause()
    {
        var protocol = Documents.Brain.Replace("InversionTime: 2404}", "InversionTime: 2404, pulse: house}", StringComparison.Ordinal);
        string Scanner(string pulse) => Documents.Three.Replace("pulses: {}", $"pulses: {{house: {pulse}}}", StringComparison.Ordinal);
        var before = Documents.Input(Scanner("{kind: efficiency, efficiency: 0.96, efficiencySd: 0.02}"), protocol, expectations: null);
        var after = Documents.Input(Scanner("{kind: efficiency, efficiency: 0.86, efficiencySd: 0.02}"), protocol, expectations: null);
        var (old, now) = (Evaluation.Evaluate(before), Evaluation.Evaluate(after));
        var key = ObservableKey.Parse("axial-fluid-nulled-t2/nullTime(csf)@nominal");
        // Null T1 ln((1 + f)/(1 + f E)) with E = exp(−(TR − TL)/T1), TL 240 ms: handbook form with efficiency (from memory).
        double Null(double f) => 4350 * Math.Log((1 + f) / (1 + f * Math.Exp(-(9000 - 240) / 4350.0)));
        Assert.Equal(Null(0.86) - Null(0.96), now.Nominal[now.IndexOf(key)] - old.Nominal[old.IndexOf(key)], 10.0);
        var share = Assert.Single(ChangeAttribution.Attribute(Evaluation, before, after, old, now).Single(a => a.Observable == key).Shares);
        Assert.Equal(ProtoLedger.Protocols.Documents.DocumentKind.Scanner, share.Changes[0].Document);
    }

    [Fact]
    public void ManyParameters_BeyondTwelve_SampledSharesAddUp()
    {
        var before = Documents.Input(expectations: null);
        var after = before.With(
            ("/series/0/readout/RepetitionTime", 8000), ("/series/0/readout/EchoTime", 80), ("/series/0/readout/ExcitationFlipAngle", 85), ("/series/0/readout/EchoTrainLength", 20),
            ("/series/0/readout/RefocusingFlipAngles/0", 140), ("/series/0/preparations/0/InversionTime", 2300), ("/series/0/timing/slices", 24), ("/series/0/geometry/SliceThickness", 3),
            ("/series/0/geometry/sliceGap", 0.5), ("/series/0/geometry/PixelBandwidth", 220), ("/series/0/geometry/acceleration", 1), ("/series/0/geometry/matrix/1", 240),
            ("/series/0/geometry/FieldOfView/1", 210));
        var result = ChangeAttribution.Attribute(Evaluation, before, after, Evaluation.Evaluate(before), Evaluation.Evaluate(after))
            .Single(a => a.Observable.ToString() == "axial-fluid-nulled-t2/signal(white-matter)@nominal");
        Assert.True(result.Orders > 0);
        Assert.Equal(result.NewSigned - result.OldSigned, result.Shares.Sum(s => s.Share), 1e-9);
        Assert.Contains(result.Shares, s => s.StandardError > 0);
    }
}
