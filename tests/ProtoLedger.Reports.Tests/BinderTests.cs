using System.Text;
using AngleSharp.Html.Parser;
using ProtoLedger.Reports.Model.Binders;

namespace ProtoLedger.Reports.Tests;

public sealed class BinderTests
{
    private static readonly IReadOnlyList<BinderPage> Pages = BinderRenderer.Render(SampleBinder.Year);

    [Fact]
    public void Render_Pages_BeginWithTheIndexAndEndWithTheModel() =>
        Assert.Equal(["index.html", "effective.html", "changes.html", "signatures.html", "binder.json"], Pages.Select(p => p.Name));

    [Fact]
    public void Index_SaysWhatIsInEffect_AndOnlyThat()
    {
        var page = Words("index.html");
        Assert.Contains("Brain, standard (brain-standard) 7 Linden 3 T 2026-09-14 recorded here", page, StringComparison.Ordinal);
        Assert.Contains("Brain, standard (brain-standard) 7 Birch 1.5 T 2026-09-20 recorded here", page, StringComparison.Ordinal);
        Assert.DoesNotContain("(brain-standard) 6 ", page, StringComparison.Ordinal);
        Assert.Contains("1 change was approved, 1 declined, 1 withdrawn; 1 version is imported history.", page, StringComparison.Ordinal);
    }

    [Fact]
    public void Index_StatesEveryGap()
    {
        string[] gaps =
        [
            "Recording began on 2026-03-02. What is shown before that was stated later and not signed at its time.",
            "brain-standard, Birch 1.5 T: no record before 2026-02-10.",
            "brain-standard, Birch 1.5 T: no record from 2026-05-04 to 2026-09-20.",
            "Console entries before 2026-09 were kept on paper and are not here.",
        ];
        Assert.Equal(gaps, BinderGaps.Of(SampleBinder.Year));
        Assert.All(gaps, gap => Assert.Contains(gap, Words("index.html"), StringComparison.Ordinal));
    }

    [Fact]
    public void Gaps_VersionThatEndedWithoutSuccessor_IsStated()
    {
        var binder = SampleBinder.Year with { Effective = [SampleBinder.Year.Effective[0]], Gaps = [] };
        Assert.Contains("brain-standard, Linden 3 T: no record after 2026-03-02.", BinderGaps.Of(binder));
    }

    [Fact]
    public void Index_TellsHowToVerify()
    {
        var page = Words("index.html");
        Assert.Contains("openssl cms -verify -binary -inform DER -in approval.p7s -content manifest.json -CAfile site-ca.pem -purpose any -attime T -out /dev/null", page, StringComparison.Ordinal);
        Assert.Contains("sha256sum -c", page, StringComparison.Ordinal);
        Assert.Contains("without one, a shortened or rewritten ledger cannot be told", page, StringComparison.Ordinal);
    }

    [Fact]
    public void ChangeLog_HoldsDateWhatWhyWhoAndOutcome_NewestFirst()
    {
        var page = Words("changes.html");
        Assert.Contains("2026-11-03 protocol brain-standard RepetitionTime 9000 to 6000 ms shorten the morning list Tola Okafor (t.okafor) declined (request 42), report reports/cr-42.html Ines Marchetti: “fluid is no longer dark”", page, StringComparison.Ordinal);
        Assert.Contains("imported, version 5, not signed here", page, StringComparison.Ordinal);
        Assert.True(page.IndexOf("withdrawn (request 43)", StringComparison.Ordinal) < page.IndexOf("declined (request 42)", StringComparison.Ordinal));
    }

    [Fact]
    public void Signatures_ShowTheRoleOfThatTime() =>
        Assert.Contains("41 Ines Marchetti (i.marchetti) physicist approved 2026-09-14 00:00 UTC counts", Words("signatures.html"), StringComparison.Ordinal);

    [Fact]
    public void EveryText_OfTheModel_IsOnAPage()
    {
        var pages = string.Concat(Pages.Where(p => p.Name.EndsWith(".html", StringComparison.Ordinal)).Select(p => ChangeReportTests.Words(Encoding.UTF8.GetString(p.Content))));
        using var json = System.Text.Json.JsonDocument.Parse(Pages[^1].Content);
        Assert.All(Texts(json.RootElement.GetProperty("content")), text => Assert.Contains(text, pages, StringComparison.Ordinal));

        static IEnumerable<string> Texts(System.Text.Json.JsonElement element) => element.ValueKind switch
        {
            System.Text.Json.JsonValueKind.Object => element.EnumerateObject().Where(m => m.Name is not "scannerId").SelectMany(m => Texts(m.Value)),
            System.Text.Json.JsonValueKind.Array => element.EnumerateArray().SelectMany(Texts),
            System.Text.Json.JsonValueKind.String when element.GetString() is { Length: > 0 } text => [text.Contains("T00:00:00", StringComparison.Ordinal) ? text[..10] : text],
            _ => [],
        };
    }

    [Fact]
    public void Pages_HoldNoScriptAndOnlyLinksInside()
    {
        foreach (var page in Pages.Where(p => p.Name.EndsWith(".html", StringComparison.Ordinal)))
        {
            var document = new HtmlParser().ParseDocument(Encoding.UTF8.GetString(page.Content));
            Assert.Empty(document.QuerySelectorAll("script, iframe, link, form"));
            // The first page stands at the top of a bundle, the others below pages/: every link must lead to a file of the bundle.
            var here = new Uri(page.Name == "index.html" ? "https://bundle/index.html" : $"https://bundle/pages/{page.Name}");
            string[] files = ["/index.html", "/pages/effective.html", "/pages/changes.html", "/pages/signatures.html", .. SampleBinder.Year.Files.Select(f => "/" + f.Name)];
            Assert.All(document.QuerySelectorAll("[href]"), a => Assert.Contains(new Uri(here, a.GetAttribute("href")!).AbsolutePath, files));
            Assert.All(document.QuerySelectorAll("[href]"), a => Assert.DoesNotContain(":", a.GetAttribute("href")!, StringComparison.Ordinal));
        }
    }

    [Theory]
    [InlineData("../outside.html")]
    [InlineData("/etc/passwd.html")]
    [InlineData("javascript:x.html")]
    public void Render_FileNameThatLeadsElsewhere_IsRefused(string name) =>
        Assert.Throws<ArgumentException>(() => BinderRenderer.Render(SampleBinder.Year with { Files = [new BinderFile(name, "x", "0")] }));

    [Fact]
    public void Render_HostileText_IsShownAsText()
    {
        var binder = SampleBinder.Year with { Log = [SampleBinder.Year.Log[1] with { Why = "<script>alert(1)</script> | [x](javascript:y)" }] };
        var page = Encoding.UTF8.GetString(BinderRenderer.Render(binder)[2].Content);
        Assert.DoesNotContain("<script", page, StringComparison.OrdinalIgnoreCase);
        Assert.Contains("<script>alert(1)</script> | [x](javascript:y)", ChangeReportTests.Words(page), StringComparison.Ordinal);
    }

    [Fact]
    public void Render_Twice_GivesTheSameBytes() =>
        Assert.Equal(Pages.Select(p => Convert.ToHexString(p.Content)), BinderRenderer.Render(SampleBinder.Year).Select(p => Convert.ToHexString(p.Content)));

    [Fact]
    public void Render_EmptyBinder_SaysThatNothingIsRecorded()
    {
        var empty = new Binder(SampleBinder.Year.Identity with { FirstRecordAt = null }, [], [], [], [], [], [], []);
        Assert.Equal(["The ledger is empty: nothing was recorded.", "No version is recorded as effective."], BinderGaps.Of(empty));
        Assert.Contains("No change is recorded.", ChangeReportTests.Words(Encoding.UTF8.GetString(BinderRenderer.Render(empty)[2].Content)), StringComparison.Ordinal);
    }

    private static string Words(string name) => ChangeReportTests.Words(Encoding.UTF8.GetString(Pages.Single(p => p.Name == name).Content));
}
