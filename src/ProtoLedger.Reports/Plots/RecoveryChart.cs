using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Plots;

/// <summary>Longitudinal magnetisation against the time since the inversion, with both inversion times.</summary>
public static class RecoveryChart
{
    private const double Left = 58;
    private const double Right = 700;
    private const double Top = 40;
    private const double Bottom = 330;
    private const string Dashed = "6 4";

    /// <summary>Draws a recovery curve.</summary>
    /// <param name="name">Name of the figure.</param>
    /// <param name="curve">At least one tissue with points.</param>
    /// <param name="scannerTitle">Title of the scanner.</param>
    /// <exception cref="ArgumentException">There is no point to draw.</exception>
    public static Figure Draw(string name, RecoveryCurve curve, string scannerTitle)
    {
        ArgumentNullException.ThrowIfNull(curve);
        var points = curve.Tissues.SelectMany(t => t.Before.Concat(t.After)).ToList();
        if (points.Count == 0)
            throw new ArgumentException("A recovery curve needs points.", nameof(curve));
        var title = $"Recovery after the inversion: {curve.SeriesTitle}, {scannerTitle}";
        var rows = (curve.Tissues.Count + 1) / 2;
        var canvas = new SvgCanvas(name, 720, Bottom + 66 + (rows * 20));
        var x = new Axis(points.Min(p => p.Time), points.Max(p => p.Time), Left, Right, 8);
        var y = new Axis(Math.Min(-0.2, points.Min(p => p.Longitudinal)), Math.Max(0.2, points.Max(p => p.Longitudinal)), Bottom, Top, 5);
        Frame(canvas, x, y);
        for (var i = 0; i < curve.Tissues.Count; i++)
            Tissue(canvas, x, y, curve.Tissues[i], i);
        InversionTimes(canvas, x, curve);
        Legend(canvas, curve);
        var text = Describe(curve);
        return new Figure(name, title, text, canvas.Finish(title, text), Twin(curve));
    }

    private static void Frame(SvgCanvas canvas, Axis x, Axis y)
    {
        foreach (var (value, label) in x.Ticks())
        {
            canvas.Line(x.At(value), Top, x.At(value), Bottom, Stroke.Grid);
            canvas.Label(x.At(value), Bottom + 16, label, "middle");
        }

        foreach (var (value, label) in y.Ticks())
        {
            canvas.Line(Left, y.At(value), Right, y.At(value), Stroke.Grid);
            canvas.Label(Left - 8, y.At(value) + 4, label, "end");
        }

        canvas.Line(Left, y.At(0), Right, y.At(0), Stroke.Axis with { Width = 1.6 });
        canvas.Label((Left + Right) / 2, Bottom + 34, "time since the inversion (ms)", "middle");
        canvas.Upright(14, (Top + Bottom) / 2, "longitudinal magnetisation (equilibrium = 1)");
    }

    private static void Tissue(SvgCanvas canvas, Axis x, Axis y, TissueRecovery tissue, int number)
    {
        var stroke = Stroke.Series(number);
        Curve(canvas, x, y, tissue.Before, stroke with { Dashes = Dashed }, number, false);
        Curve(canvas, x, y, tissue.After, stroke, number, true);
        if (tissue.NullBefore is { } before && before >= x.Low && before <= x.High)
            canvas.Marker(0, x.At(before), y.At(0), 4, Stroke.Ink, false);
        if (tissue.NullAfter is { } after && after >= x.Low && after <= x.High)
            canvas.Marker(0, x.At(after), y.At(0), 4, Stroke.Series(3), true);
    }

    private static void Curve(SvgCanvas canvas, Axis x, Axis y, IReadOnlyList<CurvePoint> points, Stroke stroke, int number, bool solid)
    {
        if (points.Count == 0)
            return;
        canvas.Curve(points.Select(p => (x.At(p.Time), y.At(p.Longitudinal))), stroke);
        for (var k = 1; k <= 3; k++)
        {
            var point = points[Math.Min(points.Count - 1, points.Count * k / 4)];
            canvas.Marker(number + 1, x.At(point.Time), y.At(point.Longitudinal), 4, stroke with { Dashes = "", Width = 1.5 }, solid);
        }
    }

    private static void InversionTimes(SvgCanvas canvas, Axis x, RecoveryCurve curve)
    {
        var same = curve.InversionTimeBefore is { } b && curve.InversionTimeAfter is { } a && Math.Abs(a - b) < 1e-9;
        if (same)
        {
            Mark(curve.InversionTimeAfter, "inversion time, old and new", Stroke.Ink, 16, leftwards: true);
            return;
        }

        // Words stand on the outer side of their line, so that no line crosses them.
        var shorter = curve.InversionTimeAfter < curve.InversionTimeBefore;
        Mark(curve.InversionTimeBefore, "old inversion time", Stroke.Ink with { Dashes = Dashed }, 16, leftwards: !shorter);
        Mark(curve.InversionTimeAfter, "new inversion time", Stroke.Ink, 32, leftwards: shorter);

        void Mark(double? time, string word, Stroke stroke, double at, bool leftwards)
        {
            if (time is not { } t || t < x.Low || t > x.High)
                return;
            const double room = 210;
            var end = leftwards ? x.At(t) - Left > room : Right - x.At(t) < room;
            canvas.Line(x.At(t), at - 10, x.At(t), Bottom, stroke);
            canvas.Label(x.At(t) + (end ? -6 : 6), at, $"{word} {Numbers.Setting(t)} ms", end ? "end" : "start", strong: true);
        }
    }

    private static void Legend(SvgCanvas canvas, RecoveryCurve curve)
    {
        for (var i = 0; i < curve.Tissues.Count; i++)
        {
            var (x, y) = (Left + (i % 2 * 320), Bottom + 58 + (i / 2 * 20));
            canvas.Line(x, y - 4, x + 34, y - 4, Stroke.Series(i));
            canvas.Marker(i + 1, x + 17, y - 4, 4, Stroke.Series(i) with { Width = 1.5 }, true);
            canvas.Label(x + 42, y, $"{curve.Tissues[i].Tissue} {(i == 0 ? " (dashed and hollow: old)" : "")}");
        }
    }

    private static string Describe(RecoveryCurve curve)
    {
        var same = curve.InversionTimeBefore.Equals(curve.InversionTimeAfter);
        var times = same
            ? $"Inversion time {Setting(curve.InversionTimeAfter)} before and after."
            : $"Inversion time {Setting(curve.InversionTimeBefore)} before, {Setting(curve.InversionTimeAfter)} after.";
        return $"{times} Null of {string.Join("; of ", curve.Tissues.Select(t => $"{t.Tissue}: {Null(t.NullBefore)} before, {Null(t.NullAfter)} after"))}.";
    }

    private static FigureTable Twin(RecoveryCurve curve) => new(
        ["Tissue", " Null, old (ms)", " Null, new (ms)", " At the inversion time, old", " At the inversion time, new"],
        [.. curve.Tissues.Select(t => (IReadOnlyList<string>)
        [
            t.Tissue, Null(t.NullBefore, ""), Null(t.NullAfter, ""), At(t.Before, curve.InversionTimeBefore), At(t.After, curve.InversionTimeAfter),
        ])]);

    private static string Setting(double? time) => time is { } t ? $"{Numbers.Setting(t)} ms" : "none";

    private static string Null(double? time, string unit = " ms") => time is { } t ? Numbers.Plain(t) + unit : "none";

    /// <summary>Linear between the points; the curves are sampled densely enough for two digits.</summary>
    private static string At(IReadOnlyList<CurvePoint> points, double? time)
    {
        if (time is not { } t || points.Count == 0 || t < points[0].Time || t > points[^1].Time)
            return "none";
        var i = 1;
        while (i < points.Count - 1 && points[i].Time < t)
            i++;
        if (points.Count == 1)
            return Numbers.Plain(points[0].Longitudinal);
        var (a, b) = (points[i - 1], points[i]);
        var part = b.Time > a.Time ? (t - a.Time) / (b.Time - a.Time) : 0;
        return Numbers.Plain(a.Longitudinal + (part * (b.Longitudinal - a.Longitudinal)));
    }
}
