using Microsoft.Playwright;

namespace ProtoLedger.Pages.Tests.Screens;

internal sealed class ProposeScreen(IPage page)
{
    public ILocator Reason => page.GetByLabel("Why", new() { Exact = true });

    public ILocator Live => page.Locator("#live");

    public ILocator NullingOffer => Live.GetByRole(AriaRole.Button);

    public ILocator Submit => page.GetByRole(AriaRole.Button, new() { Name = "Submit for review" });

    public ILocator Draft => page.GetByRole(AriaRole.Button, new() { Name = "Keep as a draft" });

    public ILocator Value(string pointer) => page.Locator($"[name=value][data-pointer='{pointer}']");

    /// <summary>What stands beside a field after a refusal.</summary>
    public ILocator ErrorAt(string pointer) => page.Locator(".field", new() { Has = Value(pointer) }).Locator(".error");

    public Task OpenAsync(string protocol) => page.GotoAsync($"/protocols/{protocol}/propose");

    /// <summary>Sends the proposal and reads the number of its request from the address.</summary>
    public async Task<long> SendAsync(string reason)
    {
        await Reason.FillAsync(reason);
        await Submit.ClickAsync();
        await page.WaitForURLAsync("**/requests/*");
        return long.Parse(new Uri(page.Url).Segments[^1], System.Globalization.CultureInfo.InvariantCulture);
    }
}
