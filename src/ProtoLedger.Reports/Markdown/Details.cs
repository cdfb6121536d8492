using ProtoLedger.Regression.Findings;
using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Plots;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Markdown;

/// <summary>What stands behind the first screen.</summary>
internal static partial class Details
{
    /// <summary>Heading of the list of all findings.</summary>
    public const string FindingsHeading = "Every finding, scanner by scanner";

    public static void Write(MarkdownWriter page, ChangeReport report, ReportFigures figures, ReportWords words)
    {
        Findings(page, report);
        Appearances(page, report, figures, words);
        Effects(page.Heading(2, "Predicted effect by tissue and pair"), report, words);
        Attributions(page.Heading(2, "Which parameter did it"), report, figures, words);
        Verdicts(page.Heading(2, "Written expectations"), report, words);
        Plots(page, "Recovery around the inversion time", figures.RecoveryCurves);
        Plots(page, "Over off-resonance and B1+", figures.FieldMaps);
        Repairs(page, report, words);
        Touched(page.Heading(2, "Other versions that the run touched"), report, words);
        Assumptions(page.Heading(2, "Assumptions"), report);
        page.Heading(2, "Cautions").List(Cautions.Of(report, words));
        Origin(page.Heading(2, "Origin and hashes"), report);
    }

    private static void Findings(MarkdownWriter page, ChangeReport report)
    {
        if (report.Findings.Count == 0)
            return;
        page.Heading(2, FindingsHeading);
        foreach (var scanner in FirstScreen.WorstFirst(report))
        {
            var findings = report.Findings.Where(f => f.ScannerId == scanner.ScannerId).ToList();
            if (findings.Count > 0)
                page.Heading(3, UserText.Literal(scanner.Title)).List(findings
                    .OrderBy(FirstScreen.Rank).ThenByDescending(f => f.Severity).ThenBy(f => f.Sentence, StringComparer.Ordinal)
                    .Select(f => $"{UserText.Literal(f.SeriesTitle)}: {UserText.Literal(ReportWords.Sentence(f.Sentence))} {FirstScreen.MarkOf(f)}"));
        }
    }

    private static void Appearances(MarkdownWriter page, ChangeReport report, ReportFigures figures, ReportWords words)
    {
        if (report.Appearances.Count == 0)
            return;
        page.Heading(2, "Predicted appearance");
        for (var i = 0; i < report.Appearances.Count; i++)
        {
            var appearance = report.Appearances[i];
            var pictures = figures.Pictures[i];
            page.Heading(3, $"{UserText.Literal(appearance.SeriesTitle)}, {words.Scanner(appearance.ScannerId)}, {UserText.Literal(appearance.Condition)}")
                .Paragraph(Reference(pictures.Name, pictures.Title))
                .Paragraph(UserText.Literal(pictures.Text));
            if (figures.Signals[i] is { } signals)
                Plot(page, signals);
        }
    }

    private static void Effects(MarkdownWriter page, ChangeReport report, ReportWords words)
    {
        if (report.Effects.Count == 0)
        {
            page.Paragraph("No predicted number changes.");
            return;
        }

        foreach (var series in report.Effects.GroupBy(e => (e.SeriesTitle, e.ScannerId, e.Condition)))
            page.Heading(3, $"{UserText.Literal(series.Key.SeriesTitle)}, {words.Scanner(series.Key.ScannerId)}, {UserText.Literal(series.Key.Condition)}")
                .Table(
                    ["Number", " Old", " New", "Direction", "Share of tissue values"],
                    series.Select(Effect));
        page.Paragraph("In brackets: from the 5th to the 95th percentile over plausible tissue values.");
    }

    private static IReadOnlyList<string> Effect(PredictedEffect effect)
    {
        var (old, @new) = ReportWords.Values(effect.Observable, effect.Before?.Nominal, effect.After?.Nominal, effect.Unit);
        return
        [
            ReportWords.Label(effect.Observable, effect.Subject, effect.Reference),
            old + Range(effect, effect.Before),
            @new + Range(effect, effect.After),
            // A difference too small to be written is none to a reader.
            Mark.Of(effect.Direction == FindingDirection.Different && old == @new ? FindingDirection.Same : effect.Direction).ToString(),
            effect.Share is { } share ? Numbers.Share(share) : "–",
        ];
    }

    private static string Range(PredictedEffect effect, PredictedValue? value)
    {
        if (value is null || value.High - value.Low <= 1e-9)
            return "";
        var (low, high) = ReportWords.Values(effect.Observable, value.Low, value.High, effect.Unit == "s" ? "s" : "");
        return $" ({low} to {high})";
    }

    private static void Attributions(MarkdownWriter page, ChangeReport report, ReportFigures figures, ReportWords words)
    {
        if (report.Attributions.Count == 0)
        {
            page.Paragraph("No number changed that could be traced to a parameter.");
            return;
        }

        page.Paragraph("Each change of a signed number is divided among the changed parameters, averaged over every order in which they could have been made; parameters that are not valid apart count as one. The parts add up to the change.");
        for (var i = 0; i < report.Attributions.Count; i++)
        {
            if (figures.Attributions[i] is not { } figure)
                continue;
            var table = report.Attributions[i];
            page.Heading(3, $"{ReportWords.Label(table.Observable, table.Subject, table.Reference)}: {UserText.Literal(table.SeriesTitle)}, {words.Scanner(table.ScannerId)}, {UserText.Literal(table.Lane)}");
            var (old, @new) = ReportWords.Values(table.Observable, table.Before, table.After, table.Unit);
            var (seen, sees) = ReportWords.Values(table.Observable, table.MagnitudeBefore, table.MagnitudeAfter, table.Unit);
            page.Paragraph($"Signed: {old} to {@new}. Without sign, as the image shows it: {seen} to {sees}.{(table.Exact ? "" : " Orders were sampled; the standard error is stated.")}");
            Plot(page, figure);
        }

        FurtherAttributions(page, report, figures, words);
    }

    /// <summary>Numbers that no finding speaks of, one line each.</summary>
    private static void FurtherAttributions(MarkdownWriter page, ChangeReport report, ReportFigures figures, ReportWords words)
    {
        var further = report.Attributions.Where((_, i) => figures.Attributions[i] is null).ToList();
        foreach (var place in further.GroupBy(t => (t.SeriesTitle, t.ScannerId)))
            page.Heading(3, $"Every other number: {UserText.Literal(place.Key.SeriesTitle)}, {words.Scanner(place.Key.ScannerId)}")
                .Table(
                    ["Number", "Where", " Signed, old", " Signed, new", "Parts"],
                    place.Select(table =>
                    {
                        var (old, @new) = ReportWords.Values(table.Observable, table.Before, table.After, table.Unit);
                        return (IReadOnlyList<string>)[ReportWords.Label(table.Observable, table.Subject, table.Reference), UserText.Literal(table.Lane), old, @new, Parts(table)];
                    }).DistinctBy(row => string.Join('|', row)));
    }

    private static string Parts(AttributionTable table) => table.Contributions.Count == 0
        ? "none"
        : string.Join("; ", table.Contributions
            .Select(c => AttributionChart.Relative(table, c))
            .Select(c => $"{UserText.Literal($"{c.Parameter} {c.Change}")}: {AttributionChart.Amount(c)}"));

    private static void Verdicts(MarkdownWriter page, ChangeReport report, ReportWords words)
    {
        if (report.Verdicts.Count == 0)
        {
            page.Paragraph("No expectation is written for these series. Without one, nothing here says whether the change is acceptable.");
            return;
        }

        page.Table(
            ["Transition", "Expectation", "Why", "Where", "Limit", "Old", "New"],
            report.Verdicts.Select(v => (IReadOnlyList<string>)
            [
                Mark.Of(v.Transition).ToString(),
                $"{UserText.Literal(ReportWords.Capital(v.Title))} ({ReportWords.Code(v.ExpectationId)})",
                UserText.Literal(v.Why),
                $"{UserText.Literal(v.SeriesTitle)}, {words.Scanner(v.ScannerId)}, {UserText.Literal(v.Condition)}",
                $"{(v.AtMost ? "at most" : "at least")} {ReportWords.WithUnit(Numbers.Setting(v.Limit), v.Unit)}{(v.Paired ? ", new over old" : "")}",
                State(v.Before, v.Unit),
                State(v.After, v.Unit),
            ]));
        page.Paragraph("Probability: share of plausible tissue values, over the named conditions, for which the expectation holds.");
    }

    private static string State(VerdictState? state, string unit)
    {
        if (state is null)
            return "none";
        var value = state.Value is { } v ? $" at {ReportWords.WithUnit(Numbers.Plain(v), unit)}" : "";
        var probability = state.Probability is { } p ? $"; probability {Numbers.Probability(p)}" : "";
        var nominal = state.Value is null ? "" : state.NominalHolds ? "; at mean values it holds" : "; at mean values it fails";
        return $"{Mark.Of(state.Verdict)}{value}{probability}{nominal}";
    }

    private static void Plots(MarkdownWriter page, string heading, IReadOnlyList<Figure> figures)
    {
        if (figures.Count == 0)
            return;
        page.Heading(2, heading);
        foreach (var figure in figures)
        {
            page.Heading(3, UserText.Literal(figure.Title));
            Plot(page, figure);
        }
    }

    /// <summary>A plot, its words, its numbers.</summary>
    private static void Plot(MarkdownWriter page, Figure figure) =>
        page.Paragraph(Reference(figure.Name, figure.Title))
            .Table(
                [.. figure.Twin.Headings.Select(h => (h.StartsWith(' ') ? " " : "") + UserText.Literal(h))],
                figure.Twin.Rows.Select(row => (IReadOnlyList<string>)[.. row.Select(UserText.Literal)]));

    private static string Reference(string name, string title) => $"![{UserText.Literal(title)}](figures/{name})";
}
