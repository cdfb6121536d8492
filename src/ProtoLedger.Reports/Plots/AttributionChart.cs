using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Plots;

/// <summary>Steps from the signed value before to the one after, one bar for each parameter.</summary>
public static class AttributionChart
{
    private const double Left = 250;
    private const double Width = 720;
    private const double Row = 34;

    /// <summary>Draws a table of contributions.</summary>
    /// <param name="name">Name of the figure.</param>
    /// <param name="table">At least one contribution; finite numbers.</param>
    /// <param name="scannerTitle">Title of the scanner.</param>
    public static Figure Draw(string name, AttributionTable table, string scannerTitle)
    {
        ArgumentNullException.ThrowIfNull(table);
        table = Relative(table);
        var label = ObservableWords.Label(table.Observable, table.Subject, table.Reference);
        var title = $"What moved {label}: {table.SeriesTitle}, {scannerTitle}, {table.Lane}";
        var height = 24 + (Row * (table.Contributions.Count + 2)) + 44;
        var canvas = new SvgCanvas(name, Width, height);
        var ends = Ends(table);
        var axis = new Axis(Math.Min(0, ends.Min()), Math.Max(0, ends.Max()), Left, Width - 70);
        var bottom = 24 + (Row * (table.Contributions.Count + 2));
        foreach (var (value, text) in axis.Ticks())
        {
            canvas.Line(axis.At(value), 16, axis.At(value), bottom, Stroke.Grid);
            canvas.Label(axis.At(value), bottom + 16, text, "middle");
        }

        canvas.Line(axis.At(0), 16, axis.At(0), bottom, Stroke.Axis);
        canvas.Label((Left + Width - 70) / 2, bottom + 34, "signed value" + (table.Unit.Length > 0 ? $" ({table.Unit})" : " (no unit)"), "middle");
        End(canvas, axis, 0, "before", table.Before, false);
        var at = table.Before;
        for (var i = 0; i < table.Contributions.Count; i++)
        {
            Step(canvas, axis, i + 1, table.Contributions[i], at);
            at += table.Contributions[i].Amount;
        }

        End(canvas, axis, table.Contributions.Count + 1, "after", table.After, true);
        return new Figure(name, title, Describe(table, label), canvas.Finish(title, Describe(table, label)), Twin(table));
    }

    private static List<double> Ends(AttributionTable table)
    {
        var ends = new List<double> { table.Before, table.After };
        var at = table.Before;
        foreach (var contribution in table.Contributions)
            ends.Add(at += contribution.Amount);
        return ends;
    }

    private static double Middle(int row) => 24 + (Row * row) + (Row / 2);

    private static void End(SvgCanvas canvas, Axis axis, int row, string word, double value, bool solid)
    {
        canvas.Label(Left - 12, Middle(row) + 4, word, "end", strong: true);
        canvas.Line(axis.At(value), Middle(row) - 10, axis.At(value), Middle(row) + (solid ? 10 : Row / 2), Stroke.Ink);
        canvas.Marker(3, axis.At(value), Middle(row), 5, Stroke.Series(3), solid);
        canvas.Label(axis.At(value) + 12, Middle(row) + 4, Numbers.Plain(value, 1), strong: true);
    }

    private static void Step(SvgCanvas canvas, Axis axis, int row, Contribution contribution, double from)
    {
        var to = from + contribution.Amount;
        var (x1, x2) = (axis.At(Math.Min(from, to)), axis.At(Math.Max(from, to)));
        var rises = contribution.Amount >= 0;
        canvas.Label(Left - 12, Middle(row) - 2, SvgCanvas.Shorten(contribution.Parameter, 36), "end");
        canvas.Label(Left - 12, Middle(row) + 12, SvgCanvas.Shorten(contribution.Change, 40), "end", size: 10.5);
        canvas.Box(x1, Middle(row) - 9, Math.Max(1, x2 - x1), 18, rises ? "f1" : "f2", rises ? "#0072b2" : "#d55e00");
        if (!rises)
            canvas.Hatch(x1, Middle(row) - 9, Math.Max(1, x2 - x1), 18);
        canvas.Line(axis.At(to), Middle(row) - 9, axis.At(to), Middle(row) + Row - 9, Stroke.Ink);
        canvas.Label(x2 + 8, Middle(row) + 4, Amount(contribution));
    }

    /// <summary>The table with the number before as 1, where the number means nothing by itself.</summary>
    private static AttributionTable Relative(AttributionTable table) => table with
    {
        Before = table.Before / Scale(table),
        After = table.After / Scale(table),
        Contributions = [.. table.Contributions.Select(c => Relative(table, c))],
    };

    /// <summary>A contribution on the scale of <see cref="ObservableWords.Values"/>.</summary>
    internal static Contribution Relative(AttributionTable table, Contribution contribution) =>
        contribution with
        {
            // A change that begins with its parameter's name need not say it twice.
            Change = contribution.Change.StartsWith(contribution.Parameter + " ", StringComparison.Ordinal) ? contribution.Change[(contribution.Parameter.Length + 1)..] : contribution.Change,
            Amount = contribution.Amount / Scale(table),
            StandardError = contribution.StandardError / Scale(table),
        };

    private static double Scale(AttributionTable table) => ObservableWords.IsRelative(table.Observable) && table.Before > 0 ? table.Before : 1;

    /// <summary>A signed amount, with its standard error where it has one.</summary>
    internal static string Amount(Contribution contribution) =>
        contribution.StandardError > 0
            ? $"{Numbers.Change(contribution.Amount)} ± {Numbers.Plain(contribution.StandardError, 1)}"
            : Numbers.Change(contribution.Amount);

    private static string Describe(AttributionTable table, string label) =>
        $"The signed value of {label} goes from {Numbers.Plain(table.Before, 1)} to {Numbers.Plain(table.After, 1)}. "
        + $"Largest part: {table.Contributions[0].Parameter} ({table.Contributions[0].Change}), {Amount(table.Contributions[0])}.";

    private static FigureTable Twin(AttributionTable table)
    {
        var unit = table.Unit.Length > 0 ? $" ({table.Unit})" : "";
        var change = table.After - table.Before;
        return new FigureTable(
            ["Parameter", "Change", $" Contribution{unit}", " Share of the change"],
            [.. table.Contributions.Select(c => (IReadOnlyList<string>)
            [
                c.Parameter,
                c.Change,
                Amount(c),
                Math.Abs(change) > 1e-12 ? $"{Numbers.Setting(Math.Round(100 * c.Amount / change))} %" : "–",
            ])]);
    }
}
