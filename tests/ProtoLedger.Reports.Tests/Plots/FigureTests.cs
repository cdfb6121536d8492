using System.Globalization;
using System.Text.RegularExpressions;
using System.Xml.Linq;
using ProtoLedger.Reports.Model;
using ProtoLedger.Reports.Plots;

namespace ProtoLedger.Reports.Tests.Plots;

public sealed class FigureTests
{
    private static readonly XNamespace Svg = "http://www.w3.org/2000/svg";
    private static readonly ReportFigures Figures = new(SampleReport.Cut);

    public static TheoryData<string> Names { get; } = new(Figures.Plots.Select(p => p.Name));

    [Theory]
    [MemberData(nameof(Names))]
    public void Svg_IsWellFormedNamedAndDescribed(string name)
    {
        var figure = Figures.Plots.Single(p => p.Name == name);
        var root = XDocument.Parse(figure.Svg).Root!;
        Assert.Equal(Svg + "svg", root.Name);
        Assert.Equal(figure.Title, root.Element(Svg + "title")!.Value);
        Assert.Equal(figure.Text, root.Element(Svg + "desc")!.Value);
        Assert.Equal($"{name}-t {name}-d", root.Attribute("aria-labelledby")!.Value);
        var ids = root.Descendants().Attributes("id").Select(a => a.Value).ToList();
        Assert.Equal(ids.Distinct(), ids);
        Assert.All(ids, id => Assert.StartsWith(name + "-", id, StringComparison.Ordinal));
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void Svg_StaysInsideItsFrame(string name)
    {
        var root = XDocument.Parse(Figures.Plots.Single(p => p.Name == name).Svg).Root!;
        var box = root.Attribute("viewBox")!.Value.Split(' ').Select(Number).ToArray();
        foreach (var element in root.Descendants().Where(e => e.Name.LocalName is "line" or "rect" or "text" && e.Parent!.Name.LocalName != "pattern"))
        {
            foreach (var attribute in element.Attributes())
            {
                if (attribute.Name.LocalName is "x" or "x1" or "x2")
                    Assert.InRange(Number(attribute.Value), 0, box[2]);
                if (attribute.Name.LocalName is "y" or "y1" or "y2")
                    Assert.InRange(Number(attribute.Value), 0, box[3]);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void Twin_HasACellForEveryHeading(string name)
    {
        var twin = Figures.Plots.Single(p => p.Name == name).Twin;
        Assert.NotEmpty(twin.Rows);
        Assert.All(twin.Rows, row => Assert.Equal(twin.Headings.Count, row.Count));
    }

    [Fact]
    public void RecoveryChart_MarksTheNullWhereTheClosedFormCrossesZero()
    {
        // M(t) = 1 − (1 + f) e^(−t/T1) + f e^(−TR/T1) is zero at T1 ln((1 + f) / (1 + f e^(−TR/T1))).
        var twin = Figures.RecoveryCurves[0].Twin;
        Assert.Equal(["ventricles and sulci", "2429", "1986"], twin.Rows[0].Take(3));
        Assert.Equal("0.11", twin.Rows[0][4]);
        Assert.Equal(0.112, SampleReport.Longitudinal(2400, 6000, 4350), 0.003);
    }

    [Fact]
    public void RecoveryChart_TwoInversionTimes_AreBothNamed()
    {
        var curve = SampleReport.Cut.RecoveryCurves[0] with { InversionTimeAfter = 2130 };
        var svg = RecoveryChart.Draw("r", curve, "Linden 3 T").Svg;
        Assert.Contains("old inversion time 2400 ms", svg, StringComparison.Ordinal);
        Assert.Contains("new inversion time 2130 ms", svg, StringComparison.Ordinal);
    }

    [Fact]
    public void AttributionChart_Steps_EndWhereTheNextBegins()
    {
        var root = XDocument.Parse(Figures.Attributions[0]!.Svg).Root!;
        var bars = root.Elements(Svg + "rect").Where(e => e.Attribute("class")?.Value is "f1" or "f2").ToList();
        Assert.Equal(2, bars.Count);
        double Left(XElement e) => Number(e.Attribute("x")!.Value);
        double Right(XElement e) => Left(e) + Number(e.Attribute("width")!.Value);
        Assert.Equal(Right(bars[0]), Right(bars[1]), 0.02);
        Assert.Equal(1.18, SampleReport.Cut.Attributions[0].Contributions.Sum(c => c.Amount), 1e-12);
    }

    [Fact]
    public void FieldMap_ValuesBeyondTheLimit_AreHatchedAndMarkedInTheTwin()
    {
        var figure = Figures.FieldMaps[0];
        Assert.Equal(14 + 1, Regex.Count(figure.Svg, "url\\(#field-1-h\\)")); // 14 patches and the legend
        Assert.Equal(14, figure.Twin.Rows.Sum(r => r.Count(c => c.EndsWith('✕'))));
        Assert.Contains("0 of 15 field points before and 14 after", figure.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void FieldMap_RowsThatDoNotFit_AreRefused()
    {
        var map = SampleReport.Cut.FieldMaps[0] with { B1Scale = [0.8, 1.0] };
        Assert.Throws<ArgumentException>(() => FieldMapChart.Draw("f", map, "s"));
    }

    [Fact]
    public void SignalChart_Scale_IsTheBrightestTissueBefore()
    {
        var twin = Figures.Signals[0]!.Twin;
        Assert.Equal("1.00", twin.Rows.Max(r => r[1]));
        var fluid = twin.Rows.Single(r => r[0] == "ventricles and sulci");
        Assert.True(Number(fluid[2]) > 5 * Number(fluid[1]));
    }

    [Theory]
    [InlineData(0.0, 1.0, new[] { "0", "0.2", "0.4", "0.6", "0.8", "1.0" })]
    [InlineData(-0.5, 0.5, new[] { "−0.6", "−0.4", "−0.2", "0", "0.2", "0.4", "0.6" })]
    [InlineData(0.0, 4000.0, new[] { "0", "1000", "2000", "3000", "4000" })]
    public void Axis_Ticks_AreRoundAndHoldTheEnds(double low, double high, string[] labels) =>
        Assert.Equal(labels, new Axis(low, high, 0, 100).Ticks().Select(t => t.Label));

    [Fact]
    public void Colours_OfSeries_StandOutFromPaperByThreeToOne()
    {
        // WCAG 2.2, success criterion 1.4.11 and the definition of contrast ratio and relative luminance.
        for (var i = 0; i < 5; i++)
            Assert.True(Contrast(Stroke.Series(i).Colour, "#ffffff") >= 3, Stroke.Series(i).Colour);
    }

    [Fact]
    public void Colours_OfText_StandOutByFourAndAHalfToOne_InBothThemes()
    {
        using var stream = typeof(ReportRenderer).Assembly.GetManifestResourceStream("ProtoLedger.Reports.report.css")!;
        var css = new StreamReader(stream).ReadToEnd();
        foreach (var theme in css.Split(":root {").Skip(1).Take(2))
        {
            var colours = Regex.Matches(theme[..theme.IndexOf('}', StringComparison.Ordinal)], "--([a-z0-9-]+): (#[0-9a-f]{6})").ToDictionary(m => m.Groups[1].Value, m => m.Groups[2].Value);
            foreach (var ink in (string[])["ink", "ink-2", "accent", "bad", "good", "open"])
                Assert.True(Contrast(colours[ink], colours["paper"]) >= 4.5, ink);
            foreach (var tone in (string[])["bad", "good", "open"])
            {
                Assert.True(Contrast(colours[tone], colours[tone + "-tint"]) >= 4.5, tone);
                Assert.True(Contrast(colours["ink"], colours[tone + "-tint"]) >= 4.5, tone);
            }

            for (var shade = 0; shade < 5; shade++)
                Assert.True(Contrast(colours["ink"], colours[$"m{shade}"]) >= 4.5, $"m{shade}");
            for (var series = 1; series <= 5; series++)
                Assert.True(Contrast(colours[$"c{series}"], colours["leaf"]) >= 3, $"c{series}");
        }
    }

    private static double Contrast(string a, string b)
    {
        var (la, lb) = (Luminance(a), Luminance(b));
        return (Math.Max(la, lb) + 0.05) / (Math.Min(la, lb) + 0.05);
    }

    private static double Luminance(string colour)
    {
        double Channel(int at)
        {
            var v = int.Parse(colour.AsSpan(at, 2), NumberStyles.HexNumber, CultureInfo.InvariantCulture) / 255.0;
            return v <= 0.04045 ? v / 12.92 : Math.Pow((v + 0.055) / 1.055, 2.4);
        }

        return (0.2126 * Channel(1)) + (0.7152 * Channel(3)) + (0.0722 * Channel(5));
    }

    private static double Number(string text) => double.Parse(text, CultureInfo.InvariantCulture);
}
