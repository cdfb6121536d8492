using ProtoLedger.Testing.Servers;

namespace ProtoLedger.Pages.Tests;

/// <summary>From sign-in to done, as each person goes.</summary>
/// <remarks>Roles, words and what must be left with: the department's own requirements. That fluid turns bright when the cycle of a fluid-nulled
/// series falls from 9000 to 6000 ms at unchanged inversion time follows from 1 - 2 exp(-TI/T1) + exp(-TR/T1) (Bydder and Young, JCAT 1985;9:659).</remarks>
public sealed class JourneyTests(PagesFixture server)
{
    private const string Cycle = "/series/0/readout/RepetitionTime";
    private const string Inversion = "/series/0/preparations/0/InversionTime";

    [Fact]
    public async Task Decline_ShorterCycle_PhysicistReadsFirstFindingAndDeclines()
    {
        await using var technologist = await server.OpenAsync("t.okafor");
        await technologist.Propose.OpenAsync("brain-standard");
        await technologist.Propose.Value(Cycle).FillAsync("6000");
        var request = await technologist.Propose.SendAsync("Save a minute per patient.");
        await technologist.Request.Computing.WaitForAsync();
        await technologist.Request.WaitForReportAsync();

        await using var physicist = await server.OpenAsync("h.lindqvist");
        Assert.Contains("turn from black", await physicist.Home.Card(request).InnerTextAsync(), StringComparison.Ordinal);
        await physicist.Home.Card(request).GetByRole(Microsoft.Playwright.AriaRole.Link, new() { Name = "Read and decide" }).ClickAsync();
        var first = await physicist.Request.Findings.First.InnerTextAsync();
        Assert.Contains("newly fails", first, StringComparison.Ordinal);
        Assert.Contains("RepetitionTime 9000 to 6000", first, StringComparison.Ordinal);
        await physicist.Request.DeclineAsync("Fluid is no longer nulled.");

        await technologist.GoAsync("/");
        var own = await technologist.Home.Own.InnerTextAsync();
        Assert.Contains("declined", own, StringComparison.Ordinal);
        Assert.Contains("Fluid is no longer nulled.", own, StringComparison.Ordinal);
        Assert.Empty(technologist.Wrong);
        Assert.Empty(physicist.Wrong);
    }

    [Fact]
    public async Task Sign_Renulled_BecomesEffectiveAndSaysWhoAndWhy()
    {
        await using var technologist = await server.OpenAsync("t.okafor");
        await technologist.Propose.OpenAsync("brain-standard-15");
        await technologist.Propose.Value(Cycle).FillAsync("6000");
        await technologist.Propose.NullingOffer.ClickAsync();
        // Zero of 1 - 2 exp(-TI/T1) + exp(-TR/T1) lies near 1900 ms for T1 of fluid of 4 s and an effective recovery of 6 s less the train.
        var time = double.Parse(await technologist.Propose.Value(Inversion).InputValueAsync(), System.Globalization.CultureInfo.InvariantCulture);
        Assert.InRange(time, 1750, 2100);
        var request = await technologist.Propose.SendAsync("Save a minute, fluid nulled at the shorter cycle.");
        await technologist.Request.WaitForReportAsync();
        Assert.DoesNotContain("newly fails", await technologist.Request.Findings.First.InnerTextAsync(), StringComparison.Ordinal);

        await using var physicist = await server.OpenAsync("h.lindqvist");
        await physicist.Request.OpenAsync(request);
        await physicist.Request.SignAsync(ServerFixture.Passphrase);
        await physicist.Request.Decision.Locator(".state.approved").WaitForAsync();
        await physicist.Request.MakeEffectiveAsync();
        Assert.Empty(physicist.Wrong);

        await technologist.GoAsync("/protocols/brain-standard-15");
        await technologist.Protocol.Why(Cycle).ClickAsync();
        var newest = await technologist.Protocol.Entries.First.InnerTextAsync();
        Assert.Contains("6000 ms", newest, StringComparison.Ordinal);
        Assert.Contains("Save a minute, fluid nulled", newest, StringComparison.Ordinal);
        Assert.Contains("Signed by Hanna Lindqvist", newest, StringComparison.Ordinal);
        Assert.Empty(technologist.Wrong);

        await using var reviewer = await server.OpenAsync("r.hallam");
        await reviewer.GoAsync("/protocols/brain-standard-15/history");
        Assert.Contains("Signed by Hanna Lindqvist (physicist): approved", await reviewer.Protocol.Entries.First.InnerTextAsync(), StringComparison.Ordinal);
        Assert.Empty(reviewer.Wrong);
    }

    [Fact]
    public async Task Sign_WrongPassphrase_IsRefusedOnThePage()
    {
        var request = await server.ReportedAsync();
        await using var physicist = await server.OpenAsync("h.lindqvist");
        await physicist.Request.OpenAsync(request);
        await physicist.Request.SignAsync("not the passphrase");
        await physicist.Request.Refusal.WaitForAsync();
        Assert.Contains("under review", await physicist.Request.State.InnerTextAsync(), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Repair_OneClick_OpensProposalWithBothChanges()
    {
        var request = await server.ReportedAsync();
        await using var physicist = await server.OpenAsync("h.lindqvist");
        await physicist.Request.OpenAsync(request);
        await physicist.Request.Repairs.First.ClickAsync();
        await physicist.Propose.Reason.WaitForAsync();
        Assert.Equal("6000", await physicist.Propose.Value(Cycle).InputValueAsync());
        var time = double.Parse(await physicist.Propose.Value(Inversion).InputValueAsync(), System.Globalization.CultureInfo.InvariantCulture);
        Assert.InRange(time, 1750, 2100);
        Assert.Empty(physicist.Wrong);
    }

    [Fact]
    public async Task Review_DateUnitProtocol_ShowsVersionHistoryAndAuditTrail()
    {
        await using var reviewer = await server.OpenAsync("r.hallam");
        await reviewer.Home.AskByDate.ClickAsync();
        await reviewer.Effective.AskAsync("2021-01-15T12:00", "linden-3t", "brain-standard");
        // protocol-store/history.yaml: version 4 from 2020-02-24, version 5 from 2021-05-10.
        var row = Assert.Single(await reviewer.Effective.Rows.AllInnerTextsAsync());
        Assert.Contains("version 4", row, StringComparison.Ordinal);
        Assert.Contains("2021-05-10", row, StringComparison.Ordinal);
        await reviewer.Effective.Rows.First.GetByRole(Microsoft.Playwright.AriaRole.Link, new() { Name = "brain-standard" }).ClickAsync();
        Assert.Contains("Version 1 by", await reviewer.Protocol.Entries.Last.InnerTextAsync(), StringComparison.Ordinal);
        await reviewer.GoAsync("/audit?actor=r.hallam");
        Assert.Contains("sign-in", await reviewer.Page.GetByRole(Microsoft.Playwright.AriaRole.Region, new() { Name = "Events" }).InnerTextAsync(), StringComparison.Ordinal);
        Assert.Empty(reviewer.Wrong);
    }

    [Fact]
    public async Task Keyboard_AloneFindsProposesAndWithdraws()
    {
        await using var person = await server.OpenAsync("t.okafor");
        var keys = person.Page.Keyboard;
        await keys.PressAsync("/");
        await keys.TypeAsync("pituitary");
        await keys.PressAsync("Enter");
        await person.Protocol.ProposeEdit.WaitForAsync();
        await person.TabToAsync(person.Protocol.ProposeEdit);
        await keys.PressAsync("Enter");
        await person.Propose.Reason.WaitForAsync();
        await person.TabToAsync(person.Propose.Value("/series/0/geometry/NumberOfAverages"));
        await keys.PressAsync("Control+A");
        await keys.TypeAsync("2");
        await person.TabToAsync(person.Propose.Reason);
        await keys.TypeAsync("Noise in the last examinations.");
        await person.TabToAsync(person.Propose.Draft);
        await keys.PressAsync("Enter");
        await person.Page.WaitForURLAsync("**/requests/*");
        await person.TabToAsync(person.Request.Withdraw);
        await keys.PressAsync("Enter");
        await person.TabToAsync(person.Request.WithdrawReason);
        await keys.TypeAsync("Tried by keyboard.");
        await person.TabToAsync(person.Request.WithdrawButton);
        await keys.PressAsync("Enter");
        await person.Request.Decision.Locator(".state.withdrawn").WaitForAsync();
        Assert.Empty(person.Wrong);
    }

    [Fact]
    public async Task Phone_EveryStepFitsTheWidth()
    {
        var request = await server.ReportedAsync();
        await using var person = await server.OpenAsync("t.okafor", width: 390);
        await person.Home.Find.FillAsync("pituitary");
        await person.Home.Find.PressAsync("Enter");
        await person.Protocol.ProposeEdit.WaitForAsync();
        Assert.Equal(0, await person.OverflowAsync());
        await person.Page.Locator("a[href*='/why?']").First.ClickAsync();
        await person.Protocol.Entries.First.WaitForAsync();
        Assert.Equal(0, await person.OverflowAsync());
        foreach (var address in (string[])["/", "/protocols", "/protocols/pituitary/propose", "/protocols/pituitary/history", "/requests", $"/requests/{request}", "/runs", "/effective", "/references"])
        {
            await person.GoAsync(address);
            Assert.True(await person.OverflowAsync() <= 0, address);
        }

        Assert.Empty(person.Wrong);
    }

    [Fact]
    public async Task WithoutScripts_FormsWorkAndErrorsStandBesideTheField()
    {
        await using var person = await server.OpenAsync("t.okafor", scripts: false);
        await person.Propose.OpenAsync("knee");
        Assert.False(await person.Propose.Live.IsVisibleAsync());
        await person.Propose.Value("/series/0/readout/EchoTime").FillAsync("-4");
        await person.Propose.Reason.FillAsync("A slip of the finger.");
        await person.Propose.Draft.ClickAsync();
        await person.Propose.ErrorAt("/series/0/readout/EchoTime").WaitForAsync();
        Assert.Equal("-4", await person.Propose.Value("/series/0/readout/EchoTime").InputValueAsync());
        await person.Propose.Value("/series/0/readout/EchoTime").FillAsync("36");
        await person.Propose.Draft.ClickAsync();
        await person.Request.Decision.Locator(".state.draft").WaitForAsync();
    }

    [Fact]
    public async Task Comment_OnOneParameter_IsShownWithIt()
    {
        var request = await server.ReportedAsync();
        await using var person = await server.OpenAsync("t.okafor");
        await person.Request.OpenAsync(request);
        await person.Page.GetByLabel("About").SelectOptionAsync(Cycle);
        await person.Request.Comment.FillAsync("The scanner allows no less than 5800.");
        await person.Page.GetByRole(Microsoft.Playwright.AriaRole.Button, new() { Name = "Add the comment" }).ClickAsync();
        await person.Page.GetByText("The scanner allows no less than 5800.").WaitForAsync();
        Assert.Contains(Cycle, await person.Page.Locator("ol.history").InnerTextAsync(), StringComparison.Ordinal);
        Assert.Empty(person.Wrong);
    }
}
