using System.Text;
using System.Text.Json;
using System.Text.RegularExpressions;
using ProtoLedger.Reports.Model;

namespace ProtoLedger.Reports.Tests;

public sealed partial class ChangeReportTests
{
    private static readonly RenderedReport Rendered = ReportRenderer.Render(SampleReport.Cut);
    private static readonly string Markdown = Encoding.UTF8.GetString(Rendered.Markdown);
    private static readonly string Html = Encoding.UTF8.GetString(Rendered.Html);
    private static readonly string FirstScreen = Html[..Html.IndexOf("<nav class=\"contents\"", StringComparison.Ordinal)];
    private static readonly string FirstWords = Words(FirstScreen);

    [Fact]
    public void FirstScreen_Sections_StandInTheAgreedOrder()
    {
        string[] order =
        [
            "What this edit does", "Better, worse, the same", "Changed parameters", "Scanner by scanner, worst first",
            "Variants left unchanged", "What this prediction leaves out for this edit", "What must be done next",
        ];
        var places = order.Select(title => FirstScreen.IndexOf($">{title}</h2>", StringComparison.Ordinal)).ToList();
        Assert.DoesNotContain(-1, places);
        Assert.Equal(places.Order(), places);
        Assert.Equal(order.Length, Regex.Count(FirstScreen, "<h2"));
    }

    [Fact]
    public void FirstScreen_WorstFinding_ComesFirstWithOldNewCauseAndShare()
    {
        var first = Words(FirstScreen[FirstScreen.IndexOf("<li", StringComparison.Ordinal)..FirstScreen.IndexOf("</li>", StringComparison.Ordinal)]);
        Assert.StartsWith("✕ newly fails Ventricles and sulci turn from dark to brighter than white matter, 0.11 to 1.2", first, StringComparison.Ordinal);
        Assert.Contains("cause: RepetitionTime 9000 to 6000 ms", first, StringComparison.Ordinal);
        Assert.Contains("more than 99 % of plausible tissue values", first, StringComparison.Ordinal);
        Assert.Contains("likewise on Birch 1.5 T, 0.14 to 0.98", first, StringComparison.Ordinal);
    }

    [Fact]
    public void FirstScreen_Parameters_ShowOldNewUnitAndConsoleWordingOfEachScanner()
    {
        Assert.Contains("RepetitionTime (of the whole cycle) 9000 6000 ms", FirstWords, StringComparison.Ordinal);
        Assert.Contains("“TR” on Linden 3 T; “Repetition” = first pulse to first pulse on Birch 1.5 T", FirstWords, StringComparison.Ordinal);
    }

    [Fact]
    public void FirstScreen_Scanners_WorstFirst() =>
        Assert.True(FirstWords.LastIndexOf("Linden 3 T (3 T", StringComparison.Ordinal) < FirstWords.LastIndexOf("Birch 1.5 T (1.5 T", StringComparison.Ordinal));

    [Fact]
    public void FirstScreen_Words_HoldNoJargon()
    {
        Assert.DoesNotContain("shapley", Words(Html), StringComparison.OrdinalIgnoreCase);
        Assert.DoesNotMatch("(?i)m0|equilibrium", FirstWords);
        // Four-digit signals: no number below 10 is written with more than two decimals.
        Assert.DoesNotMatch(@"(?<![0-9.])[0-9]\.[0-9]{3,}", FirstWords);
    }

    [Fact]
    public void Cautions_AreSaidForTheEdit()
    {
        var cautions = Words(Html[Html.IndexOf("id=\"cautions\"", StringComparison.Ordinal)..]);
        Assert.Contains("no measurement and no diagnosis", cautions, StringComparison.Ordinal);
        Assert.Contains("Confirm on a phantom or volunteer on Birch 1.5 T and Linden 3 T before clinical use", cautions, StringComparison.Ordinal);
        Assert.Contains("Relative RF power is predicted to go from 1 to 1.50. It is no safety limit, and nothing here clears an implant", cautions, StringComparison.Ordinal);
        Assert.Contains("1 value rests on weak evidence", cautions, StringComparison.Ordinal);
    }

    [Fact]
    public void Render_Twice_GivesTheSameBytes()
    {
        var again = ReportRenderer.Render(SampleReport.Cut);
        Assert.Equal(Rendered.Json, again.Json);
        Assert.Equal(Rendered.Markdown, again.Markdown);
        Assert.Equal(Rendered.Html, again.Html);
    }

    [Fact]
    public void Render_UnderAnotherCulture_GivesTheSameBytes()
    {
        var culture = Thread.CurrentThread.CurrentCulture;
        var strange = (System.Globalization.CultureInfo)System.Globalization.CultureInfo.InvariantCulture.Clone();
        strange.NumberFormat.NumberDecimalSeparator = ",";
        strange.NumberFormat.NegativeSign = "~";
        try
        {
            Thread.CurrentThread.CurrentCulture = strange;
            var again = ReportRenderer.Render(SampleReport.Cut);
            Assert.Equal(Rendered.Markdown, again.Markdown);
            Assert.Equal(Rendered.Html, again.Html);
        }
        finally
        {
            Thread.CurrentThread.CurrentCulture = culture;
        }
    }

    [Fact]
    public void Render_FilesEndLinesWithLineFeedsAndCarryNoMark()
    {
        foreach (var file in (byte[][])[Rendered.Json, Rendered.Markdown, Rendered.Html])
        {
            Assert.DoesNotContain((byte)'\r', file);
            Assert.NotEqual(0xEF, file[0]);
        }
    }

    [Fact]
    public void Html_HoldsNoScriptStyleAttributeOrOutsideReference()
    {
        Assert.DoesNotMatch("(?i)<script|<iframe|<object|<link|<form| on[a-z]+=| style=\"|javascript:", Html);
        Assert.DoesNotMatch("(?:src|href)=\"(?!#|data:image/png;base64,)", Html);
        Assert.Contains("default-src 'none'; style-src 'sha256-", Html, StringComparison.Ordinal);
    }

    [Fact]
    public void Html_StyleHash_IsThatOfTheStyle()
    {
        // CSP Level 3, "Does element match source list": SHA-256 over the element's text, in base64.
        var style = Html[(Html.IndexOf("<style>", StringComparison.Ordinal) + 7)..Html.IndexOf("</style>", StringComparison.Ordinal)];
        var hash = Convert.ToBase64String(System.Security.Cryptography.SHA256.HashData(Encoding.UTF8.GetBytes(style)));
        Assert.Contains($"'sha256-{hash}'", Html, StringComparison.Ordinal);
    }

    [Fact]
    public void Html_RunningHeader_NamesDocumentVersionHashAndDate()
    {
        Assert.Contains("@top-left { content: \"brain-standard, version 8, proposed\"; }", Html, StringComparison.Ordinal);
        Assert.Contains("@top-right { content: \"content 3f9c1d77bbbb\"; }", Html, StringComparison.Ordinal);
        Assert.Contains("\"Uncontrolled when printed; made 2026-11-03\"", Html, StringComparison.Ordinal);
    }

    [Fact]
    public void EveryField_OfTheModel_IsInJsonAndInThePage()
    {
        // R2: complete copies, human-readable and electronic. Texts and counts must appear in words; the arrays of plots are drawn and have table twins.
        using var json = JsonDocument.Parse(Rendered.Json);
        var page = Words(Html);
        var missing = new List<string>();
        Walk(json.RootElement.GetProperty("content"), "");
        Assert.Empty(missing);

        void Walk(JsonElement element, string path)
        {
            switch (element.ValueKind)
            {
                case JsonValueKind.Object:
                    foreach (var member in element.EnumerateObject())
                        Walk(member.Value, $"{path}/{member.Name}");
                    break;
                case JsonValueKind.Array:
                    var i = 0;
                    foreach (var item in element.EnumerateArray())
                        Walk(item, $"{path}/{i++}");
                    break;
                case JsonValueKind.String when !Shown(path, element.GetString()!):
                    missing.Add($"{path}: {element.GetString()}");
                    break;
            }
        }

        bool Shown(string path, string text)
        {
            if (path.EndsWith("At", StringComparison.Ordinal))
                return page.Contains(text[..10], StringComparison.Ordinal);
            // Enumerations, keys and observable names appear as words; the pointer as the series and parameter that it leads to.
            if (text.Length == 0 || KeyField().IsMatch(path))
                return true;
            return page.Contains(text.Trim().TrimEnd('.')[1..], StringComparison.Ordinal);
        }
    }

    [Fact]
    public void Json_OfEveryMember_IsWritten()
    {
        using var json = JsonDocument.Parse(Rendered.Json);
        var content = json.RootElement.GetProperty("content");
        Check(typeof(ChangeReport), content, "");

        static void Check(Type type, JsonElement element, string path)
        {
            foreach (var property in type.GetProperties().Where(p => p.GetMethod!.GetParameters().Length == 0))
            {
                var name = JsonNamingPolicy.CamelCase.ConvertName(property.Name);
                Assert.True(element.TryGetProperty(name, out var value), $"{path}/{name} is missing.");
                if (value.ValueKind == JsonValueKind.Array && value.GetArrayLength() > 0 && property.PropertyType.GenericTypeArguments[0] is { IsPrimitive: false } item && item != typeof(string) && value[0].ValueKind == JsonValueKind.Object)
                    Check(item, value[0], $"{path}/{name}/0");
                else if (value.ValueKind == JsonValueKind.Object)
                    Check(property.PropertyType, value, $"{path}/{name}");
            }
        }
    }

    [Fact]
    public void RelativeRfPower_OfAnyScale_IsWrittenWithOldAsOne()
    {
        var power = SampleReport.Cut.Effects.Single(e => e.Observable == "relativeRfPower") with { Before = new PredictedValue(659, 659, 659), After = new PredictedValue(989, 989, 989) };
        var words = Words(Encoding.UTF8.GetString(ReportRenderer.Render(SampleReport.Cut with { Effects = [power], Appearances = [] }).Html));
        Assert.Contains("RF power (old = 1) 1.0 1.5 ▼ worse", words, StringComparison.Ordinal);
        Assert.Contains("Relative RF power is predicted to go from 1 to 1.50.", words, StringComparison.Ordinal);
    }

    [Fact]
    public void Attributions_WithoutFinding_StandInATable()
    {
        var other = SampleReport.Cut.Attributions[0] with { Observable = "signal", Reference = null, Contributions = [new Contribution("RepetitionTime", "RepetitionTime 9000 to 6000 ms", 0.25, 0)] };
        var words = Words(Encoding.UTF8.GetString(ReportRenderer.Render(SampleReport.Cut with { Attributions = [.. SampleReport.Cut.Attributions, other], Appearances = [] }).Html));
        Assert.Contains("Signal of ventricles and sulci nominal 0.02 1.2 RepetitionTime 9000 to 6000 ms: +0.25", words, StringComparison.Ordinal);
    }

    [Fact]
    public void Meanings_SpelledAsOneWord_AreReadAsWords()
    {
        var change = SampleReport.Cut.Changes[0] with { Meaning = "toExcitation", Console = [new ConsoleWording("linden-3t", "TI", "toExcitation")] };
        var words = Words(Encoding.UTF8.GetString(ReportRenderer.Render(SampleReport.Cut with { Changes = [change], Appearances = [] }).Html));
        Assert.Contains("(to excitation) 9000 6000 ms “TI” = to excitation on Linden 3 T", words, StringComparison.Ordinal);
    }

    [Fact]
    public void NextSteps_ThatDifferByPlaceOnly_AreOne()
    {
        var step = new ReportStep("enter the new values", "linden-3t", "technologist", "after approval");
        var words = Words(Encoding.UTF8.GetString(ReportRenderer.Render(SampleReport.Cut with { NextSteps = [step, step with { Where = "birch-15t" }], Appearances = [] }).Html));
        Assert.Contains("1 Enter the new values Linden 3 T and Birch 1.5 T technologist after approval", words, StringComparison.Ordinal);
    }

    [Fact]
    public void Findings_OfAnExpectationThatStillHolds_AreToldOnce()
    {
        var cost = SampleReport.Cut.Findings[0] with { Sentence = "scan time falls", Observable = "scanTime", Subject = null, Reference = null, Direction = ProtoLedger.Regression.Findings.FindingDirection.Better };
        var held = cost with { Sentence = "scan time goes down", Severity = -1, Transition = ProtoLedger.Regression.Evaluation.Transition.StillHolds, ExpectationTitle = "short enough", ProbabilityHolds = 1 };
        var page = Encoding.UTF8.GetString(ReportRenderer.Render(SampleReport.Cut with { Findings = [cost, held], Appearances = [] }).Html);
        var first = Words(page[..page.IndexOf("<nav", StringComparison.Ordinal)]);
        Assert.Contains("Scan time falls.", first, StringComparison.Ordinal);
        Assert.DoesNotContain("Scan time goes down", first, StringComparison.Ordinal);
    }

    [Fact]
    public void Fragment_OfAStoredReport_IsItsMainElement()
    {
        var fragment = ReportPage.Fragment(Rendered.Html);
        Assert.StartsWith("<div class=\"opening\">", fragment, StringComparison.Ordinal);
        Assert.EndsWith("</section>\n", fragment, StringComparison.Ordinal);
        Assert.Contains(fragment, Html, StringComparison.Ordinal);
        Assert.Throws<FormatException>(() => ReportPage.Fragment("no report"u8));
    }

    [Fact]
    public void Render_NumberThatIsNotFinite_IsRefused()
    {
        var report = SampleReport.Cut with { Effects = [SampleReport.Cut.Effects[0] with { Before = new PredictedValue(double.NaN, 0, 0) }] };
        Assert.Throws<ArgumentException>(() => ReportRenderer.Render(report));
    }

    [Fact]
    public void Render_EmptyReport_SaysWhatIsNotThere()
    {
        var words = Words(Encoding.UTF8.GetString(ReportRenderer.Render(SampleReport.Empty).Html));
        Assert.Contains("No predicted number changes.", words, StringComparison.Ordinal);
        Assert.Contains("no other stored protocol is a variant", words, StringComparison.Ordinal);
        Assert.Contains("No expectation is written", words, StringComparison.Ordinal);
    }

    /// <summary>The text of a page as a reader gets it: marks removed, entities resolved, blanks joined.</summary>
    internal static string Words(string html)
    {
        var body = html.IndexOf("<main>", StringComparison.Ordinal);
        var text = Inline().Replace(body < 0 ? html : html[body..], "");
        text = Tag().Replace(text, " ");
        return Blank().Replace(System.Net.WebUtility.HtmlDecode(text), " ").Trim();
    }

    [GeneratedRegex("<[^>]*>")]
    private static partial Regex Tag();

    [GeneratedRegex("</?(?:span|strong|code|a|tspan)\\b[^>]*>")]
    private static partial Regex Inline();

    [GeneratedRegex("[\\s\u00A0]+")]
    private static partial Regex Blank();

    [GeneratedRegex("(?i)(Id|/pointer|/observable|/direction|/transition|/verdict|/unit|/phantom|/tissues/[0-9]+/tissue|/causes/.*)$|Ids/[0-9]+$|/where$")]
    private static partial Regex KeyField();
}
