using ProtoLedger.Regression.Evaluation;
using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Markdown;

/// <summary>What a reader must see before anything else, in a fixed order.</summary>
internal static partial class FirstScreen
{
    /// <summary>Headings of the sections, in order.</summary>
    public static IReadOnlyList<string> Headings { get; } =
    [
        "What this edit does",
        "Better, worse, the same",
        "Changed parameters",
        "Scanner by scanner, worst first",
        "Variants left unchanged",
        "What this prediction leaves out for this edit",
        "What must be done next",
    ];

    private const int SentencesShown = 10;

    public static void Write(MarkdownWriter page, ChangeReport report, ReportWords words)
    {
        Findings(page.Heading(2, Headings[0]), report, words);
        Balance(page.Heading(2, Headings[1]), report, words);
        Changes(page.Heading(2, Headings[2]), report, words);
        Scanners(page.Heading(2, Headings[3]), report);
        Variants(page.Heading(2, Headings[4]), report);
        LeftOut(page.Heading(2, Headings[5]), report);
        NextSteps(page.Heading(2, Headings[6]), report, words);
    }

    private static void Findings(MarkdownWriter page, ChangeReport report, ReportWords words)
    {
        var groups = report.Findings
            // What an expectation that still holds says is said by the finding without it.
            .GroupBy(f => (f.SeriesId, f.SeriesTitle, f.Observable, f.Subject, f.Reference, f.Direction, Changed(f) ? f.ExpectationTitle : null))
            .Select(g => g.OrderByDescending(f => f.Severity).ThenBy(f => f.ScannerId, StringComparer.Ordinal).ToList())
            .OrderBy(g => Rank(g[0]))
            .ThenByDescending(g => g[0].Severity)
            .ThenBy(g => g[0].Sentence, StringComparer.Ordinal)
            .ToList();
        if (groups.Count == 0)
        {
            page.Paragraph("No predicted number changes. The edit touches nothing that this model computes.");
            return;
        }

        page.List(groups.Take(SentencesShown).Select(g => Finding(g, words)));
        if (groups.Count > SentencesShown)
            page.Paragraph($"{ReportWords.Count(groups.Count - SentencesShown, "smaller finding is", "smaller findings are")} under \u201C{Details.FindingsHeading}\u201D.");
    }

    private static string Finding(List<ReportFinding> group, ReportWords words)
    {
        var worst = group[0];
        var text = $"{MarkOf(worst)} {UserText.Literal(ReportWords.Sentence(worst.Sentence))} {Where(group, words)}";
        if (worst.ExpectationTitle is { } title && worst.ProbabilityHolds is { } p)
            text += $" Written expectation \u201C{UserText.Literal(title)}\u201D: holds for {Numbers.OfTissueValues(p)}.";
        if (worst.ReferenceMoved && worst.Reference is { } reference)
            text += $" Note that {UserText.Literal(reference)} itself changed.";
        return text;
    }

    private static string Where(List<ReportFinding> group, ReportWords words)
    {
        var worst = group[0];
        var series = UserText.Literal(worst.SeriesTitle);
        var others = group.Skip(1).Where(f => f.ScannerId != worst.ScannerId).DistinctBy(f => f.ScannerId).Select(f => Other(f, words)).ToList();
        var at = worst.Condition.Length > 0 ? $", {UserText.Literal(worst.Condition)}" : "";
        return others.Count == 0
            ? $"({series}, {words.Scanner(worst.ScannerId)}{at}.)"
            : $"({series}, {words.Scanner(worst.ScannerId)}{at}; likewise on {ReportWords.Join(others)}.)";
    }

    private static string Other(ReportFinding finding, ReportWords words)
    {
        if (finding.Observable is not { } name)
            return words.Scanner(finding.ScannerId);
        var (old, @new) = ReportWords.Values(name, finding.Before, finding.After, finding.Unit);
        return $"{words.Scanner(finding.ScannerId)}, {old} to {@new}";
    }

    /// <summary>What became of the expectation where one speaks of it, the direction otherwise.</summary>
    internal static Mark MarkOf(ReportFinding finding) =>
        Changed(finding) ? Mark.Of(finding.Transition!.Value) : Mark.Of(finding.Direction);

    private static bool Changed(ReportFinding finding) => finding.Transition is not (null or Transition.StillHolds or Transition.NotComparable);

    /// <summary>Smaller is told earlier.</summary>
    internal static int Rank(ReportFinding finding) => finding.Transition switch
    {
        Transition.NewlyFails => 0,
        Transition.NewlyUncertain => 1,
        Transition.StillFails => 2,
        _ => finding.Direction switch
        {
            FindingDirection.Worse => 3,
            FindingDirection.Different => 5,
            FindingDirection.Better => 4,
            _ => 6,
        },
    };

    private static void Balance(MarkdownWriter page, ChangeReport report, ReportWords words)
    {
        if (report.Balance.Count == 0)
        {
            page.Paragraph("Scan time, noise and RF power stay as they are.");
            return;
        }

        page.Table(
            ["Direction", "What", " Old", " New", "Where", "Note"],
            report.Balance
                .OrderBy(item => item.Direction switch { FindingDirection.Better => 0, FindingDirection.Worse => 1, FindingDirection.Different => 2, _ => 3 })
                .Select(item =>
                {
                    var (old, @new) = ReportWords.Values("", item.Before, item.After, item.Unit);
                    return (IReadOnlyList<string>)
                    [
                        Mark.Of(item.Direction).ToString(),
                        UserText.Literal(ReportWords.Capital(item.What)),
                        old,
                        @new,
                        Place(item.SeriesTitle, words.Scanners(item.ScannerIds)),
                        UserText.Literal(item.Note),
                    ];
                }));
    }

    private static string Place(string? series, string scanners) =>
        series is null ? scanners : $"{UserText.Literal(series)}, {scanners}";

    private static void Changes(MarkdownWriter page, ChangeReport report, ReportWords words)
    {
        if (report.Changes.Count == 0)
        {
            page.Paragraph("No parameter of the document itself changes.");
            return;
        }

        page.Table(
            ["Series", "Parameter", " Old", " New", "Unit", "On the console"],
            report.Changes.Select(change => (IReadOnlyList<string>)
            [
                change.SeriesTitle is { } series ? UserText.Literal(series) : "whole document",
                ReportWords.Code(change.Parameter) + (change.Meaning is { } meaning ? $" ({ReportWords.Meaning(meaning)})" : ""),
                change.Old is { } old ? UserText.Literal(old) : "not there",
                change.New is { } @new ? UserText.Literal(@new) : "removed",
                change.Unit.Length > 0 ? UserText.Literal(change.Unit) : "–",
                Console(change, words),
            ]));
    }

    private static string Console(ReportChange change, ReportWords words) =>
        change.Console.Count == 0
            ? "no wording recorded"
            : string.Join("; ", change.Console
                .GroupBy(w => (w.Word, w.Meaning))
                .Select(g => $"\u201C{UserText.Literal(g.Key.Word)}\u201D"
                    + (g.Key.Meaning is { } meaning ? $" = {ReportWords.Meaning(meaning)}" : "")
                    + $" on {words.Scanners(g.Select(w => w.ScannerId).ToList())}"));

    private static void Variants(MarkdownWriter page, ChangeReport report)
    {
        if (report.UnchangedVariants.Count == 0)
            page.Paragraph("None: no other stored protocol is a variant of this one.");
        else
            page.List(report.UnchangedVariants.Select(v =>
                $"{UserText.Literal(v.Title)} ({ReportWords.Code(v.ProtocolId)}, version {Numbers.Whole(v.Version)}): {UserText.Literal(v.Why)}"));
    }

    private static void LeftOut(MarkdownWriter page, ChangeReport report)
    {
        if (report.LeftOut.Count == 0)
            page.Paragraph("Nothing that this edit makes matter is known to be missing.");
        else
            page.List(report.LeftOut.Select(Omission));
    }

    private static string Omission(OmissionNote note)
    {
        var because = note.Because.Count == 0 ? "" : $" (because of {ReportWords.Join(note.Because.Select(ReportWords.Code).ToList())})";
        var effect = note.Effect.Length == 0 ? "" : $"{UserText.Literal(ReportWords.Capital(note.Effect))}{because}: ";
        return effect + UserText.Literal(ReportWords.Sentence(note.Text));
    }

    private static void NextSteps(MarkdownWriter page, ChangeReport report, ReportWords words)
    {
        if (report.NextSteps.Count > 0)
            page.Table(
                ["Step", "What", "Where", "By whom", "When"],
                report.NextSteps.GroupBy(step => (step.What, step.ByWhom, step.When)).Select((step, i) => (IReadOnlyList<string>)
                [
                    Numbers.Whole(i + 1),
                    UserText.Literal(ReportWords.Capital(step.Key.What)),
                    ReportWords.Join([.. step.Select(s => words.Scanner(s.Where)).Distinct()]),
                    UserText.Literal(step.Key.ByWhom),
                    UserText.Literal(step.Key.When),
                ]));
        page.Paragraph(Cautions.Short);
    }
}
