using Microsoft.Playwright;
using ProtoLedger.Pages.Tests.Screens;

namespace ProtoLedger.Pages.Tests;

/// <summary>One person's browser window; it remembers what went wrong in it.</summary>
internal sealed class Window : IAsyncDisposable
{
    private const int BrowserError = 400;
    private readonly IBrowserContext context;
    private readonly List<string> wrong = [];

    public Window(IBrowserContext context, IPage page)
    {
        (this.context, Page) = (context, page);
        page.SetDefaultTimeout(30_000);
        page.Console += (_, message) =>
        {
            if (message.Type is "error" or "warning")
                wrong.Add($"console: {message.Text}");
        };
        page.PageError += (_, error) => wrong.Add($"script: {error}");
        page.Response += (_, response) =>
        {
            if (response.Status >= BrowserError)
                wrong.Add($"{response.Status} {response.Url}");
        };
        page.RequestFailed += (_, request) =>
        {
            // Leaving a page ends its stream of events.
            if (request.Failure?.Contains("ERR_ABORTED", StringComparison.Ordinal) != true)
                wrong.Add($"{request.Failure} {request.Url}");
        };
    }

    public IPage Page { get; }

    /// <summary>Errors of the console, of scripts and of requests so far.</summary>
    public IReadOnlyList<string> Wrong => wrong;

    public HomeScreen Home => new(Page);

    public ProtocolScreen Protocol => new(Page);

    public ProposeScreen Propose => new(Page);

    public RequestScreen Request => new(Page);

    public EffectiveScreen Effective => new(Page);

    public Task GoAsync(string address) => Page.GotoAsync(address);

    /// <summary>Signs in at the door and waits for the first page.</summary>
    public Task SignInAsync(string name, string password) => new SignInScreen(Page).EnterAsync(name, password);

    /// <summary>Presses Tab until the element has the focus.</summary>
    public async Task TabToAsync(ILocator target)
    {
        const int Most = 400;
        for (var i = 0; i < Most; i++)
        {
            if (await target.EvaluateAsync<bool>("element => element === document.activeElement"))
                return;
            await Page.Keyboard.PressAsync("Tab");
        }

        throw new TimeoutException($"{target} cannot be reached with {Most} presses of Tab.");
    }

    /// <summary>CSS pixels by which the page is wider than the window.</summary>
    public Task<int> OverflowAsync() => Page.EvaluateAsync<int>("document.documentElement.scrollWidth - document.documentElement.clientWidth");

    public async ValueTask DisposeAsync() => await context.DisposeAsync();
}
