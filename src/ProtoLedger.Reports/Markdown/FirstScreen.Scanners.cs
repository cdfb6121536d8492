using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Markdown;

/// <content>Scanner by scanner.</content>
internal static partial class FirstScreen
{
    private static void Scanners(MarkdownWriter page, ChangeReport report)
    {
        if (report.Scanners.Count == 0)
        {
            page.Paragraph("No scanner runs this document.");
            return;
        }

        page.Table(
            ["Scanner", "Verdict", "Expectations", "Largest effect there"],
            WorstFirst(report).Select(scanner => (IReadOnlyList<string>)
            [
                $"{UserText.Literal(scanner.Title)} ({Numbers.Setting(scanner.MagneticFieldStrength)} T, {UserText.Literal(scanner.Location)})",
                Verdict(scanner, Largest(report, scanner)).ToString(),
                Expectations(scanner),
                Effect(scanner, Largest(report, scanner)),
            ]));
    }

    /// <summary>The order of the scanner table: most broken first, then most severe finding, then identifier.</summary>
    internal static IEnumerable<ScannerSummary> WorstFirst(ChangeReport report) =>
        report.Scanners
            .OrderByDescending(s => s.SlicesFit ? 0 : 1)
            .ThenByDescending(s => s.NewlyFails)
            .ThenByDescending(s => s.NewlyUncertain)
            .ThenByDescending(s => s.StillFails)
            .ThenByDescending(s => Largest(report, s)?.Severity ?? 0)
            .ThenBy(s => s.ScannerId, StringComparer.Ordinal);

    private static ReportFinding? Largest(ChangeReport report, ScannerSummary scanner) =>
        report.Findings
            .Where(f => f.ScannerId == scanner.ScannerId && f.Observable is not null && f.Direction != FindingDirection.Same)
            .OrderByDescending(f => f.Severity)
            .ThenBy(f => f.Sentence, StringComparer.Ordinal)
            .FirstOrDefault();

    private static Mark Verdict(ScannerSummary scanner, ReportFinding? largest) =>
        scanner switch
        {
            { NewlyFails: > 0 } => Mark.Of(Transition.NewlyFails),
            { NewlyUncertain: > 0 } => Mark.Of(Transition.NewlyUncertain),
            { StillFails: > 0 } => Mark.Of(Transition.StillFails),
            { NewlyHolds: > 0 } => Mark.Of(Transition.NewlyHolds),
            { StillHolds: > 0 } => Mark.Of(Transition.StillHolds),
            _ => Mark.Of(largest?.Direction ?? FindingDirection.Same),
        };

    private static string Expectations(ScannerSummary scanner)
    {
        if (scanner.WrittenExpectations == 0)
            return "none written";
        var parts = new List<string>();
        Add(scanner.NewlyFails, "newly fails", "newly fail");
        Add(scanner.NewlyUncertain, "newly uncertain", "newly uncertain");
        Add(scanner.StillFails, "still fails", "still fail");
        Add(scanner.NewlyHolds, "newly holds", "newly hold");
        Add(scanner.StillHolds, "still holds", "still hold");
        var told = scanner.NewlyFails + scanner.NewlyUncertain + scanner.StillFails + scanner.NewlyHolds + scanner.StillHolds;
        Add(scanner.WrittenExpectations - told, "other", "others");
        return $"{string.Join(", ", parts)} (of {Numbers.Whole(scanner.WrittenExpectations)})";

        void Add(int number, string one, string many)
        {
            if (number > 0)
                parts.Add(ReportWords.Count(number, one, many));
        }
    }

    private static string Effect(ScannerSummary scanner, ReportFinding? finding)
    {
        var fit = scanner.SlicesFit ? "" : "The slices no longer fit in the repetition time. ";
        if (finding is not { Observable: { } name })
            return fit.Length > 0 ? fit.TrimEnd() : "no change that matters";
        var (old, @new) = ReportWords.Values(name, finding.Before, finding.After, finding.Unit);
        return $"{fit}{ReportWords.Label(name, finding.Subject, finding.Reference)}: {old} to {@new}";
    }
}
