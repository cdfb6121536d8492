using Microsoft.Playwright;
using ProtoLedger.Application.Actors;

namespace ProtoLedger.Pages.Tests;

/// <summary>Pictures of each page. Where PROTOLEDGER_IMAGES names a folder they are kept there; else they are only made.</summary>
public sealed class ScreenshotTests(PagesFixture server)
{
    private const int Largest = 300_000;

    private static readonly (string Role, string[] Pages)[] Shown =
    [
        (Roles.Technologist, ["sheet", "propose", "protocols", "why", "runs", "references", "catalogue"]),
        (Roles.Physicist, ["today", "request", "requests", "run", "compare"]),
        (Roles.Reviewer, ["effective", "history", "audit"]),
        (Roles.Administrator, ["accounts"]),
    ];

    [Fact]
    public async Task Pictures_OfEachPage_AreSmall()
    {
        var request = await server.ReportedAsync();
        var folder = Environment.GetEnvironmentVariable("PROTOLEDGER_IMAGES");
        foreach (var (role, pages) in Shown)
        {
            await using var window = await server.OpenAsync(Places.People[role]);
            foreach (var (name, address) in Places.Of(role, request).Where(place => pages.Contains(place.Name)))
            {
                await window.GoAsync(address);
                if (name == "propose")
                    await EditAsync(window);
                await KeepAsync(window.Page, folder, name);
            }

            if (role == Roles.Physicist)
            {
                await window.Page.EmulateMediaAsync(new() { ColorScheme = ColorScheme.Dark });
                await window.Request.OpenAsync(request);
                await KeepAsync(window.Page, folder, "request-dark");
            }
        }

        await using var phone = await server.OpenAsync("h.lindqvist", width: 390);
        await KeepAsync(phone.Page, folder, "today-phone");
        await using var door = await server.OpenAsync(null);
        await door.GoAsync("/sign-in");
        await KeepAsync(door.Page, folder, "sign-in");
    }

    private static async Task EditAsync(Window window)
    {
        await window.Propose.Value("/series/0/readout/RepetitionTime").FillAsync("6000");
        await window.Propose.NullingOffer.WaitForAsync();
    }

    private static async Task KeepAsync(IPage page, string? folder, string name)
    {
        var picture = await page.ScreenshotAsync();
        Assert.InRange(picture.Length, 1000, Largest);
        if (folder is not null)
            await File.WriteAllBytesAsync(Path.Combine(Directory.CreateDirectory(folder).FullName, name + ".png"), picture);
    }
}
