using Microsoft.Playwright;

namespace ProtoLedger.Pages.Tests.Screens;

internal sealed class HomeScreen(IPage page)
{
    /// <summary>The search of every page.</summary>
    public ILocator Find => page.GetByRole(AriaRole.Searchbox, new() { Name = "Find a protocol" });

    public ILocator Waiting => page.Locator(".card");

    public ILocator Card(long request) => page.Locator(".card", new() { HasText = $"request {request}" });

    public ILocator Own => page.Locator("section", new() { HasText = "My proposals" });

    public ILocator AskByDate => page.GetByRole(AriaRole.Link, new() { Name = "Ask by date, unit and protocol" });
}
