using System.Diagnostics.CodeAnalysis;
using System.Net.Http.Headers;
using System.Net.Http.Json;
using System.Text.Json.Nodes;
using Microsoft.AspNetCore.Builder;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Logging;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Site;
using ProtoLedger.Server.Hosting;
using ProtoLedger.Testing.Databases;

namespace ProtoLedger.Testing.Servers;

/// <summary>The whole server of one test class: real HTTP on a free port, an own database, no protocols; taken as a class fixture.</summary>
public class ServerFixture : DatabaseFixture
{
    /// <summary>Password of every person of the fixture.</summary>
    public const string Password = "seventeen green lanterns";

    /// <summary>Signing passphrase of every signer of the fixture.</summary>
    public const string Passphrase = "a quiet harbour in march";

    private readonly string folder = Path.Combine(Path.GetTempPath(), "protoledger-server-" + Guid.NewGuid().ToString("N"));
    private readonly Dictionary<string, HttpClient> clients = [];

    /// <summary>People by account name: one for each role, and a second physicist.</summary>
    public static IReadOnlyDictionary<string, string> People { get; } = new Dictionary<string, string>
    {
        ["tess"] = Roles.Technologist,
        ["leo"] = Roles.LeadTechnologist,
        ["phil"] = Roles.Physicist,
        ["petra"] = Roles.Physicist,
        ["rada"] = Roles.Radiologist,
        ["rex"] = Roles.Reviewer,
        ["ada"] = Roles.Administrator,
    };

    /// <summary>The running server.</summary>
    [AllowNull]
    public WebApplication App { get; private set; }

    /// <summary>A client that is not signed in.</summary>
    [AllowNull]
    public HttpClient Anonymous { get; private set; }

    /// <summary>Services of the running server.</summary>
    public IServiceProvider Services => App.Services;

    /// <summary>Whether workers run beside the server; without them no regression run is carried out.</summary>
    protected virtual bool Works => false;

    /// <summary>Whether people of the demonstration may sign in.</summary>
    protected virtual bool Demo => false;

    /// <inheritdoc/>
    public override async ValueTask InitializeAsync()
    {
        await base.InitializeAsync();
        Directory.CreateDirectory(folder);
        var builder = ServerApplication.CreateBuilder(
            ["--urls", "http://127.0.0.1:0", "--role", Works ? "all" : "web", $"--ConnectionStrings:ProtoLedger={ConnectionString}", $"--ProtoLedger:DataFolder={folder}", $"--ProtoLedger:Demo={Demo}"]);
        builder.Logging.ClearProviders();
        Configure(builder.Services);
        var options = ServerApplication.ReadOptions(builder);
        App = ServerApplication.Build(builder, options, await DatabaseAccess.OpenAsync(builder.Configuration, options, CancellationToken.None));
        await Services.GetRequiredService<PrepareSite>().RunAsync(CancellationToken.None);
        await AddPeopleAsync();
        await App.StartAsync();
        Services.GetRequiredService<Readiness>().MarkStarted();
        Anonymous = new HttpClient { BaseAddress = new Uri(App.Urls.First()) };
    }

    /// <inheritdoc/>
    public override async ValueTask DisposeAsync()
    {
        GC.SuppressFinalize(this);
        Anonymous?.Dispose();
        foreach (var client in clients.Values)
            client.Dispose();
        if (App is not null)
        {
            await App.StopAsync();
            await App.DisposeAsync();
        }

        await base.DisposeAsync();
        Directory.Delete(folder, recursive: true);
    }

    /// <summary>A client signed in as a person of the fixture; the same one each time.</summary>
    /// <param name="name">Account name.</param>
    public async Task<HttpClient> AsAsync(string name)
    {
        if (clients.TryGetValue(name, out var known))
            return known;
        var client = await SignInAsync(name);
        return clients[name] = client;
    }

    /// <summary>A client with a new session.</summary>
    /// <param name="name">Account name.</param>
    public async Task<HttpClient> SignInAsync(string name)
    {
        using var answer = await Anonymous.PostAsJsonAsync("/api/v1/session", new { name, password = Password });
        answer.EnsureSuccessStatusCode();
        var session = await answer.Content.ReadFromJsonAsync<JsonObject>();
        var client = new HttpClient { BaseAddress = Anonymous.BaseAddress };
        client.DefaultRequestHeaders.Authorization = new AuthenticationHeaderValue("Bearer", session!["token"]!.GetValue<string>());
        return client;
    }

    /// <summary>Changes services before the server is built, such as its clock.</summary>
    /// <param name="services">The services.</param>
    protected virtual void Configure(IServiceCollection services)
    {
    }

    private async Task AddPeopleAsync()
    {
        var accounts = Services.GetRequiredService<KeepAccounts>();
        foreach (var (name, role) in People)
        {
            var made = await accounts.CreateAsync(Caller.System, new NewAccount(name, char.ToUpperInvariant(name[0]) + name[1..], [role], Password), CancellationToken.None);
            if (!made.Succeeded)
                throw new InvalidOperationException(made.Refusal.Detail);
            if (role is Roles.Physicist or Roles.Radiologist or Roles.LeadTechnologist)
                await Services.GetRequiredService<EnrolSigner>().RunAsync(Caller.System, new Enrolment(name, Passphrase), CancellationToken.None);
        }
    }
}
