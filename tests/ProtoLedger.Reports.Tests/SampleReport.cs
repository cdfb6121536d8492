using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports.Model;

namespace ProtoLedger.Reports.Tests;

/// <summary>
/// A report of the kind that a cut repetition time gives. Signals come from closed forms for a spin echo after an inversion,
/// S = PD · |1 − (1 + f) e^(−TI/T1) + f e^(−TR/T1)| · e^(−TE/T2), with rounded brain values at 3 T; the rest is made up.
/// </summary>
internal static class SampleReport
{
    public static ChangeReport Cut { get; } = Make();

    /// <summary>The same change with nothing predicted.</summary>
    public static ChangeReport Empty { get; } = new(
        Cut.Identity with { BaseVersion = null, Hashes = [], Reason = "" },
        [], [], [], [], [], [], [], [], [], [], [], [], [], [], new ReportRun(0, 0, 0, 0, 0, 0, 0, 0), [], [], []);

    public static double Longitudinal(double t, double tr, double t1, double f = 0.96) =>
        1 - ((1 + f) * Math.Exp(-t / t1)) + (f * Math.Exp(-tr / t1));

    private static TissueSignal Signal(string tissue, string words, double pd, double t1, double t2)
    {
        double At(double tr, double f) => pd * Longitudinal(2400, tr, t1, f) * Math.Exp(-120 / t2);
        return new TissueSignal(tissue, words, At(9000, 0.96), At(6000, 0.96), At(9000, 0.6), At(6000, 0.6), 0.3);
    }

    private static TissueRecovery Recovery(string words, double t1)
    {
        CurvePoint[] Curve(double tr) => [.. Enumerable.Range(0, 41).Select(i => new CurvePoint(i * 100, Longitudinal(i * 100, tr, t1)))];
        double Null(double tr) => t1 * Math.Log(1.96 / (1 + (0.96 * Math.Exp(-tr / t1))));
        return new TissueRecovery(words, Null(9000), Null(6000), Curve(9000), Curve(6000));
    }

    private static ReportFinding Fluid(string scanner, double before, double after) => new(
        scanner,
        "axial-fluid-nulled-t2",
        "Axial fluid-nulled T2",
        $"ventricles and sulci turn from dark to brighter than white matter, {(before < 0.2 ? "0.11" : "0.14")} to {(after > 1 ? "1.2" : "0.98")}; cause: RepetitionTime 9000 to 6000 ms; worse for more than 99 % of plausible tissue values",
        after,
        "residualRatio",
        "ventricles and sulci",
        "white matter",
        FindingDirection.Worse,
        before,
        after,
        "",
        [new Cause("RepetitionTime", "9000 ms", "6000 ms", 1)],
        0.998,
        "brain, nominal field",
        Transition.NewlyFails,
        "ventricles and sulci stay dark",
        0.6,
        0.004,
        false);

    private static ChangeReport Make()
    {
        var grey = new ReportFinding(
            "linden-3t", "axial-fluid-nulled-t2", "Axial fluid-nulled T2",
            "grey matter stands out less from white matter, contrast 0.14 to 0.12; cause: RepetitionTime 9000 to 6000 ms; worse for about 91 % of plausible tissue values",
            0.2, "contrastDifference", "grey matter", "white matter", FindingDirection.Worse, 0.14, 0.12, "",
            [new Cause("RepetitionTime", "9000 ms", "6000 ms", 1)], 0.91, "brain, nominal field", null, null, null, null, true);
        return new ChangeReport(
            new ReportIdentity(
                "cr-0042", "protocol", "brain-standard", "Brain, standard", 7, 8, "t.okafor", "Tola Okafor",
                "Shorten the exam for the morning list: saves a minute.",
                new DateTimeOffset(2026, 11, 3, 9, 12, 0, TimeSpan.Zero), new DateTimeOffset(2026, 11, 3, 9, 12, 40, TimeSpan.Zero),
                "run-118", "2026.1-6f3a91c2d07b",
                [
                    new NamedHash("base document", new string('a', 64)), new NamedHash("proposed document", "3f9c1d77" + new string('b', 56)),
                    new NamedHash("catalogue adult-brain version 4", new string('c', 64)), new NamedHash("conditions brain version 2", new string('d', 64)),
                ]),
            [grey, Fluid("birch-15t", 0.14, 0.98), Fluid("linden-3t", 0.11, 1.2)],
            [
                new BalanceItem(FindingDirection.Better, "scan time", "Axial fluid-nulled T2", [], 186, 124, "s", "2 concatenations, as before"),
                new BalanceItem(FindingDirection.Worse, "RF power (old = 1)", "Axial fluid-nulled T2", ["linden-3t"], 1, 1.5, "", "no safety limit"),
                new BalanceItem(FindingDirection.Same, "noise (old = 1)", "Axial fluid-nulled T2", [], 1, 1, "", ""),
            ],
            [
                new ReportChange(
                    "Axial fluid-nulled T2", "/series/2/readout/RepetitionTime", "RepetitionTime", "of the whole cycle", "9000", "6000", "ms",
                    [new ConsoleWording("linden-3t", "TR", null), new ConsoleWording("birch-15t", "Repetition", "first pulse to first pulse")]),
            ],
            [
                new ScannerSummary("birch-15t", "Birch 1.5 T", 1.5, "Unit B, ground floor", 1, 0, 0, 0, 3, 4, true),
                new ScannerSummary("linden-3t", "Linden 3 T", 3, "Unit A, room 2", 1, 1, 0, 0, 2, 4, true),
            ],
            [new UnchangedVariant("brain-sedated", "Brain, sedated child", 3, "variant of brain-standard; keeps RepetitionTime 9000 ms")],
            [
                new OmissionNote("magnetisation transfer", "a shorter repetition time plays the refocusing pulses more often; white matter may darken by a few per cent more than predicted", ["RepetitionTime"]),
                new OmissionNote("inflow", "fluid that enters the slab after the inversion stays bright; it is not part of the nominal numbers", ["RepetitionTime"]),
            ],
            [
                new ReportStep("decide on this request: decline, or ask for a new inversion time", "this page", "physicist", "before anything is loaded"),
                new ReportStep("scan the fluid phantom with old and new values", "linden-3t", "lead technologist", "before approval"),
            ],
            [
                new Appearance(
                    "linden-3t", "Axial fluid-nulled T2", "brain, nominal field", PhantomKind.Head,
                    [
                        Signal("white-matter", "white matter", 0.69, 850, 72), Signal("grey-matter", "grey matter", 0.80, 1480, 88),
                        Signal("deep-grey", "deep grey matter", 0.79, 1360, 66), Signal("csf", "ventricles and sulci", 1, 4350, 2000),
                        Signal("fat", "scalp fat", 0.9, 375, 90), Signal("lesion", "lesions", 0.85, 1400, 140),
                        Signal("muscle", "muscle", 0.79, 1250, 34),
                    ],
                    0.03, 0.03, 0.15, 1.2, 1.2, true),
            ],
            [
                new PredictedEffect("linden-3t", "Axial fluid-nulled T2", "residualRatio", "ventricles and sulci", "white matter", "brain, nominal field", "", new PredictedValue(0.11, 0.04, 0.31), new PredictedValue(1.2, 0.9, 1.5), FindingDirection.Worse, 0.998),
                new PredictedEffect("linden-3t", "Axial fluid-nulled T2", "relativeRfPower", null, null, "nominal", "", new PredictedValue(1, 1, 1), new PredictedValue(1.5, 1.5, 1.5), FindingDirection.Worse, null),
                new PredictedEffect("linden-3t", "Axial fluid-nulled T2", "nullTime", "ventricles and sulci", null, "nominal", "ms", new PredictedValue(2430, 2210, 2650), new PredictedValue(2150, 1980, 2330), FindingDirection.Different, 1),
            ],
            [
                new AttributionTable(
                    "linden-3t", "Axial fluid-nulled T2", "residualRatio", "ventricles and sulci", "white matter", "nominal", "", 0.02, 1.2, 0.02, 1.2,
                    [new Contribution("RepetitionTime", "9000 to 6000 ms", 1.30, 0), new Contribution("EchoTime with EchoTrainLength", "120 to 110 ms; 24 to 22", -0.12, 0.01)], false),
            ],
            [
                new VerdictLine(
                    "fluid-dark", "ventricles and sulci stay dark", "lesions beside the ventricles must not drown", "linden-3t", "Axial fluid-nulled T2",
                    "brain, whole range", false, true, 0.6, "", new VerdictState(Verdict.Holds, true, 0.993, 0.11), new VerdictState(Verdict.Fails, false, 0.004, 1.2), Transition.NewlyFails),
            ],
            [new RecoveryCurve("linden-3t", "Axial fluid-nulled T2", 2400, 2400, [Recovery("ventricles and sulci", 4350), Recovery("white matter", 850), Recovery("grey matter", 1480)])],
            [
                new FieldMap(
                    "linden-3t", "Axial fluid-nulled T2", "residualRatio", "ventricles and sulci", "white matter", "", [-200, -100, 0, 100, 200], [0.8, 1.0, 1.2],
                    [[0.3, 0.2, 0.13, 0.2, 0.3], [0.28, 0.16, 0.11, 0.16, 0.28], [0.3, 0.18, 0.12, 0.18, 0.31]],
                    [[1.4, 1.3, 1.2, 1.3, 1.4], [1.35, 1.25, 1.2, 1.25, 1.35], [1.4, 1.3, 1.2, 1.3, 0.5]], 0.6, true),
            ],
            [
                new ReportRepair(
                    "ventricles and sulci stay dark", "linden-3t", "Axial fluid-nulled T2", [new RepairChange("InversionTime", 2400, 2130, "ms")], 0.97,
                    [new RepairCost("contrastDifference", "lesion", "white matter", 0.21, 0.17, "", FindingDirection.Worse)]),
            ],
            new ReportRun(84, 2, 5120, 611, 3, 2, 0, 0),
            [new TouchedVersion("brain-tumour", "Brain, tumour", 5, "linden-3t", true, "residualRatio", "ventricles and sulci", "white matter", 0.12, 0.14, "", 0)],
            [
                new Assumption("inversion pulse of linden-3t", "adiabatic, f = 0.96 ± 0.02", "default of the tool", false),
                new Assumption("T2 of cerebrospinal fluid at 3 T", "2000 ± 400 ms", "catalogue, recalled", true),
            ],
            ["Contrast series after this one were not recomputed for the shorter delay"]);
    }
}
