namespace ProtoLedger.Reports.Pictures;

/// <summary>Outlines from which phantoms are drawn. Coordinates: x to the right and y upwards, both about −1 to 1.</summary>
internal static class Shapes
{
    /// <summary>Square of the normalised radius: below 1 inside, 1 on the outline.</summary>
    public static double Ellipse(double x, double y, double cx, double cy, double a, double b, double degrees = 0)
    {
        var (sin, cos) = Math.SinCos(degrees * Math.PI / 180);
        var (dx, dy) = (x - cx, y - cy);
        var (u, v) = (((dx * cos) + (dy * sin)) / a, ((dy * cos) - (dx * sin)) / b);
        return (u * u) + (v * v);
    }

    /// <summary>Whether a point lies in an ellipse.</summary>
    public static bool In(double x, double y, double cx, double cy, double a, double b, double degrees = 0) =>
        Ellipse(x, y, cx, cy, a, b, degrees) < 1;

    /// <summary>Distance to a segment whose ends are given.</summary>
    public static double Segment(double x, double y, double x1, double y1, double x2, double y2)
    {
        var (dx, dy) = (x2 - x1, y2 - y1);
        var t = Math.Clamp((((x - x1) * dx) + ((y - y1) * dy)) / ((dx * dx) + (dy * dy)), 0, 1);
        return Math.Sqrt(Square(x - x1 - (t * dx)) + Square(y - y1 - (t * dy)));
    }

    /// <summary>Signed distance to a closed Catmull-Rom outline, negative inside, by its polygon.</summary>
    /// <param name="outline">Points of the polygon, from <see cref="Smooth"/>.</param>
    /// <param name="x">Point.</param>
    /// <param name="y">Point.</param>
    public static double Outline(IReadOnlyList<(double X, double Y)> outline, double x, double y)
    {
        var nearest = double.MaxValue;
        var inside = false;
        for (int i = 0, j = outline.Count - 1; i < outline.Count; j = i++)
        {
            var (a, b) = (outline[i], outline[j]);
            nearest = Math.Min(nearest, Segment(x, y, a.X, a.Y, b.X, b.Y));
            if (a.Y > y != b.Y > y && x < ((b.X - a.X) * (y - a.Y) / (b.Y - a.Y)) + a.X)
                inside = !inside;
        }

        return inside ? -nearest : nearest;
    }

    /// <summary>Closed Catmull-Rom spline through points, as a polygon.</summary>
    public static (double X, double Y)[] Smooth(params (double X, double Y)[] points)
    {
        const int Parts = 8;
        var n = points.Length;
        var polygon = new (double X, double Y)[n * Parts];
        for (var i = 0; i < n; i++)
        {
            var (p0, p1, p2, p3) = (points[(i + n - 1) % n], points[i], points[(i + 1) % n], points[(i + 2) % n]);
            for (var k = 0; k < Parts; k++)
            {
                var t = k / (double)Parts;
                polygon[(i * Parts) + k] = (Spline(p0.X, p1.X, p2.X, p3.X, t), Spline(p0.Y, p1.Y, p2.Y, p3.Y, t));
            }
        }

        return polygon;
    }

    /// <summary>Smooth noise of two dimensions, −1 to 1, the same for ever.</summary>
    public static double Ripple(double x, double y, uint seed)
    {
        var (ix, iy) = ((int)Math.Floor(x), (int)Math.Floor(y));
        var (fx, fy) = (Ease(x - ix), Ease(y - iy));
        var low = Mix(Lattice(ix, iy, seed), Lattice(ix + 1, iy, seed), fx);
        var high = Mix(Lattice(ix, iy + 1, seed), Lattice(ix + 1, iy + 1, seed), fx);
        return Mix(low, high, fy);
    }

    /// <summary>A number in [0, 1) for an index, the same for ever.</summary>
    public static double Jitter(int index, uint seed) => (Lattice(index, 7, seed) + 1) / 2;

    private static double Lattice(int x, int y, uint seed)
    {
        unchecked
        {
            var h = ((uint)x * 0x9E3779B1) ^ ((uint)y * 0x85EBCA77) ^ (seed * 0xC2B2AE3D);
            h ^= h >> 15;
            h *= 0x2C1B3C6D;
            h ^= h >> 12;
            h *= 0x297A2D39;
            h ^= h >> 15;
            return (h / 2147483648.0) - 1;
        }
    }

    private static double Ease(double t) => t * t * (3 - (2 * t));

    private static double Mix(double a, double b, double t) => a + ((b - a) * t);

    private static double Square(double v) => v * v;

    private static double Spline(double p0, double p1, double p2, double p3, double t) =>
        0.5 * ((2 * p1) + ((p2 - p0) * t) + (((2 * p0) - (5 * p1) + (4 * p2) - p3) * t * t) + (((3 * p1) - p0 - (3 * p2) + p3) * t * t * t));
}
