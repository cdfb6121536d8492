using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Plots;

/// <summary>An observable over off-resonance and B1+, before and after: shaded patches that carry their values; what breaks the limit is hatched.</summary>
public static class FieldMapChart
{
    private const double Left = 62;
    private const double CellHeight = 26;
    private const int Shades = 5;
    private static readonly string[] Colours = ["#f3f6f7", "#d6e3ea", "#b3cede", "#8db8d2", "#74abcc"];

    /// <summary>Draws a map.</summary>
    /// <param name="name">Name of the figure.</param>
    /// <param name="map">Rows and columns as its axes say.</param>
    /// <param name="scannerTitle">Title of the scanner.</param>
    /// <exception cref="ArgumentException">Rows or columns do not fit the axes.</exception>
    public static Figure Draw(string name, FieldMap map, string scannerTitle)
    {
        ArgumentNullException.ThrowIfNull(map);
        Check(map.Before, map, allowEmpty: true);
        Check(map.After, map, allowEmpty: false);
        var label = ObservableWords.Label(map.Observable, map.Subject, map.Reference);
        var title = $"{char.ToUpperInvariant(label[0])}{label[1..]} over the field: {map.SeriesTitle}, {scannerTitle}";
        var panel = CellHeight * map.B1Scale.Count;
        var before = map.Before.Count > 0;
        var height = 30 + (before ? panel + 36 : 0) + panel + 84;
        var canvas = new SvgCanvas(name, 720, height);
        var values = map.Before.Concat(map.After).SelectMany(r => r).ToList();
        // The limit belongs to the scale: far from it, small differences stay pale.
        var (low, high) = (Math.Min(values.Min(), map.Limit ?? values.Min()), Math.Max(values.Max(), map.Limit ?? values.Max()));
        var y = 30.0;
        if (before)
        {
            Panel(canvas, map, map.Before, "before", y, low, high);
            y += panel + 36;
        }

        Panel(canvas, map, map.After, "after", y, low, high);
        Bottom(canvas, map, y + panel);
        Legend(canvas, map, y + panel + 52, low, high);
        var text = Describe(map, label);
        return new Figure(name, title, text, canvas.Finish(title, text), Twin(map));
    }

    private static void Check(IReadOnlyList<IReadOnlyList<double>> rows, FieldMap map, bool allowEmpty)
    {
        if (allowEmpty && rows.Count == 0)
            return;
        if (rows.Count != map.B1Scale.Count || rows.Any(r => r.Count != map.OffResonanceHz.Count) || rows.Count == 0 || map.OffResonanceHz.Count == 0)
            throw new ArgumentException("The rows of a field map are its B1+ scales, the columns its off-resonances.", nameof(map));
    }

    private static double CellWidth(FieldMap map) => (700 - Left) / map.OffResonanceHz.Count;

    private static void Panel(SvgCanvas canvas, FieldMap map, IReadOnlyList<IReadOnlyList<double>> rows, string word, double top, double low, double high)
    {
        var width = CellWidth(map);
        canvas.Label(Left, top - 8, word, strong: true);
        canvas.Upright(14, top + (CellHeight * rows.Count / 2), "B1+ scale");
        for (var r = 0; r < rows.Count; r++)
        {
            // The largest B1+ scale stands on top, as on an axis.
            var y = top + (CellHeight * (rows.Count - 1 - r));
            canvas.Label(Left - 6, y + 17, Scale(map.B1Scale[r]), "end");
            for (var c = 0; c < rows[r].Count; c++)
            {
                var x = Left + (width * c);
                var shade = Shade(rows[r][c], low, high);
                canvas.Box(x, y, width - 1, CellHeight - 1, $"m{shade}", Colours[shade]);
                if (Breaks(map, rows[r][c]))
                    canvas.Hatch(x, y, width - 1, CellHeight - 1);
                if (width >= 34)
                {
                    if (Breaks(map, rows[r][c]))
                        canvas.Box(x + (width / 2) - 17, y + 5, 34, 15, $"m{shade}", Colours[shade]);
                    canvas.Label(x + (width / 2), y + 17, Cell(rows[r][c]), "middle");
                }
            }
        }
    }

    private static int Shade(double value, double low, double high) =>
        high > low ? Math.Min(Shades - 1, (int)(Shades * (value - low) / (high - low))) : 0;

    private static bool Breaks(FieldMap map, double value) =>
        map.Limit is { } limit && (map.AtMost ? value > limit : value < limit);

    private static void Bottom(SvgCanvas canvas, FieldMap map, double bottom)
    {
        var width = CellWidth(map);
        for (var c = 0; c < map.OffResonanceHz.Count; c++)
            canvas.Label(Left + (width * (c + 0.5)), bottom + 16, Frequency(map.OffResonanceHz[c]), "middle");
        canvas.Label((Left + 700) / 2, bottom + 34, "off-resonance (Hz)", "middle");
    }

    /// <summary>Whole Hz; a grid is not entered anywhere.</summary>
    private static string Frequency(double hertz) => Numbers.Setting(Math.Round(hertz));

    /// <summary>Short enough for a patch: two decimals below 1.</summary>
    private static string Cell(double value) => Math.Abs(value) < 0.995 ? Numbers.Hundredths(value) : Numbers.Plain(value);

    private static string Scale(double b1) => Numbers.Setting(Math.Round(b1, 2));

    private static void Legend(SvgCanvas canvas, FieldMap map, double y, double low, double high)
    {
        for (var i = 0; i < Shades; i++)
            canvas.Box(Left + (i * 26), y, 26, 14, $"m{i}", Colours[i]);
        canvas.Frame(Left, y, Shades * 26, 14, Stroke.Axis);
        var unit = map.Unit.Length > 0 ? $" {map.Unit}" : "";
        canvas.Label(Left + (Shades * 26) + 8, y + 12, $"{Numbers.Plain(low)} to {Numbers.Plain(high)}{unit}");
        if (map.Limit is not { } limit)
            return;
        canvas.Frame(420, y, 26, 14, Stroke.Axis);
        canvas.Hatch(420, y, 26, 14);
        canvas.Label(454, y + 12, $"breaks the limit ({(map.AtMost ? "at most" : "at least")} {Numbers.Setting(limit)}{unit})");
    }

    private static string Describe(FieldMap map, string label)
    {
        var text = map.Before.Count > 0 ? $"Before {Range(map.Before)}, after {Range(map.After)}." : $"After {Range(map.After)}.";
        if (map.Limit is null)
            return text;
        var cells = map.B1Scale.Count * map.OffResonanceHz.Count;
        return map.Before.Count > 0
            ? $"{text} The limit is broken at {Broken(map, map.Before)} of {cells} field points before and {Broken(map, map.After)} after."
            : $"{text} The limit is broken at {Broken(map, map.After)} of {cells} field points.";
    }

    private static string Range(IReadOnlyList<IReadOnlyList<double>> rows) =>
        $"{Numbers.Plain(rows.Min(r => r.Min()))} to {Numbers.Plain(rows.Max(r => r.Max()))}";

    private static int Broken(FieldMap map, IReadOnlyList<IReadOnlyList<double>> rows) => rows.Sum(r => r.Count(v => Breaks(map, v)));

    private static FigureTable Twin(FieldMap map) => new(
        ["State", "B1+ scale", .. map.OffResonanceHz.Select(f => $" {Frequency(f)} Hz")],
        [.. Rows("before", map.Before, map), .. Rows("after", map.After, map)]);

    private static IEnumerable<IReadOnlyList<string>> Rows(string word, IReadOnlyList<IReadOnlyList<double>> rows, FieldMap map) =>
        rows.Select((row, r) => (IReadOnlyList<string>)
        [
            word, Scale(map.B1Scale[r]), .. row.Select(v => Cell(v) + (Breaks(map, v) ? " ✕" : "")),
        ]);
}
