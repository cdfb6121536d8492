using System.Collections.Concurrent;
using ProtoLedger.Reports.Model;

namespace ProtoLedger.Reports.Pictures;

/// <summary>A digital phantom as maps of tissue fractions: mixed voxels hold several tissues, as in a scanner.</summary>
public sealed class Phantom
{
    /// <summary>Pixels along a side.</summary>
    public const int Size = 256;

    /// <summary>Points along a side of a pixel at which the tissue is looked up.</summary>
    private const int Subdivision = 4;

    private static readonly ConcurrentDictionary<PhantomKind, Phantom> Drawn = new();

    private Phantom(IReadOnlyList<PhantomTissue> tissues, float[][] fractions, float[] offResonance, float[] texture) =>
        (Tissues, Fractions, OffResonance, Texture) = (tissues, fractions, offResonance, texture);

    /// <summary>What it is made of.</summary>
    public IReadOnlyList<PhantomTissue> Tissues { get; }

    /// <summary>For each tissue Size × Size fractions in [0, 1], row by row from the top; what is missing to 1 gives no signal.</summary>
    internal float[][] Fractions { get; }

    /// <summary>Size × Size weights in [0, 1] of the region off resonance.</summary>
    internal float[] OffResonance { get; }

    /// <summary>Size × Size factors about 1: no tissue is uniform.</summary>
    internal float[] Texture { get; }

    /// <summary>The phantom of a kind; drawn once.</summary>
    public static Phantom Of(PhantomKind kind) => Drawn.GetOrAdd(kind, Draw);

    private static Phantom Draw(PhantomKind kind)
    {
        Anatomy anatomy = kind switch
        {
            PhantomKind.Head => new HeadAnatomy(),
            PhantomKind.Knee => new KneeAnatomy(),
            _ => new AbdomenAnatomy(),
        };
        var fractions = anatomy.Tissues.Select(_ => new float[Size * Size]).ToArray();
        var offResonance = new float[Size * Size];
        var texture = new float[Size * Size];
        var corners = new int[Size + 1, Size + 1];
        Parallel.For(0, Size + 1, row =>
        {
            for (var column = 0; column <= Size; column++)
                corners[row, column] = anatomy.TissueAt(Position(column), -Position(row));
        });
        Parallel.For(0, Size, row =>
        {
            for (var column = 0; column < Size; column++)
            {
                var at = (row * Size) + column;
                Pixel(anatomy, corners, row, column, fractions);
                texture[at] = (float)(1 + (0.035 * Shapes.Ripple(column / 3.1, row / 3.1, 61)) + (0.03 * Shapes.Ripple(column / 11.0, row / 11.0, 62)));
                offResonance[at] = (float)anatomy.OffResonanceAt(Position(column + 0.5), -Position(row + 0.5));
            }
        });
        return new Phantom(anatomy.Tissues, fractions, offResonance, texture);
    }

    /// <summary>Fractions of one pixel; inside a tissue, where all corners and the middle agree, nothing is divided further.</summary>
    private static void Pixel(Anatomy anatomy, int[,] corners, int row, int column, float[][] fractions)
    {
        var at = (row * Size) + column;
        var middle = anatomy.TissueAt(Position(column + 0.5), -Position(row + 0.5));
        if (middle == corners[row, column] && middle == corners[row + 1, column] && middle == corners[row, column + 1] && middle == corners[row + 1, column + 1])
        {
            if (middle >= 0)
                fractions[middle][at] = 1;
            return;
        }

        for (var k = 0; k < Subdivision * Subdivision; k++)
        {
            var x = Position(column + (((k % Subdivision) + 0.5) / Subdivision));
            var y = -Position(row + (((k / Subdivision) + 0.5) / Subdivision));
            var tissue = anatomy.TissueAt(x, y);
            if (tissue >= 0)
                fractions[tissue][at] += 1f / (Subdivision * Subdivision);
        }
    }

    private static double Position(double pixel) => (2 * pixel / Size) - 1;
}

/// <summary>Where which tissue lies.</summary>
internal abstract class Anatomy
{
    /// <summary>No signal: air, cortical bone, ligament.</summary>
    public const int Nothing = -1;

    /// <summary>What it is made of.</summary>
    public abstract IReadOnlyList<PhantomTissue> Tissues { get; }

    /// <summary>Index of the tissue at a point, or <see cref="Nothing"/>.</summary>
    public abstract int TissueAt(double x, double y);

    /// <summary>Weight of the region off resonance at a point, in [0, 1].</summary>
    public abstract double OffResonanceAt(double x, double y);

    /// <summary>1 at a centre, falling to 0 at the given radii.</summary>
    protected static double Bump(double x, double y, double cx, double cy, double a, double b)
    {
        var r = Math.Sqrt(Shapes.Ellipse(x, y, cx, cy, a, b));
        return r >= 1 ? 0 : Math.Clamp(1.6 * (1 + Math.Cos(Math.PI * r)) / 2, 0, 1);
    }
}
