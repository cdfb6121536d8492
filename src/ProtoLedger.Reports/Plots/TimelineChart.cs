using ProtoLedger.Reports.Model.Binders;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Plots;

/// <summary>What was effective when: one row a protocol and scanner, one bar a version; stated history is outlined, gaps are hatched.</summary>
public static class TimelineChart
{
    private const double Left = 210;
    private const double Right = 700;
    private const double Row = 30;
    private const double Top = 12;

    /// <summary>Draws the rows over a period.</summary>
    /// <param name="name">Name of the figure.</param>
    /// <param name="rows">At least one row.</param>
    /// <param name="from">Begin of the period, UTC.</param>
    /// <param name="until">End of the period, UTC, later than <paramref name="from"/>.</param>
    /// <exception cref="ArgumentException">There is no row, or the period is empty.</exception>
    public static Figure Draw(string name, IReadOnlyList<TimelineRow> rows, DateTimeOffset from, DateTimeOffset until)
    {
        ArgumentNullException.ThrowIfNull(rows);
        if (rows.Count == 0 || until <= from)
            throw new ArgumentException("A timeline needs a row and a period.", nameof(rows));
        var bottom = Top + (Row * rows.Count);
        var canvas = new SvgCanvas(name, 720, bottom + 62);
        double At(DateTimeOffset time) =>
            Left + ((Right - Left) * Math.Clamp((time - from).TotalSeconds / (until - from).TotalSeconds, 0, 1));
        foreach (var (time, label) in Ticks(from, until))
        {
            canvas.Line(At(time), Top, At(time), bottom, Stroke.Grid);
            canvas.Label(At(time), bottom + 16, label, time == from ? "start" : time == until ? "end" : "middle", size: 10.5);
        }

        for (var i = 0; i < rows.Count; i++)
            Draw(canvas, rows[i], Top + (Row * i), At);
        Legend(canvas, bottom + 46);
        var title = $"Effective versions from {Numbers.Date(from)} to {Numbers.Date(until)}";
        var text = $"{rows.Count.ToString(System.Globalization.CultureInfo.InvariantCulture)} rows; the table has the same dates.";
        return new Figure(name, title, text, canvas.Finish(title, text), Twin(rows));
    }

    private static void Draw(SvgCanvas canvas, TimelineRow row, double y, Func<DateTimeOffset, double> at)
    {
        canvas.Label(Left - 10, y + 19, SvgCanvas.Shorten(row.Label, 34), "end");
        canvas.Hatch(Left, y + 5, Right - Left, Row - 10);
        foreach (var span in row.Spans)
        {
            var (x1, x2) = (at(span.From), span.Until is { } end ? at(end) : Right);
            if (x2 <= x1)
                continue;
            canvas.Box(x1, y + 4, x2 - x1, Row - 8, span.Imported ? "m0" : "m3", span.Imported ? "#f3f6f7" : "#8db8d2");
            canvas.Frame(x1, y + 4, x2 - x1, Row - 8, span.Imported ? Stroke.Ink with { Dashes = "4 3", Width = 1 } : Stroke.Ink with { Width = 1 });
            if (x2 - x1 > 8 * span.Label.Length)
                canvas.Label((x1 + x2) / 2, y + 19, span.Label, "middle");
        }
    }

    private static void Legend(SvgCanvas canvas, double y)
    {
        canvas.Box(Left, y, 26, 12, "m3", "#8db8d2");
        canvas.Frame(Left, y, 26, 12, Stroke.Ink with { Width = 1 });
        canvas.Label(Left + 32, y + 10, "recorded and signed here");
        canvas.Frame(Left + 200, y, 26, 12, Stroke.Ink with { Dashes = "4 3", Width = 1 });
        canvas.Label(Left + 232, y + 10, "stated history");
        canvas.Hatch(Left + 340, y, 26, 12);
        canvas.Label(Left + 372, y + 10, "no record");
    }

    /// <summary>Four or five dates: the ends and days between.</summary>
    private static IEnumerable<(DateTimeOffset Time, string Label)> Ticks(DateTimeOffset from, DateTimeOffset until)
    {
        for (var i = 0; i <= 4; i++)
        {
            var time = from + ((until - from) * (i / 4.0));
            yield return (time, Numbers.Date(time));
        }
    }

    private static FigureTable Twin(IReadOnlyList<TimelineRow> rows) => new(
        ["Where", "Version", "From", "Until", "Record"],
        [.. rows.SelectMany(row => row.Spans.Select(span => (IReadOnlyList<string>)
        [
            row.Label, span.Label, Numbers.Time(span.From), span.Until is { } end ? Numbers.Time(end) : "still", span.Imported ? "stated, not signed here" : "recorded here",
        ]))]);
}
