using Microsoft.Playwright;

namespace ProtoLedger.Pages.Tests.Screens;

internal sealed class RequestScreen(IPage page)
{
    private const float LongestRun = 300_000;

    public ILocator Computing => page.GetByText("Computing.");

    public ILocator Findings => page.Locator("#what-this-edit-does li.finding");

    public ILocator Decision => page.GetByRole(AriaRole.Complementary, new() { Name = "Decision" });

    public ILocator State => Decision.Locator(".state");

    public ILocator Passphrase => page.GetByLabel("Signing passphrase");

    public ILocator Refusal => page.GetByRole(AriaRole.Alert);

    public ILocator Repairs => Decision.GetByRole(AriaRole.Link, new() { NameRegex = new("^Propose with") });

    public ILocator Comment => page.GetByLabel("Comment", new() { Exact = true });

    public ILocator Withdraw => Decision.Locator("summary", new() { HasText = "Withdraw" });

    public ILocator WithdrawReason => page.Locator("#reason-Withdraw");

    public ILocator WithdrawButton => Decision.GetByRole(AriaRole.Button, new() { Name = "Withdraw" });

    public Task OpenAsync(long id) => page.GotoAsync($"/requests/{id}");

    /// <summary>Waits until the page shows the report by itself.</summary>
    public Task WaitForReportAsync() => Findings.First.WaitForAsync(new() { Timeout = LongestRun });

    public async Task DeclineAsync(string reason)
    {
        await Decision.Locator("summary", new() { HasText = "Decline" }).ClickAsync();
        await page.Locator("#reason-Decline").FillAsync(reason);
        await Decision.GetByRole(AriaRole.Button, new() { Name = "Decline" }).ClickAsync();
        await Decision.Locator(".state.declined").WaitForAsync();
    }

    public async Task SignAsync(string passphrase)
    {
        await Passphrase.FillAsync(passphrase);
        await Decision.GetByRole(AriaRole.Button, new() { Name = "Sign", Exact = true }).ClickAsync();
    }

    public async Task MakeEffectiveAsync()
    {
        await Decision.GetByRole(AriaRole.Button, new() { Name = "Make effective" }).ClickAsync();
        await page.WaitForLoadStateAsync();
    }
}
