namespace ProtoLedger.Reports.Pictures;

/// <summary>Sagittal knee through the middle, front on the left: femur, tibia, patella, cartilage, menisci, ligaments, joint fluid, fat and muscle.</summary>
internal sealed class KneeAnatomy : Anatomy
{
    private const int Marrow = 0;
    private const int Cartilage = 1;
    private const int Fluid = 2;
    private const int Fat = 3;
    private const int Muscle = 4;
    private const int Blood = 5;

    private const double Cortical = 0.016;

    private static readonly (double X, double Y)[] Limb = Shapes.Smooth(
        (-0.50, 1.15), (-0.52, 0.75), (-0.60, 0.42), (-0.66, 0.12), (-0.60, -0.18), (-0.52, -0.45), (-0.46, -0.80), (-0.44, -1.15),
        (0.52, -1.15), (0.60, -0.80), (0.58, -0.45), (0.50, -0.10), (0.52, 0.20), (0.58, 0.55), (0.60, 0.85), (0.60, 1.15));

    private static readonly (double X, double Y)[] Femur = Shapes.Smooth(
        (-0.22, 1.2), (-0.21, 0.75), (-0.27, 0.48), (-0.36, 0.28), (-0.36, 0.09), (-0.24, -0.04), (-0.04, -0.07), (0.18, -0.03),
        (0.32, 0.10), (0.35, 0.27), (0.27, 0.41), (0.14, 0.50), (0.07, 0.75), (0.06, 1.2));

    private static readonly (double X, double Y)[] Tibia = Shapes.Smooth(
        (-0.33, -0.20), (-0.10, -0.185), (0.10, -0.19), (0.33, -0.205), (0.37, -0.30), (0.27, -0.45), (0.17, -0.75), (0.13, -1.2),
        (-0.20, -1.2), (-0.23, -0.80), (-0.34, -0.52), (-0.38, -0.33));

    private static readonly (double X, double Y)[] Patella = Shapes.Smooth(
        (-0.545, 0.40), (-0.50, 0.44), (-0.435, 0.40), (-0.415, 0.26), (-0.435, 0.14), (-0.50, 0.09), (-0.555, 0.18), (-0.57, 0.30));

    private static readonly (double X, double Y)[] FrontMeniscus = Shapes.Smooth((-0.32, -0.085), (-0.31, -0.17), (-0.24, -0.165), (-0.14, -0.145), (-0.23, -0.115));
    private static readonly (double X, double Y)[] BackMeniscus = Shapes.Smooth((0.32, -0.075), (0.325, -0.175), (0.24, -0.17), (0.12, -0.145), (0.22, -0.11));
    private static readonly (double X, double Y)[] Calf = Shapes.Smooth((0.34, -0.30), (0.48, -0.38), (0.53, -0.70), (0.50, -1.2), (0.17, -1.2), (0.21, -0.75), (0.30, -0.48));
    private static readonly (double X, double Y)[] Hamstrings = Shapes.Smooth((0.12, 1.2), (0.13, 0.80), (0.24, 0.58), (0.40, 0.44), (0.49, 0.55), (0.51, 0.85), (0.51, 1.2));
    private static readonly (double X, double Y)[] Quadriceps = Shapes.Smooth((-0.44, 1.2), (-0.45, 0.90), (-0.44, 0.66), (-0.33, 0.62), (-0.25, 0.80), (-0.25, 1.2));
    private static readonly (double X, double Y)[] Popliteus = Shapes.Smooth((0.36, 0.08), (0.43, 0.20), (0.46, 0.02), (0.46, -0.22), (0.40, -0.26), (0.37, -0.10));

    public override IReadOnlyList<PhantomTissue> Tissues { get; } =
    [
        new("marrow-yellow", "fat"), new("cartilage"), new("synovial-fluid", "csf"), new("fat", "marrow-yellow"), new("muscle"), new("blood-arterial"),
    ];

    public override int TissueAt(double x, double y)
    {
        var wx = x + (0.008 * Shapes.Ripple(x * 8, y * 8, 41));
        var wy = y + (0.008 * Shapes.Ripple(x * 8, y * 8, 42));
        var limb = Shapes.Outline(Limb, wx, wy);
        if (limb > 0)
            return Nothing;
        if (limb > -0.014)
            return Muscle;
        return Bones(wx, wy) ?? Joint(wx, wy) ?? Soft(wx, wy, x, y);
    }

    public override double OffResonanceAt(double x, double y) => Bump(x, y, -0.12, -0.16, 0.34, 0.30);

    private static int? Bones(double x, double y)
    {
        var femur = Shapes.Outline(Femur, x, y);
        var tibia = Shapes.Outline(Tibia, x, y);
        var patella = Shapes.Outline(Patella, x, y);
        var bone = Math.Min(Math.Min(femur, tibia), patella);
        if (bone < 0)
        {
            // Scar of the growth plate.
            var scar = femur < 0 && Math.Abs(y - 0.36 - (0.10 * x) - (0.015 * Shapes.Ripple(x * 14, 0, 43))) < 0.007;
            return bone > -Cortical || scar ? Nothing : Marrow;
        }

        var condyle = femur < 0.036 && (y < 0.12 || (x < -0.30 && y < 0.34)) && x < 0.36;
        var plateau = tibia < 0.030 && y > -0.215 && Math.Abs(x) < 0.31;
        var behindPatella = patella < 0.036 && x > -0.50 && y is > 0.12 and < 0.40;
        return condyle || plateau || behindPatella ? Cartilage : null;
    }

    private static int? Joint(double x, double y)
    {
        if (Shapes.Outline(FrontMeniscus, x, y) < 0 || Shapes.Outline(BackMeniscus, x, y) < 0)
            return Nothing;
        var patellarTendon = Shapes.Segment(x, y, -0.53, 0.10, -0.385, -0.40) < 0.021;
        var quadricepsTendon = Shapes.Segment(x, y, -0.515, 0.42, -0.44, 0.88) < 0.021;
        var cruciate = Shapes.Segment(x, y, 0.20, 0.02, 0.30, -0.20) < 0.022 && Shapes.Outline(Femur, x, y) > 0;
        if (patellarTendon || quadricepsTendon || cruciate)
            return Nothing;
        var between = y is > -0.215 and < -0.03 && Math.Abs(x) < 0.335;
        var recess = Shapes.Segment(x, y, -0.385, 0.40, -0.345, 0.62) < 0.017;
        var trochlea = Shapes.Segment(x, y, -0.395, 0.16, -0.39, 0.38) < 0.010;
        var cyst = Shapes.In(x, y, 0.43, 0.33, 0.035, 0.062, 12);
        return between || recess || trochlea || cyst ? Fluid : null;
    }

    private static int Soft(double x, double y, double rawX, double rawY)
    {
        if (Shapes.Segment(x, y, 0.37, 0.62, 0.405, 0.12) < 0.020 || Shapes.Segment(x, y, 0.405, 0.12, 0.37, -0.24) < 0.018)
            return Blood;
        var muscle = Math.Min(
            Math.Min(Shapes.Outline(Calf, x, y), Shapes.Outline(Hamstrings, x, y)),
            Math.Min(Shapes.Outline(Quadriceps, x, y), Shapes.Outline(Popliteus, x, y)));
        if (muscle >= 0)
            return Septum(rawX, rawY) ? Nothing : Fat;
        // Fat between the bundles.
        return Math.Abs(Shapes.Ripple((x * 16) + (y * 2), y * 2.2, 44)) < 0.045 && muscle < -0.02 ? Fat : Muscle;
    }

    private static bool Septum(double x, double y) => Math.Abs(Shapes.Ripple(x * 11, y * 11, 45)) < 0.025 && Shapes.Ripple(x * 5, y * 5, 46) > 0.1;
}
