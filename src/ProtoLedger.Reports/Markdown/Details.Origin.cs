using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Markdown;

/// <content>Repairs, other versions, assumptions and hashes.</content>
internal static partial class Details
{
    private static void Repairs(MarkdownWriter page, ChangeReport report, ReportWords words)
    {
        if (report.Repairs.Count == 0)
            return;
        page.Heading(2, "What would repair it, and what that costs");
        foreach (var repair in report.Repairs)
        {
            var changes = ReportWords.Join([.. repair.Changes.Select(c =>
                $"{ReportWords.Code(c.Parameter)} {Numbers.Setting(c.From)} to {ReportWords.WithUnit(Numbers.Setting(c.To), c.Unit)}")]);
            page.Heading(3, $"{UserText.Literal(ReportWords.Capital(repair.ExpectationTitle))}: {UserText.Literal(repair.SeriesTitle)}, {words.Scanner(repair.ScannerId)}")
                .Paragraph($"Change {changes}. The expectation then holds for {Numbers.OfTissueValues(repair.ProbabilityHolds)}.");
            if (repair.Costs.Count == 0)
                page.Paragraph("No other number moves.");
            else
                page.Table(
                    ["Cost", " Base version", " With the repair", "Direction"],
                    repair.Costs.Select(cost =>
                    {
                        var (old, @new) = ReportWords.Values(cost.Observable, cost.Before, cost.After, cost.Unit);
                        return (IReadOnlyList<string>)[ReportWords.Label(cost.Observable, cost.Subject, cost.Reference), old, @new, Mark.Of(cost.Direction).ToString()];
                    }));
        }
    }

    private static void Touched(MarkdownWriter page, ChangeReport report, ReportWords words)
    {
        var run = report.Run;
        page.Paragraph(
            $"The run recomputed {ReportWords.Count(run.Versions, "stored version", "stored versions")} and {ReportWords.Count(run.Proposals, "proposal", "proposals")} "
            + $"({ReportWords.Count(run.Results, "result", "results")}, {Numbers.Whole(run.Shared)} of them shared with an identical input). "
            + $"{ReportWords.Count(run.Moved, "version", "versions")} moved although the document did not change; "
            + $"{ReportWords.Count(run.NewlyFailing, "expectation newly fails", "expectations newly fail")}, "
            + $"{ReportWords.Count(run.NewlyHolding, "newly holds", "newly hold")}."
            + (run.FailedShards > 0 ? $" {ReportWords.Count(run.FailedShards, "part", "parts")} of the run failed." : ""));
        if (report.Touched.Count == 0)
        {
            page.Paragraph("No other stored version moved.");
            return;
        }

        page.Table(
            ["Protocol", " Version", "Scanner", "In use", "Moved most", " Old", " New", " Newly failing"],
            report.Touched.OrderByDescending(t => t.NewlyFails).ThenByDescending(t => t.Effective).Select(t =>
            {
                var (old, @new) = ReportWords.Values(t.Observable, t.Before, t.After, t.Unit);
                return (IReadOnlyList<string>)
                [
                    $"{UserText.Literal(t.Title)} ({ReportWords.Code(t.ProtocolId)})",
                    Numbers.Whole(t.Version),
                    words.Scanner(t.ScannerId),
                    t.Effective ? "yes" : "no",
                    ReportWords.Label(t.Observable, t.Subject, t.Reference),
                    old,
                    @new,
                    Numbers.Whole(t.NewlyFails),
                ];
            }));
    }

    private static void Assumptions(MarkdownWriter page, ChangeReport report)
    {
        if (report.Assumptions.Count == 0)
            page.Paragraph("The documents leave no value open.");
        else
            page.Table(
                ["What", "Value", "Source", "Evidence"],
                report.Assumptions.Select(a => (IReadOnlyList<string>)
                [
                    UserText.Literal(ReportWords.Capital(a.Name)), UserText.Literal(a.Value), UserText.Literal(a.Source), a.Weak ? Mark.Weak.ToString() : "as stated",
                ]));
    }

    private static void Origin(MarkdownWriter page, ChangeReport report)
    {
        var id = report.Identity;
        IEnumerable<IReadOnlyList<string>> facts =
        [
            ["Change request", ReportWords.Code(id.ChangeRequest)],
            ["Document", $"{UserText.Literal(id.DocumentKind)} {ReportWords.Code(id.DocumentId)}"],
            ["Author", $"{UserText.Literal(id.AuthorName)} ({ReportWords.Code(id.Author)})"],
            ["Submitted", Numbers.Time(id.SubmittedAt)],
            ["Computed", Numbers.Time(id.ComputedAt)],
            ["Regression run", ReportWords.Code(id.RunId)],
            ["Model", ReportWords.Code(id.ModelId)],
            .. id.Hashes.Select(h => (IReadOnlyList<string>)[$"SHA-256 of {UserText.Literal(h.Name)}", ReportWords.Code(h.Sha256)]),
        ];
        page.Table(["What", "Value"], facts);
    }
}
