using Microsoft.Playwright;

namespace ProtoLedger.Pages.Tests.Screens;

internal sealed class EffectiveScreen(IPage page)
{
    public ILocator Rows => page.GetByRole(AriaRole.Region, new() { Name = "Effective versions" }).Locator("tbody tr");

    public async Task AskAsync(string utc, string unit, string protocol)
    {
        await page.GetByLabel("On (UTC; empty for now)").FillAsync(utc);
        await page.GetByLabel("Unit").SelectOptionAsync(unit);
        await page.GetByLabel("Protocol", new() { Exact = true }).SelectOptionAsync(protocol);
        await page.GetByRole(AriaRole.Button, new() { Name = "Show" }).ClickAsync();
        await page.WaitForURLAsync("**/effective?*");
    }
}
