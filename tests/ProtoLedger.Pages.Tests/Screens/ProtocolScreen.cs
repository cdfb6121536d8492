using Microsoft.Playwright;

namespace ProtoLedger.Pages.Tests.Screens;

/// <summary>The sheet of a document, its history, and why a value is what it is.</summary>
internal sealed class ProtocolScreen(IPage page)
{
    public ILocator Heading => page.GetByRole(AriaRole.Heading, new() { Level = 1 });

    public ILocator ProposeEdit => page.GetByRole(AriaRole.Link, new() { Name = "Propose an edit" });

    public ILocator History => page.GetByRole(AriaRole.Link, new() { Name = "History" });

    /// <summary>The way to who set a value of a series.</summary>
    public ILocator Why(string series, string parameter) =>
        page.Locator("section", new() { Has = page.GetByRole(AriaRole.Heading, new() { Name = series, Exact = true }) })
            .GetByRole(AriaRole.Link, new() { Name = $"since, who, why: {parameter}" }).First;

    public ILocator Entries => page.Locator("ol.history > li");
}
