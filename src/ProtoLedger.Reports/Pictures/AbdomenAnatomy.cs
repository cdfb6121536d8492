namespace ProtoLedger.Reports.Pictures;

/// <summary>Axial upper abdomen seen from the feet, front on top and the patient's right on the left: liver with vessels and small lesions, spleen, kidneys, stomach, vessels, spine, muscle and fat.</summary>
internal sealed class AbdomenAnatomy : Anatomy
{
    private const int Liver = 0;
    private const int Spleen = 1;
    private const int KidneyCortex = 2;
    private const int KidneyMedulla = 3;
    private const int Fluid = 4;
    private const int Fat = 5;
    private const int Muscle = 6;
    private const int Blood = 7;
    private const int Marrow = 8;
    private const int Lesion = 9;

    /// <summary>The outlines are drawn a little smaller than the picture.</summary>
    private const double Zoom = 0.92;

    private static readonly (double X, double Y)[] Body = Shapes.Smooth(
        (0, 0.66), (0.36, 0.62), (0.70, 0.42), (0.87, 0.08), (0.82, -0.28), (0.56, -0.54), (0.20, -0.62), (0, -0.585),
        (-0.20, -0.62), (-0.56, -0.54), (-0.82, -0.28), (-0.87, 0.08), (-0.70, 0.42), (-0.36, 0.62));

    private static readonly (double X, double Y)[] LiverOutline = Shapes.Smooth(
        (-0.70, 0.02), (-0.62, 0.28), (-0.42, 0.44), (-0.16, 0.50), (0.10, 0.46), (0.24, 0.36), (0.16, 0.26), (0.02, 0.18),
        (-0.10, 0.06), (-0.18, -0.02), (-0.30, -0.10), (-0.36, -0.22), (-0.48, -0.30), (-0.62, -0.24), (-0.70, -0.12));

    private static readonly (double X, double Y)[] SpleenOutline = Shapes.Smooth(
        (0.70, 0.02), (0.72, -0.14), (0.62, -0.30), (0.50, -0.35), (0.50, -0.25), (0.58, -0.12), (0.60, 0.02), (0.64, 0.10));

    private static readonly (double X, double Y)[] StomachOutline = Shapes.Smooth(
        (0.20, 0.22), (0.32, 0.40), (0.50, 0.38), (0.60, 0.24), (0.54, 0.08), (0.42, 0.02), (0.32, 0.10), (0.24, 0.14));

    public override IReadOnlyList<PhantomTissue> Tissues { get; } =
    [
        new("liver"), new("spleen"), new("kidney-cortex", "spleen"), new("kidney-medulla", "kidney-cortex", "spleen"), new("csf", "synovial-fluid"),
        new("fat"), new("muscle"), new("blood-arterial"), new("marrow-vertebral", "marrow-yellow", "muscle"), new("lesion", "spleen"),
    ];

    public override int TissueAt(double x, double y)
    {
        (x, y) = (x * Zoom, y * Zoom);
        var wx = x + (0.010 * Shapes.Ripple(x * 7, y * 7, 51));
        var wy = y + (0.010 * Shapes.Ripple(x * 7, y * 7, 52));
        var body = Shapes.Outline(Body, wx, wy);
        if (body > 0)
            return Nothing;
        if (body > -0.012)
            return Muscle;
        if (body > -0.075 + (0.012 * Shapes.Ripple(x * 4, y * 4, 53)))
            return Fat;
        return Spine(wx, wy) ?? Wall(wx, wy, body) ?? Organs(wx, wy, x, y);
    }

    public override double OffResonanceAt(double x, double y) => Bump(x, y, 0.34, 0.34, 0.44, 0.34);

    private static int? Wall(double x, double y, double body)
    {
        if (body > -0.135)
            return Rib(x, y) ?? (Math.Abs(Shapes.Ripple(x * 9, y * 9, 54)) < 0.05 ? Fat : Muscle);
        var erector = Shapes.In(Math.Abs(x), y, 0.17, -0.44, 0.14, 0.105, 8);
        var psoas = Shapes.In(Math.Abs(x), y, 0.165, -0.24, 0.055, 0.075, 20);
        if (erector || psoas)
            return Math.Abs(Shapes.Ripple(x * 13, y * 13, 55)) < 0.06 ? Fat : Muscle;
        return null;
    }

    /// <summary>Ribs cut by the slice: a dark shell around marrow.</summary>
    private static int? Rib(double x, double y)
    {
        for (var i = 0; i < 5; i++)
        {
            var angle = (-42 + (i * 26)) * Math.PI / 180;
            var (cx, cy) = (0.755 * Math.Cos(angle), (0.51 * Math.Sin(angle)) + 0.02);
            var e = Shapes.Ellipse(Math.Abs(x), y, cx, cy, 0.062, 0.022, ((-42 + (i * 26)) * 0.8) + 90);
            if (e < 1)
                return e < 0.5 ? Marrow : Nothing;
        }

        return null;
    }

    private static int? Spine(double x, double y)
    {
        var vertebra = Shapes.Ellipse(x, y, 0, -0.235, 0.125, 0.095);
        if (vertebra < 1)
            return vertebra > 0.82 ? Nothing : Marrow;
        var canal = Shapes.Ellipse(x, y, 0, -0.375, 0.062, 0.046);
        if (canal < 1)
            return Shapes.In(x, y, 0, -0.375, 0.034, 0.024) ? Muscle : Fluid;
        var arch = Shapes.Segment(Math.Abs(x), y, 0.085, -0.33, 0.045, -0.445) < 0.022 || (Math.Abs(x) < 0.02 && y is > -0.545 and < -0.42);
        var process = Shapes.Segment(Math.Abs(x), y, 0.09, -0.345, 0.21, -0.365) < 0.018;
        return arch || process ? (Shapes.Ripple(x * 30, y * 30, 56) > 0 ? Marrow : Nothing) : null;
    }

    private static int Organs(double x, double y, double rawX, double rawY)
    {
        if (Shapes.Outline(LiverOutline, x, y) < 0)
            return LiverAt(x, y);
        if (Shapes.Outline(SpleenOutline, x, y) < 0)
            return Spleen;
        var stomach = Shapes.Outline(StomachOutline, x, y);
        if (stomach < 0)
            return stomach > -0.022 ? Muscle : y > 0.27 ? Nothing : Fluid;
        if (Shapes.In(x, y, 0.045, -0.10, 0.048, 0.046) || Shapes.In(x, y, -0.115, -0.085, 0.058, 0.042, -15))
            return Blood;
        if (Shapes.Segment(x, y, -0.10, 0.035, 0.06, 0.075) < 0.024 || Shapes.Segment(x, y, 0.06, 0.075, 0.42, -0.02) < 0.018)
            return Blood;
        var kidney = Kidney(x, y);
        if (kidney is { } tissue)
            return tissue;
        var pancreas = Shapes.Segment(x, y, 0.02, 0.125, 0.30, 0.03) < 0.038 && Math.Abs(Shapes.Ripple(x * 22, y * 22, 57)) > 0.10;
        if (pancreas)
            return Spleen;
        return Bowel(x, y, rawX, rawY);
    }

    private static int LiverAt(double x, double y)
    {
        var gallbladder = Shapes.In(x, y, -0.245, 0.055, 0.075, 0.046, 35);
        if (gallbladder)
            return Fluid;
        var fissure = Shapes.Segment(x, y, -0.06, 0.49, -0.02, 0.30) < 0.009;
        if (fissure)
            return Fat;
        var portal = Shapes.Segment(x, y, -0.14, 0.04, -0.36, 0.10) < 0.020
            || Shapes.Segment(x, y, -0.36, 0.10, -0.52, 0.03) < 0.013 || Shapes.Segment(x, y, -0.36, 0.10, -0.46, 0.24) < 0.012;
        var hepatic = Shapes.Segment(x, y, -0.20, 0.24, -0.30, 0.38) < 0.010 || Shapes.Segment(x, y, -0.44, -0.10, -0.62, -0.06) < 0.010
            || Shapes.In(x, y, -0.56, 0.14, 0.013, 0.013) || Shapes.In(x, y, -0.06, 0.36, 0.011, 0.011) || Shapes.In(x, y, -0.52, -0.19, 0.012, 0.012);
        if (portal || hepatic)
            return Blood;
        return Shapes.In(x, y, -0.54, 0.245, 0.036, 0.033) || Shapes.In(x, y, -0.40, -0.175, 0.026, 0.024) || Shapes.In(x, y, -0.02, 0.42, 0.018, 0.018)
            ? Lesion
            : Liver;
    }

    private static int? Kidney(double x, double y)
    {
        var (cx, cy, tilt) = x < 0 ? (-0.315, -0.325, 28.0) : (0.335, -0.275, -28.0);
        var e = Shapes.Ellipse(x, y, cx, cy, 0.098, 0.120, tilt);
        if (e >= 1)
            return null;
        var toMiddle = Math.Abs(x) < Math.Abs(cx) - 0.015;
        if (Shapes.Ellipse(x, y, cx + (x < 0 ? 0.035 : -0.035), cy + 0.01, 0.052, 0.05, tilt) < 1 || (toMiddle && e < 0.9 && Math.Abs(y - cy - 0.01) < 0.022))
            return Fat;
        var spoke = Math.Cos(Math.Atan2(y - cy, x - cx) * 7);
        return e is < 0.58 && spoke > -0.15 ? KidneyMedulla : KidneyCortex;
    }

    /// <summary>Fat of the belly with a few loops of bowel.</summary>
    private static int Bowel(double x, double y, double rawX, double rawY)
    {
        (double X, double Y, double R)[] loops = [(0.17, 0.20, 0.05), (0.60, 0.34, 0.06), (0.49, -0.06, 0.055), (-0.02, 0.02, 0.032)];
        foreach (var loop in loops)
        {
            var e = Shapes.Ellipse(x, y, loop.X, loop.Y, loop.R, loop.R * 0.85, 20);
            if (e < 1)
                return e > 0.6 ? Muscle : Shapes.Ripple(rawX * 12, rawY * 12, 58) > 0.05 ? Fluid : Nothing;
        }

        return Fat;
    }
}
