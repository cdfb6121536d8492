namespace ProtoLedger.Reports.Pictures;

/// <summary>Axial head at the height of the lateral ventricles, front on top: scalp, skull, folded cortex, white matter, deep grey, ventricles, small lesions.</summary>
internal sealed class HeadAnatomy : Anatomy
{
    private const int WhiteMatter = 0;
    private const int Cortex = 1;
    private const int DeepGrey = 2;
    private const int Fluid = 3;
    private const int Fat = 4;
    private const int Lesion = 5;
    private const int Muscle = 6;

    private const double HalfWidth = 0.735;
    private const double HalfLength = 0.905;

    /// <summary>Normalised radii of the layers from outside inwards.</summary>
    private const double ScalpFat = 0.985;
    private const double OuterTable = 0.935;
    private const double Diploe = 0.92;
    private const double InnerDiploe = 0.902;
    private const double Dura = 0.885;
    private const double Surface = 0.868;

    private const double Ribbon = 0.043;
    private static readonly Sulcus[] Sulci = MakeSulci();

    public override IReadOnlyList<PhantomTissue> Tissues { get; } =
    [
        new("white-matter"), new("grey-matter"), new("deep-grey", "grey-matter"), new("csf"), new("fat"), new("lesion"), new("muscle", "grey-matter"),
    ];

    public override int TissueAt(double x, double y)
    {
        // The occiput is wider than the forehead.
        var width = HalfWidth * (1 - (0.07 * y));
        var r = Math.Sqrt(Square(x / width) + Square(y / HalfLength));
        if (r >= 1)
            return Nothing;
        if (r > ScalpFat)
            return Muscle;
        if (r > OuterTable + (0.012 * Shapes.Ripple(x * 3, y * 3, 15)))
            return Fat;
        if (r > Dura)
            return r < Diploe && r > InnerDiploe ? Fat : Nothing;
        return Brain(x, y, r);
    }

    public override double OffResonanceAt(double x, double y) => Bump(x, y, 0, 0.66, 0.40, 0.34);

    private static int Brain(double x, double y, double r)
    {
        // Slow ripples turn the geometric layout into something grown.
        var wx = x + (0.016 * Shapes.Ripple(x * 6, y * 6, 11)) + (0.006 * Shapes.Ripple(x * 17, y * 17, 12));
        var wy = y + (0.016 * Shapes.Ripple(x * 6, y * 6, 13)) + (0.006 * Shapes.Ripple(x * 17, y * 17, 14));
        var deep = Deep(wx, wy);
        if (deep != Nothing)
            return deep;
        var distance = Math.Min(Folds(wx, wy, r), Fissures(wx, wy));
        if (distance < 0)
            return Fluid;
        var ribbon = Ribbon * (1 + (0.22 * Shapes.Ripple(x * 9, y * 9, 21)));
        return distance < ribbon ? Cortex : Nearby(x, y);
    }

    /// <summary>Ventricles and deep grey matter; Nothing elsewhere.</summary>
    private static int Deep(double x, double y)
    {
        var side = Math.Abs(x);
        var caudate = Shapes.In(side, y, 0.152, 0.205, 0.048, 0.095, 12);
        var frontalHorn = Shapes.In(side, y, 0.092, 0.235, 0.062, 0.135, -22) && side > 0.012;
        var trigone = Shapes.In(side, y, 0.205, -0.31, 0.055, 0.125, 24);
        var body = Shapes.Segment(side, y, 0.10, 0.12, 0.055, 0.03) < 0.018;
        var third = side < 0.014 && y is > -0.14 and < 0.06;
        if ((frontalHorn && !caudate) || trigone || body || third)
            return Fluid;
        if (caudate)
            return DeepGrey;
        var putamen = Shapes.In(side, y, 0.292, 0.10, 0.052, 0.165, -14);
        var pallidum = Shapes.In(side, y, 0.235, 0.07, 0.035, 0.09, -18);
        var thalamus = Shapes.In(side, y, 0.105, -0.085, 0.078, 0.115, -18);
        return putamen || thalamus || (pallidum && side > 0.215) ? DeepGrey : Nothing;
    }

    /// <summary>Distance to the fluid of the surface and of the sulci; negative in it.</summary>
    private static double Folds(double x, double y, double r)
    {
        var depth = Surface - r;
        var distance = depth;
        var angle = Math.Atan2(y, x);
        foreach (var sulcus in Sulci)
            distance = Math.Min(distance, sulcus.Distance(angle, depth, r * 0.8));
        return distance;
    }

    /// <summary>Distance to the fissure between the hemispheres and to the lateral fissures with the insula.</summary>
    private static double Fissures(double x, double y)
    {
        var side = Math.Abs(x);
        var front = Shapes.Segment(side, y, 0, 0.42, 0, 0.86) - 0.010;
        var back = Shapes.Segment(side, y, 0, -0.40, 0, -0.86) - 0.010;
        var stem = Shapes.Segment(side, y, 0.64, 0.10, 0.435, 0.06) - 0.013;
        var insulaFront = Shapes.Segment(side, y, 0.435, 0.06, 0.40, 0.19) - 0.011;
        var insulaBack = Shapes.Segment(side, y, 0.435, 0.06, 0.41, -0.10) - 0.011;
        var parietal = Shapes.Segment(side, y, 0, -0.55, 0.15, -0.49) - 0.006;
        var cingulate = Shapes.Segment(side, y, 0, 0.60, 0.12, 0.50) - 0.006;
        return Math.Min(Math.Min(Math.Min(front, back), Math.Min(stem, parietal)), Math.Min(Math.Min(insulaFront, insulaBack), cingulate));
    }

    private static int Nearby(double x, double y) =>
        Shapes.In(x, y, 0.235, 0.36, 0.036, 0.024, 30)
        || Shapes.In(x, y, -0.22, 0.385, 0.026, 0.019, -25)
        || Shapes.In(x, y, -0.29, -0.20, 0.040, 0.024, 60)
        || Shapes.In(x, y, 0.305, -0.245, 0.022, 0.03, 10)
        || Shapes.In(x, y, -0.36, 0.28, 0.018, 0.018)
        || Shapes.In(x, y, 0.33, -0.43, 0.02, 0.015, 45)
            ? Lesion
            : WhiteMatter;

    private static Sulcus[] MakeSulci()
    {
        const int Count = 46;
        var sulci = new Sulcus[Count];
        for (var i = 0; i < Count; i++)
        {
            var angle = (((i + (0.55 * (Shapes.Jitter(i, 31) - 0.5))) / Count) * 2 * Math.PI) - Math.PI;
            var deep = i % 2 == 0;
            var depth = (deep ? 0.15 : 0.075) + (0.07 * Shapes.Jitter(i, 32));
            sulci[i] = new Sulcus(
                angle,
                depth,
                (deep ? 0.0075 : 0.005) + (0.004 * Shapes.Jitter(i, 33)),
                (Shapes.Jitter(i, 34) - 0.5) * 1.1,
                (Shapes.Jitter(i, 35) - 0.5) * 0.10,
                deep ? 0.045 + (0.03 * Shapes.Jitter(i, 36)) : 0);
        }

        return sulci;
    }

    private static double Square(double v) => v * v;

    /// <summary>A cleft that runs inwards from the surface, with a bend and, for the deep ones, two arms at its bottom.</summary>
    private sealed record Sulcus(double Angle, double Depth, double HalfWidth, double Tilt, double Bend, double Arms)
    {
        public double Distance(double angle, double depth, double radius)
        {
            var turn = Math.Abs(Math.IEEERemainder(angle - Angle, 2 * Math.PI));
            if (turn > 0.6 || depth > Depth + 0.2)
                return double.MaxValue;
            var along = Math.Clamp(depth, 0, Depth);
            var centre = Angle + (Tilt * along) + (Bend * Math.Sin(along * 34));
            var across = Math.IEEERemainder(angle - centre, 2 * Math.PI) * radius;
            var beyond = depth - along;
            var cleft = Math.Sqrt((across * across) + (beyond * beyond)) - (HalfWidth * (1 - (0.45 * along / Depth)));
            if (Arms <= 0)
                return cleft;
            var arms = Shapes.Segment(across, depth, -Arms, Depth + 0.02, Arms, Depth - 0.025) - (HalfWidth * 0.55);
            return Math.Min(cleft, arms);
        }
    }
}
