using System.Text.Json;
using Microsoft.Playwright;
using ProtoLedger.Application.Actors;

namespace ProtoLedger.Pages.Tests;

/// <summary>WCAG 2.2 AA by the rules of axe-core 4.14.1, on every page, for each role, light and dark.</summary>
/// <remarks>The description of the interface at /api/ is drawn by a component of another project and is not among them.</remarks>
public sealed class AccessibilityTests(PagesFixture server)
{
    /// <summary>The details of a report are the same for everybody and long: one role has them checked, the others the rest of the page.</summary>
    private const string Details = "nav.contents ~ section";

    private const string AllRules = "['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']";

    [Theory]
    [InlineData(Roles.Technologist)]
    [InlineData(Roles.Physicist)]
    [InlineData(Roles.Reviewer)]
    [InlineData(Roles.Administrator)]
    public async Task Pages_OfRole_BreakNoRule(string role)
    {
        var request = await server.ReportedAsync();
        await using var window = await server.OpenAsync(Places.People[role], bare: true);
        var broken = new List<string>();
        foreach (var (name, address) in Places.Of(role, request))
        {
            await window.GoAsync(address);
            broken.AddRange(await BrokenAsync(window.Page, name, role != Roles.Physicist));
        }

        Assert.Empty(broken);
        Assert.Empty(window.Wrong);
    }

    [Fact]
    public async Task SignIn_BreaksNoRule()
    {
        await using var window = await server.OpenAsync(null, bare: true);
        await window.GoAsync("/sign-in");
        Assert.Empty(await BrokenAsync(window.Page, "sign-in", false));
    }

    /// <summary>A page that axe-core faults, so that an empty answer means something.</summary>
    [Fact]
    public async Task Rules_OnAFaultyPage_Complain()
    {
        await using var window = await server.OpenAsync(null, bare: true);
        await window.GoAsync("/sign-in");
        await window.Page.EvaluateAsync("document.querySelector('label[for=name]').remove(); document.body.style.color = '#eee'; document.body.style.background = '#fff'");
        var broken = await BrokenAsync(window.Page, "faulty", false);
        Assert.Contains(broken, text => text.Contains("label", StringComparison.Ordinal));
    }

    /// <summary>All rules in light; in dark the contrast alone, since nothing else depends on the theme.</summary>
    private static async Task<IReadOnlyList<string>> BrokenAsync(IPage page, string name, bool withoutDetails)
    {
        await page.EmulateMediaAsync(new() { ColorScheme = ColorScheme.Light });
        await page.AddScriptTagAsync(new() { Path = Path.Combine(AppContext.BaseDirectory, "Vendored", "axe.min.js") });
        var context = withoutDetails ? $"{{ exclude: ['{Details}'] }}" : "document";
        var light = await RunAsync(page, context, $"{{ runOnly: {AllRules} }}");
        await page.EmulateMediaAsync(new() { ColorScheme = ColorScheme.Dark });
        var dark = await RunAsync(page, context, "{ runOnly: { type: 'rule', values: ['color-contrast'] } }");
        return [.. light.Select(text => $"{name}, light: {text}"), .. dark.Select(text => $"{name}, dark: {text}")];
    }

    private static async Task<IReadOnlyList<string>> RunAsync(IPage page, string context, string options)
    {
        var found = await page.EvaluateAsync<JsonElement>(
            $"async () => (await axe.run({context}, {options})).violations.map(rule => rule.id + ' at ' + rule.nodes.slice(0, 3).map(node => node.target.join(' ')).join(', '))");
        return [.. found.EnumerateArray().Select(item => item.GetString()!)];
    }
}
