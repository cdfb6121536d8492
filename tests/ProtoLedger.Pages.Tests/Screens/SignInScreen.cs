using Microsoft.Playwright;

namespace ProtoLedger.Pages.Tests.Screens;

internal sealed class SignInScreen(IPage page)
{
    public ILocator Name => page.GetByLabel("Name", new() { Exact = true });

    public ILocator Password => page.GetByLabel("Password", new() { Exact = true });

    public async Task EnterAsync(string name, string password)
    {
        await page.GotoAsync("/sign-in");
        await Name.FillAsync(name);
        await Password.FillAsync(password);
        await page.GetByRole(AriaRole.Button, new() { Name = "Sign in" }).ClickAsync();
        await page.GetByRole(AriaRole.Heading, new() { Name = "Today" }).WaitForAsync();
    }
}
