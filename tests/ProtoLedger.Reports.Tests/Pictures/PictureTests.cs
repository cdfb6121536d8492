using System.Buffers.Binary;
using System.IO.Compression;
using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Pictures;

namespace ProtoLedger.Reports.Tests.Pictures;

public sealed class PictureTests
{
    private static readonly Appearance Head = SampleReport.Cut.Appearances[0];
    private static readonly PictureSet Set = AppearancePictures.Draw("a", Head, "Linden 3 T");

    [Fact]
    public void Png_OfRandomPixels_DecodesToThem()
    {
        var random = new Random(5);
        foreach (var (width, height) in ((int, int)[])[(1, 1), (3, 2), (17, 31), (256, 256)])
        {
            var pixels = new byte[width * height];
            random.NextBytes(pixels);
            Assert.Equal(pixels, Decode(Png.Encode(pixels, width, height), width, height));
        }
    }

    [Fact]
    public void Png_Checksum_IsThatOfTheStandardsEmptyEnd() =>
        // ISO/IEC 15948: the IEND chunk is empty, so its CRC is that of the four letters: AE 42 60 82.
        Assert.Equal([0xAE, 0x42, 0x60, 0x82], Png.Encode([7], 1, 1)[^4..]);

    [Fact]
    public void Png_WrongNumberOfPixels_IsRefused() => Assert.Throws<ArgumentException>(() => Png.Encode([1, 2, 3], 2, 2));

    [Fact]
    public void Draw_Twice_GivesTheSameBytes() => Assert.Equal(Set.After, AppearancePictures.Draw("a", Head, "Linden 3 T").After);

    [Fact]
    public void Draw_NoChange_GivesAGreyDifference()
    {
        var same = AppearancePictures.Draw("a", Head with { Tissues = [.. Head.Tissues.Select(t => t with { After = t.Before, AfterOffResonance = t.BeforeOffResonance })] }, "s");
        Assert.All(Decode(same.Difference, 256, 256), v => Assert.Equal(128, v));
        Assert.Contains("No tissue changes its shade", same.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Draw_FluidThatBrightens_BrightensTheVentriclesOnly()
    {
        var (before, after) = (Decode(Set.Before, 256, 256), Decode(Set.After, 256, 256));
        // A patch in the right trigone, and one in the white matter beside it.
        Assert.True(Mean(after, 154, 167, 3) > Mean(before, 154, 167, 3) + 40);
        Assert.Equal(Mean(before, 175, 130, 2), Mean(after, 175, 130, 2), 6.0);
    }

    [Fact]
    public void Draw_OppositeSigns_CancelInMixedPixels()
    {
        // Where one pixel holds +1 and −1 in equal parts the magnitude of the signed sum is 0; the mean of the magnitudes would be 1.
        TissueSignal Signal(string name, double s) => new(name, name, s, s, s, s, 0);
        var clean = Head with { NoiseBefore = 0, NoiseAfter = 0, B1Shading = 0, BlurBefore = 1, BlurAfter = 1 };
        var opposed = AppearancePictures.Draw("a", clean with { Tissues = [Signal("csf", -1), Signal("grey-matter", 1), Signal("white-matter", 1)] }, "s");
        var alike = AppearancePictures.Draw("a", clean with { Tissues = [Signal("csf", 1), Signal("grey-matter", 1), Signal("white-matter", 1)] }, "s");
        var fluid = Phantom.Of(PhantomKind.Head).Fractions[3];
        var (a, b) = (Decode(opposed.Before, 256, 256), Decode(alike.Before, 256, 256));
        var halves = Enumerable.Range(0, a.Length).Where(i => Math.Abs(fluid[i] - 0.5) < 0.04 && b[i] > 180).ToList();
        Assert.True(halves.Count > 50);
        Assert.All(halves, i => Assert.InRange(a[i], 0, 25));
    }

    [Fact]
    public void Draw_TissueWithoutValues_IsDrawnAsItsNearestAndNamed()
    {
        var set = AppearancePictures.Draw("a", Head with { Tissues = [.. Head.Tissues.Where(t => t.Tissue is not "deep-grey" and not "muscle")] }, "s");
        Assert.Contains("Drawn for want of own values: deep grey as grey matter, muscle as grey matter.", set.Text, StringComparison.Ordinal);
        Assert.True(Mean(Decode(set.Before, 256, 256), 141, 139, 2) > 60);
    }

    [Fact]
    public void Draw_Noise_HasTheRayleighMeanInAir()
    {
        // Mean of the magnitude of complex normal noise is σ √(π/2): Gudbjartsson and Patz, Magn Reson Med 1995;34:910.
        const double Sigma = 0.05;
        var noisy = AppearancePictures.Draw("a", Head with { NoiseBefore = Sigma, NoiseAfter = Sigma, BlurBefore = 1, BlurAfter = 1 }, "s");
        var clean = AppearancePictures.Draw("a", Head with { NoiseBefore = 0, NoiseAfter = 0, BlurBefore = 1, BlurAfter = 1 }, "s");
        var (n, c) = (Decode(noisy.Before, 256, 256), Decode(clean.Before, 256, 256));
        var air = Enumerable.Range(0, 25).SelectMany(y => Enumerable.Range(0, 25).Select(x => (y * 256) + x)).ToList();
        Assert.All(air, i => Assert.Equal(0, c[i]));
        // One grey step is white/255 of the scale; fat, the brightest tissue, is drawn near white.
        var scale = air.Average(i => (double)n[i]) / (Sigma * Math.Sqrt(Math.PI / 2));
        Assert.InRange(scale, 190, 255);
    }

    [Fact]
    public void Draw_Blur_RunsAlongThePhaseDirectionOnly()
    {
        var plain = Head with { NoiseBefore = 0, NoiseAfter = 0, BlurBefore = 1, BlurAfter = 6 };
        var along = Decode(AppearancePictures.Draw("a", plain with { Tissues = [Steady()], PhaseAlongRows = true }, "s").After, 256, 256);
        var across = Decode(AppearancePictures.Draw("a", plain with { Tissues = [Steady()], PhaseAlongRows = false }, "s").After, 256, 256);
        // Scalp on the left edge is a step along a row, on top a step along a column.
        Assert.True(Steepest(along, row: true) < 0.7 * Steepest(across, row: true));
        Assert.True(Steepest(across, row: false) < 0.7 * Steepest(along, row: false));
        static TissueSignal Steady() => new("fat", "fat", 1, 1, 1, 1, 0);
        static int Steepest(byte[] p, bool row) => Enumerable.Range(1, 100).Max(i => row ? Math.Abs(p[(128 * 256) + i] - p[(128 * 256) + i - 1]) : Math.Abs(p[(i * 256) + 128] - p[((i - 1) * 256) + 128]));
    }

    [Theory]
    [InlineData(PhantomKind.Head)]
    [InlineData(PhantomKind.Knee)]
    [InlineData(PhantomKind.Abdomen)]
    public void Phantom_EveryTissue_IsThereAndFractionsNeverExceedOne(PhantomKind kind)
    {
        var phantom = Phantom.Of(kind);
        Assert.All(phantom.Fractions, f => Assert.True(f.Sum() > 20));
        for (var i = 0; i < Phantom.Size * Phantom.Size; i++)
            Assert.InRange(phantom.Fractions.Sum(f => f[i]), 0, 1.0001f);
        Assert.Contains(phantom.Fractions[0], f => f is > 0.1f and < 0.9f);
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(-0.1)]
    public void Draw_NoiseOutOfRange_IsRefused(double noise)
    {
        var error = Assert.Throws<ArgumentException>(() => AppearancePictures.Draw("a", Head with { NoiseAfter = noise }, "s"));
        Assert.Contains("noise after", error.Message, StringComparison.Ordinal);
    }

    private static double Mean(byte[] pixels, int x, int y, int reach)
    {
        var sum = 0.0;
        for (var dy = -reach; dy <= reach; dy++)
            for (var dx = -reach; dx <= reach; dx++)
                sum += pixels[((y + dy) * 256) + x + dx];
        return sum / ((2 * reach) + 1) / ((2 * reach) + 1);
    }

    /// <summary>A decoder written from the standard, with the checksums recomputed bit by bit.</summary>
    private static byte[] Decode(byte[] png, int width, int height)
    {
        Assert.Equal("89504E470D0A1A0A", Convert.ToHexString(png.AsSpan(0, 8)));
        var packed = new MemoryStream();
        for (var at = 8; at < png.Length;)
        {
            var length = BinaryPrimitives.ReadInt32BigEndian(png.AsSpan(at));
            var type = System.Text.Encoding.ASCII.GetString(png, at + 4, 4);
            Assert.Equal(Crc(png.AsSpan(at + 4, length + 4)), BinaryPrimitives.ReadUInt32BigEndian(png.AsSpan(at + 8 + length)));
            if (type == "IHDR")
                Assert.Equal([0, 0, (byte)(width >> 8), (byte)width, 0, 0, (byte)(height >> 8), (byte)height, 8, 0, 0, 0, 0], png.AsSpan(at + 8, length).ToArray());
            if (type == "IDAT")
                packed.Write(png, at + 8, length);
            at += length + 12;
        }

        packed.Position = 0;
        using var zlib = new ZLibStream(packed, CompressionMode.Decompress);
        var lines = new MemoryStream();
        zlib.CopyTo(lines);
        var raw = lines.ToArray();
        Assert.Equal((width + 1) * height, raw.Length);
        var pixels = new byte[width * height];
        for (var y = 0; y < height; y++)
        {
            var filter = raw[y * (width + 1)];
            for (var x = 0; x < width; x++)
            {
                var value = raw[(y * (width + 1)) + 1 + x];
                var above = y > 0 ? pixels[((y - 1) * width) + x] : (byte)0;
                pixels[(y * width) + x] = filter switch
                {
                    0 => value,
                    2 => (byte)(value + above),
                    _ => throw new InvalidDataException($"Filter {filter}."),
                };
            }
        }

        return pixels;
    }

    private static uint Crc(ReadOnlySpan<byte> bytes)
    {
        var crc = 0xFFFFFFFFu;
        foreach (var b in bytes)
        {
            crc ^= b;
            for (var bit = 0; bit < 8; bit++)
                crc = (crc & 1) != 0 ? (crc >> 1) ^ 0xEDB88320u : crc >> 1;
        }

        return ~crc;
    }
}
