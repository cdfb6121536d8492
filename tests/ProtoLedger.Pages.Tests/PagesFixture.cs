using System.Diagnostics.CodeAnalysis;
using System.Text.Json.Nodes;
using Microsoft.Playwright;
using ProtoLedger.Pages.Tests;
using ProtoLedger.Testing.Servers;

[assembly: AssemblyFixture(typeof(PagesFixture))]
[assembly: Xunit.v3.Parallelization(Mode = Xunit.Sdk.ParallelMode.None)]

namespace ProtoLedger.Pages.Tests;

/// <summary>One server and one browser for all tests of the pages.</summary>
public sealed class PagesFixture : DemoServerFixture
{
    private const string Chromium = "/usr/bin/chromium";
    private const string Missing = "These tests look at the pages in Chromium, which is not at " + Chromium + " (Debian: apt-get install chromium).";

    private static readonly string[] Switches =
    [
        "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync",
    ];

    private readonly SemaphoreSlim one = new(1);
    private IPlaywright? driver;
    private long reported;

    /// <summary>Where the server listens.</summary>
    public string Address => App.Urls.First();

    [AllowNull]
    private IBrowser Browser { get; set; }

    public override async ValueTask InitializeAsync()
    {
        if (!File.Exists(Chromium))
            return;
        await base.InitializeAsync();
        driver = await Playwright.CreateAsync();
        Browser = await driver.Chromium.LaunchAsync(new() { ExecutablePath = Chromium, Args = Switches });
    }

    public override async ValueTask DisposeAsync()
    {
        GC.SuppressFinalize(this);
        if (Browser is null)
            return;
        await Browser.DisposeAsync();
        driver?.Dispose();
        one.Dispose();
        await base.DisposeAsync();
    }

    /// <summary>A window of its own: no cookie of another.</summary>
    /// <param name="name">Who signs in, or null for nobody.</param>
    /// <param name="width">CSS pixels.</param>
    /// <param name="scripts">Whether scripts run.</param>
    /// <param name="bare">Whether the content security policy is set aside, which the accessibility rules need to be loaded into a page.</param>
    internal async Task<Window> OpenAsync(string? name, int width = 1280, bool scripts = true, bool bare = false)
    {
        Assert.SkipUnless(Browser is not null, Missing);
        var context = await Browser.NewContextAsync(new()
        {
            BaseURL = Address,
            ViewportSize = new() { Width = width, Height = 860 },
            JavaScriptEnabled = scripts,
            BypassCSP = bare,
            TimezoneId = "Europe/Berlin",
            ReducedMotion = ReducedMotion.Reduce,
        });
        var window = new Window(context, await context.NewPageAsync());
        if (name is not null)
            await window.SignInAsync(name, Password);
        return window;
    }

    /// <summary>A request under review whose report is there: repetition time 9000 to 6000 in a fluid-nulled series.</summary>
    internal async Task<long> ReportedAsync()
    {
        await one.WaitAsync();
        try
        {
            if (reported > 0)
                return reported;
            var client = await AsAsync("l.marchetti");
            var proposal = await client.ProposalAsync("brain-standard", document => document["series"]![0]!["readout"]!["RepetitionTime"] = 6000);
            var made = await client.CallAsync("POST", "/api/v1/change-requests", proposal);
            var id = made.Json["id"]!.GetValue<long>();
            var sent = await client.CallAsync("POST", $"/api/v1/change-requests/{id}/submit", new JsonObject(), made.Tag);
            Assert.True((int)sent.Status < 300, sent.Text);
            for (var i = 0; i < 300; i++)
            {
                if ((int)(await client.CallAsync("GET", $"/api/v1/change-requests/{id}/report.md")).Status == 200)
                    return reported = id;
                await Task.Delay(1000);
            }

            throw new TimeoutException("The report was not made within five minutes.");
        }
        finally
        {
            one.Release();
        }
    }
}
