using Microsoft.Playwright;

namespace ProtoLedger.Pages.Tests.Screens;

/// <summary>The sheet of a document, its history, and why a value is what it is.</summary>
internal sealed class ProtocolScreen(IPage page)
{
    public ILocator Heading => page.GetByRole(AriaRole.Heading, new() { Level = 1 });

    public ILocator ProposeEdit => page.GetByRole(AriaRole.Link, new() { Name = "Propose an edit" });

    public ILocator History => page.GetByRole(AriaRole.Link, new() { Name = "History" });

    /// <summary>The way to who set a value, when and why.</summary>
    public ILocator Why(string pointer) => page.Locator($"a[href$='/why?pointer={Uri.EscapeDataString(pointer)}']");

    public ILocator Entries => page.Locator("ol.history > li");
}
