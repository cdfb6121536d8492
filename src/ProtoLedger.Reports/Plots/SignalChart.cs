using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Plots;

/// <summary>Brightness of the tissues before and after on one scale.</summary>
public static class SignalChart
{
    private const double Left = 236;
    private const double Right = 690;
    private const double Row = 30;

    /// <summary>Draws the magnitudes of the tissues of an appearance, the brightest tissue before being 1.</summary>
    /// <param name="name">Name of the figure.</param>
    /// <param name="appearance">At least one tissue.</param>
    /// <param name="scannerTitle">Title of the scanner.</param>
    /// <exception cref="ArgumentException">There is no tissue.</exception>
    public static Figure Draw(string name, Appearance appearance, string scannerTitle)
    {
        ArgumentNullException.ThrowIfNull(appearance);
        if (appearance.Tissues.Count == 0)
            throw new ArgumentException("A chart of signals needs a tissue.", nameof(appearance));
        var scale = Scale(appearance);
        var tissues = appearance.Tissues
            .Select(t => (t.Words, Before: Math.Abs(t.Before) / scale, After: Math.Abs(t.After) / scale))
            .OrderByDescending(t => t.Before).ThenBy(t => t.Words, StringComparer.Ordinal).ToList();
        var title = $"Brightness by tissue: {appearance.SeriesTitle}, {scannerTitle}";
        var bottom = 16 + (Row * tissues.Count);
        var canvas = new SvgCanvas(name, 720, bottom + 70);
        var axis = new Axis(0, tissues.Max(t => Math.Max(t.Before, t.After)), Left, Right);
        foreach (var (value, label) in axis.Ticks())
        {
            canvas.Line(axis.At(value), 10, axis.At(value), bottom, Stroke.Grid);
            canvas.Label(axis.At(value), bottom + 16, label, "middle");
        }

        canvas.Line(Left, 10, Left, bottom, Stroke.Axis);
        canvas.Label((Left + Right) / 2, bottom + 34, "brightness (brightest tissue before = 1)", "middle");
        for (var i = 0; i < tissues.Count; i++)
            Tissue(canvas, axis, tissues[i], 16 + (Row * i) + (Row / 2));
        canvas.Marker(0, Left + 8, bottom + 54, 5, Stroke.Series(3), false);
        canvas.Label(Left + 20, bottom + 58, "before");
        canvas.Marker(1, Left + 108, bottom + 54, 5, Stroke.Series(0), true);
        canvas.Label(Left + 120, bottom + 58, "after");
        var most = tissues.MaxBy(t => Math.Abs(t.After - t.Before));
        var text = Math.Abs(most.After - most.Before) < 0.005
            ? "No tissue changes its brightness."
            : $"Largest change: {most.Words}, {Numbers.Hundredths(most.Before)} to {Numbers.Hundredths(most.After)}, where the brightest tissue before is 1.";
        var twin = new FigureTable(
            ["Tissue", " Before", " After"],
            [.. tissues.Select(t => (IReadOnlyList<string>)[t.Words, Numbers.Hundredths(t.Before), Numbers.Hundredths(t.After)])]);
        return new Figure(name, title, text, canvas.Finish(title, text), twin);
    }

    /// <summary>Signal of the brightest tissue before; 1 where all is black.</summary>
    internal static double Scale(Appearance appearance)
    {
        var brightest = appearance.Tissues.Select(t => Math.Abs(t.Before)).DefaultIfEmpty(0).Max();
        if (brightest <= 0)
            brightest = appearance.Tissues.Select(t => Math.Abs(t.After)).DefaultIfEmpty(0).Max();
        return brightest > 0 ? brightest : 1;
    }

    private static void Tissue(SvgCanvas canvas, Axis axis, (string Words, double Before, double After) tissue, double y)
    {
        canvas.Label(Left - 10, y + 4, SvgCanvas.Shorten(tissue.Words, 36), "end");
        canvas.Line(axis.At(tissue.Before), y, axis.At(tissue.After), y, Stroke.Axis with { Width = 2 });
        canvas.Marker(0, axis.At(tissue.Before), y, 6, Stroke.Series(3), false);
        canvas.Marker(1, axis.At(tissue.After), y, 4.5, Stroke.Series(0), true);
    }
}
