using System.Globalization;
using System.Net;
using System.Text;

namespace ProtoLedger.Reports.Plots;

/// <summary>
/// Writes one SVG element. Coordinates have at most two decimals and a point; colours stand as attributes for use alone
/// and are overridden by the page's style through the classes.
/// </summary>
internal sealed class SvgCanvas
{
    private readonly StringBuilder body = new();
    private readonly string name;
    private readonly double width;
    private readonly double height;

    public SvgCanvas(string name, double width, double height)
    {
        if (name.Length == 0 || !name.All(c => char.IsAsciiLetterLower(c) || char.IsAsciiDigit(c) || c == '-'))
            throw new ArgumentException("A figure's name holds lower-case letters, digits and hyphens.", nameof(name));
        (this.name, this.width, this.height) = (name, width, height);
    }

    /// <summary>The finished element.</summary>
    public string Finish(string title, string description) =>
        $"<svg xmlns=\"http://www.w3.org/2000/svg\" class=\"plot\" viewBox=\"0 0 {N(width)} {N(height)}\" width=\"{N(width)}\" height=\"{N(height)}\" role=\"img\" "
        + $"aria-labelledby=\"{name}-t {name}-d\" font-family=\"system-ui, sans-serif\" font-size=\"12\">"
        + $"<title id=\"{name}-t\">{Text(title)}</title><desc id=\"{name}-d\">{Text(description)}</desc>"
        + $"<defs><pattern id=\"{name}-h\" width=\"6\" height=\"6\" patternUnits=\"userSpaceOnUse\" patternTransform=\"rotate(45)\">"
        + "<line class=\"ink\" x1=\"0\" y1=\"0\" x2=\"0\" y2=\"6\" stroke=\"#1a2226\" stroke-width=\"1.6\"/></pattern></defs>"
        + body + "</svg>";

    /// <summary>Straight line of a class: ink, axis, grid, or a series.</summary>
    public void Line(double x1, double y1, double x2, double y2, Stroke stroke) =>
        body.Append(CultureInfo.InvariantCulture, $"<line {Class(stroke)} x1=\"{N(x1)}\" y1=\"{N(y1)}\" x2=\"{N(x2)}\" y2=\"{N(y2)}\"/>");

    /// <summary>A line through points.</summary>
    public void Curve(IEnumerable<(double X, double Y)> points, Stroke stroke) =>
        body.Append(CultureInfo.InvariantCulture, $"<polyline {Class(stroke)} fill=\"none\" points=\"{string.Join(' ', points.Select(p => $"{N(p.X)},{N(p.Y)}"))}\"/>");

    /// <summary>A filled rectangle.</summary>
    public void Box(double x, double y, double w, double h, string paint, string colour) =>
        body.Append(CultureInfo.InvariantCulture, $"<rect class=\"{paint}\" fill=\"{colour}\" x=\"{N(x)}\" y=\"{N(y)}\" width=\"{N(Math.Max(0, w))}\" height=\"{N(Math.Max(0, h))}\"/>");

    /// <summary>A rectangle without fill.</summary>
    public void Frame(double x, double y, double w, double h, Stroke stroke) =>
        body.Append(CultureInfo.InvariantCulture, $"<rect {Class(stroke)} fill=\"none\" x=\"{N(x)}\" y=\"{N(y)}\" width=\"{N(Math.Max(0, w))}\" height=\"{N(Math.Max(0, h))}\"/>");

    /// <summary>Hatching over a rectangle.</summary>
    public void Hatch(double x, double y, double w, double h) =>
        body.Append(CultureInfo.InvariantCulture, $"<rect fill=\"url(#{name}-h)\" opacity=\"0.45\" x=\"{N(x)}\" y=\"{N(y)}\" width=\"{N(Math.Max(0, w))}\" height=\"{N(Math.Max(0, h))}\"/>");

    /// <summary>A marker: circle, square, triangle or diamond by number, hollow or solid.</summary>
    public void Marker(int shape, double x, double y, double size, Stroke stroke, bool solid)
    {
        var path = (shape % 4) switch
        {
            0 => $"M{N(x - size)} {N(y)}a{N(size)} {N(size)} 0 1 0 {N(2 * size)} 0a{N(size)} {N(size)} 0 1 0 {N(-2 * size)} 0z",
            1 => $"M{N(x - size)} {N(y - size)}h{N(2 * size)}v{N(2 * size)}h{N(-2 * size)}z",
            2 => $"M{N(x)} {N(y - size * 1.2)}l{N(size * 1.2)} {N(size * 2.1)}h{N(-size * 2.4)}z",
            _ => $"M{N(x)} {N(y - size * 1.3)}l{N(size * 1.3)} {N(size * 1.3)}l{N(-size * 1.3)} {N(size * 1.3)}l{N(-size * 1.3)} {N(-size * 1.3)}z",
        };
        var paint = solid ? stroke with { Kind = stroke.Kind + " solid" } : stroke with { Kind = stroke.Kind + " hollow" };
        body.Append(CultureInfo.InvariantCulture, $"<path {Class(paint)} fill=\"{(solid ? stroke.Colour : "#ffffff")}\" d=\"{path}\"/>");
    }

    /// <summary>Text; anchor is start, middle or end.</summary>
    public void Label(double x, double y, string text, string anchor = "start", bool strong = false, double size = 12) =>
        body.Append(CultureInfo.InvariantCulture, $"<text class=\"label\" fill=\"#1a2226\" x=\"{N(x)}\" y=\"{N(y)}\" text-anchor=\"{anchor}\" font-size=\"{N(size)}\"{(strong ? " font-weight=\"600\"" : "")}>{Text(text)}</text>");

    /// <summary>Text that reads upwards, for vertical axes.</summary>
    public void Upright(double x, double y, string text) =>
        body.Append(CultureInfo.InvariantCulture, $"<text class=\"label\" fill=\"#1a2226\" text-anchor=\"middle\" transform=\"translate({N(x)} {N(y)}) rotate(-90)\">{Text(text)}</text>");

    /// <summary>Cuts a label that would run into the plot; the table twin has it whole.</summary>
    public static string Shorten(string text, int length) => text.Length <= length ? text : text[..(length - 1)].TrimEnd() + "…";

    private static string Class(Stroke stroke) =>
        $"class=\"{stroke.Kind}\" stroke=\"{stroke.Colour}\" stroke-width=\"{N(stroke.Width)}\"" + (stroke.Dashes.Length > 0 ? $" stroke-dasharray=\"{stroke.Dashes}\"" : "");

    /// <summary>Text content: markup escaped, hidden characters shown.</summary>
    private static string Text(string text) => WebUtility.HtmlEncode(Wording.UserText.Visible(text));

    /// <summary>A coordinate.</summary>
    private static string N(double value)
    {
        if (!double.IsFinite(value))
            throw new ArgumentException("A plot holds finite numbers only.", nameof(value));
        var text = value.ToString("0.##", CultureInfo.InvariantCulture);
        return text == "-0" ? "0" : text;
    }
}

/// <summary>How a line is drawn.</summary>
/// <param name="Kind">Style class.</param>
/// <param name="Colour">Colour where no style sheet applies.</param>
/// <param name="Width">Pixels.</param>
/// <param name="Dashes">Dash pattern, empty for a whole line.</param>
internal sealed record Stroke(string Kind, string Colour, double Width = 1, string Dashes = "")
{
    /// <summary>Axis lines.</summary>
    public static Stroke Axis { get; } = new("axis", "#4a565c");

    /// <summary>Grid lines.</summary>
    public static Stroke Grid { get; } = new("grid", "#d5dbde");

    /// <summary>Ink.</summary>
    public static Stroke Ink { get; } = new("ink", "#1a2226", 1.4);

    /// <summary>Series by number: colours of Okabe and Ito (2008), of which those that stand out from white by 3:1.</summary>
    public static Stroke Series(int number) => (number % 5) switch
    {
        0 => new("c1", "#0072b2", 2),
        1 => new("c2", "#d55e00", 2),
        2 => new("c3", "#00805d", 2),
        3 => new("c4", "#1a2226", 2),
        _ => new("c5", "#a84f86", 2),
    };
}
