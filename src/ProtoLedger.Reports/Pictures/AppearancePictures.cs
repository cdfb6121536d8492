using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Plots;
using ProtoLedger.Reports.Wording;

namespace ProtoLedger.Reports.Pictures;

/// <summary>Draws a phantom as the scanner would show it.</summary>
public static class AppearancePictures
{
    private const int Size = Phantom.Size;

    /// <summary>Seed of the noise: the same draw before and after, so that the difference shows the edit and not the noise.</summary>
    private const ulong NoiseSeed = 20240229;

    /// <summary>Pixels of less signal than this, over the brightest tissue, count as air for the window.</summary>
    private const double Air = 0.02;

    /// <summary>Draws before, after and difference.</summary>
    /// <param name="name">Name of the set.</param>
    /// <param name="appearance">Signals, noise, shading and blur.</param>
    /// <param name="scannerTitle">Title of the scanner.</param>
    /// <exception cref="ArgumentException">A number is not finite or out of its range.</exception>
    public static PictureSet Draw(string name, Appearance appearance, string scannerTitle)
    {
        ArgumentNullException.ThrowIfNull(appearance);
        Check(appearance);
        var phantom = Phantom.Of(appearance.Phantom);
        var scale = SignalChart.Scale(appearance);
        var before = Image(phantom, appearance, scale, after: false);
        var after = Image(phantom, appearance, scale, after: true);
        var white = Math.Max(White(before), White(after));
        var title = $"Predicted appearance before, after and difference: {appearance.SeriesTitle}, {scannerTitle}, {appearance.Condition}";
        return new PictureSet(
            name,
            title,
            Describe(appearance, phantom, white),
            Size,
            Encode(before, v => v / white),
            Encode(after, v => v / white),
            Encode([.. before.Zip(after, (b, a) => a - b)], v => 0.5 + (0.5 * v / white)));
    }

    /// <summary>Magnitude picture over the brightest tissue before: mixed signed, blurred, then noise in both channels.</summary>
    private static double[] Image(Phantom phantom, Appearance appearance, double scale, bool after)
    {
        var signed = Mix(phantom, appearance, scale, after);
        var blur = after ? appearance.BlurAfter : appearance.BlurBefore;
        if (blur > 1)
            signed = Blur(signed, blur, appearance.PhaseAlongRows);
        var noise = after ? appearance.NoiseAfter : appearance.NoiseBefore;
        var draws = new NoiseDraws(NoiseSeed);
        for (var i = 0; i < signed.Length; i++)
        {
            var (real, imaginary) = draws.Next();
            signed[i] = Math.Sqrt(Square(signed[i] + (noise * real)) + Square(noise * imaginary));
        }

        return signed;
    }

    /// <summary>The signal drawn for a tissue of the phantom: its own, or that of the nearest substitute.</summary>
    private static TissueSignal? Drawn(PhantomTissue tissue, Appearance appearance) =>
        tissue.Candidates.Select(name => appearance.Tissues.FirstOrDefault(s => s.Tissue == name)).FirstOrDefault(s => s is not null);

    private static double[] Mix(Phantom phantom, Appearance appearance, double scale, bool after)
    {
        var image = new double[Size * Size];
        for (var t = 0; t < phantom.Tissues.Count; t++)
        {
            if (Drawn(phantom.Tissues[t], appearance) is not { } tissue)
                continue;
            var (nominal, off) = after ? (tissue.After, tissue.AfterOffResonance) : (tissue.Before, tissue.BeforeOffResonance);
            var fractions = phantom.Fractions[t];
            for (var i = 0; i < image.Length; i++)
            {
                if (fractions[i] <= 0)
                    continue;
                var weight = phantom.OffResonance[i];
                var signal = ((1 - weight) * nominal) + (weight * off);
                image[i] += fractions[i] * phantom.Texture[i] * signal * (1 + (tissue.B1Slope * (B1(i, appearance.B1Shading) - 1))) / scale;
            }
        }

        return image;
    }

    /// <summary>Transmit field: 1 + depth in the middle, 1 − depth at the edge of the picture.</summary>
    private static double B1(int pixel, double depth)
    {
        var x = (2.0 * (pixel % Size) / (Size - 1)) - 1;
        var y = (2.0 * (pixel / Size) / (Size - 1)) - 1;
        return 1 + (depth * (1 - (2 * Math.Min(1, (x * x) + (y * y)))));
    }

    /// <summary>Gaussian along the phase direction that widens a pixel to the given width at half height.</summary>
    private static double[] Blur(double[] image, double width, bool alongRows)
    {
        var sigma = Math.Sqrt((width * width) - 1) / 2.3548;
        var reach = Math.Max(1, (int)Math.Ceiling(3 * sigma));
        var kernel = new double[(2 * reach) + 1];
        for (var k = -reach; k <= reach; k++)
            kernel[k + reach] = Math.Exp(-k * k / (2 * sigma * sigma));
        var sum = kernel.Sum();
        var blurred = new double[image.Length];
        for (var i = 0; i < image.Length; i++)
        {
            var (column, row) = (i % Size, i / Size);
            for (var k = -reach; k <= reach; k++)
            {
                var (c, r) = alongRows ? (column + k, row) : (column, row + k);
                if (c is >= 0 and < Size && r is >= 0 and < Size)
                    blurred[i] += kernel[k + reach] / sum * image[(r * Size) + c];
            }
        }

        return blurred;
    }

    /// <summary>The value shown white: a little above what 97 of 100 pixels of the body reach.</summary>
    private static double White(double[] image)
    {
        var body = image.Where(v => v > Air).Order().ToList();
        return body.Count == 0 ? 1 : 1.1 * body[(int)(0.97 * (body.Count - 1))];
    }

    private static byte[] Encode(double[] image, Func<double, double> grey) =>
        Png.Encode([.. image.Select(v => (byte)Math.Clamp(Math.Round(255 * grey(v)), 0, 255))], Size, Size);

    private static void Check(Appearance appearance)
    {
        InRange(appearance.NoiseBefore, 0, 10, "noise before");
        InRange(appearance.NoiseAfter, 0, 10, "noise after");
        InRange(appearance.B1Shading, 0, 0.5, "B1+ shading");
        InRange(appearance.BlurBefore, 1, Size, "blur before");
        InRange(appearance.BlurAfter, 1, Size, "blur after");
        foreach (var t in appearance.Tissues)
            foreach (var value in (double[])[t.Before, t.After, t.BeforeOffResonance, t.AfterOffResonance, t.B1Slope])
                InRange(value, -1e9, 1e9, $"signal of {t.Tissue}");
    }

    private static void InRange(double value, double low, double high, string what)
    {
        if (!(value >= low && value <= high))
            throw new ArgumentException($"The {what} of a picture is {value}; it must lie from {low} to {high}.");
    }

    private static string Describe(Appearance appearance, Phantom phantom, double white)
    {
        var scale = SignalChart.Scale(appearance);
        var tissues = appearance.Tissues
            .Where(t => phantom.Tissues.Any(p => Drawn(p, appearance) == t))
            .Select(t => (t.Words, Before: Shade(t.Before / scale / white), After: Shade(t.After / scale / white)))
            .ToList();
        var changed = tissues.Where(t => t.Before != t.After).Select(t => $"{t.Words} from {t.Before} to {t.After}").ToList();
        var kept = tissues.Where(t => t.Before == t.After).Select(t => $"{t.Words} ({t.Before})").ToList();
        var replaced = phantom.Tissues.Select(p => (p.Name, For: Drawn(p, appearance))).Where(p => p.For is { } s && s.Tissue != p.Name)
            .Select(p => $"{p.Name.Replace('-', ' ')} as {p.For!.Words}").ToList();
        var off = appearance.Tissues.Any(t => Differs(t.Before, t.BeforeOffResonance, scale) || Differs(t.After, t.AfterOffResonance, scale))
            ? " One region is drawn off resonance, at the worst of the condition."
            : "";
        return "One window for both pictures. "
            + (changed.Count > 0 ? $"Shades that change: {string.Join("; ", changed)}. " : "No tissue changes its shade. ")
            + (kept.Count > 0 ? $"Shades that stay: {string.Join(", ", kept)}. " : "")
            + (replaced.Count > 0 ? $"Drawn for want of own values: {string.Join(", ", replaced)}. " : "")
            + $"Noise: {Relative(appearance.NoiseBefore, appearance.NoiseAfter)}.{Blurred(appearance)}{off} "
            + "In the difference, middle grey means no change, white brighter after, black darker.";
    }

    private static bool Differs(double nominal, double off, double scale) => Math.Abs(nominal - off) > 0.02 * scale;

    private static string Relative(double before, double after) =>
        before <= 0 ? (after <= 0 ? "not drawn" : "drawn after only")
        : Math.Abs(after - before) < 0.005 * before ? "as before"
        : $"{Numbers.Plain(after / before)} of that before";

    private static string Blurred(Appearance appearance)
    {
        var (old, @new) = Numbers.Pair(appearance.BlurBefore, appearance.BlurAfter);
        return appearance is { BlurBefore: <= 1, BlurAfter: <= 1 } ? "" : $" Blur along the phase direction: {(old == @new ? old : $"{old} to {@new}")} pixels.";
    }

    private static string Shade(double grey) => Math.Abs(grey) switch
    {
        < 0.08 => "black",
        < 0.25 => "very dark",
        < 0.45 => "dark grey",
        < 0.65 => "grey",
        < 0.85 => "light grey",
        _ => "white",
    };

    private static double Square(double v) => v * v;
}
