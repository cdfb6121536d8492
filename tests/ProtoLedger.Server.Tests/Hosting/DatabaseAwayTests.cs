using System.Net;
using Microsoft.AspNetCore.Builder;
using Microsoft.Extensions.Logging;
using ProtoLedger.Server.Hosting;
using ProtoLedger.Testing.Servers;

namespace ProtoLedger.Server.Tests.Hosting;

/// <summary>What the server answers while PostgreSQL cannot be reached.</summary>
public sealed class DatabaseAwayTests : IAsyncLifetime
{
    private readonly string folder = Path.Combine(Path.GetTempPath(), "protoledger-away-" + Guid.NewGuid().ToString("N"));
    private WebApplication app = null!;
    private HttpClient client = null!;

    public async ValueTask InitializeAsync()
    {
        var builder = ServerApplication.CreateBuilder(
            ["--urls", "http://127.0.0.1:0", "--role", "web", "--ConnectionStrings:ProtoLedger=Host=127.0.0.1;Port=1;Username=x;Database=x;Timeout=2", $"--ProtoLedger:DataFolder={folder}"]);
        builder.Logging.ClearProviders();
        var options = ServerApplication.ReadOptions(builder);
        app = ServerApplication.Build(builder, options, await DatabaseAccess.OpenAsync(builder.Configuration, options, CancellationToken.None));
        await app.StartAsync();
        client = new HttpClient { BaseAddress = new Uri(app.Urls.First()) };
    }

    public async ValueTask DisposeAsync()
    {
        client.Dispose();
        await app.DisposeAsync();
        Directory.Delete(folder, recursive: true);
    }

    [Fact]
    public async Task Live_Answers() => Assert.Equal(HttpStatusCode.OK, (await client.CallAsync("GET", "/health/live")).Status);

    [Fact]
    public async Task Ready_Is503WithRetryAfter()
    {
        var answer = await client.CallAsync("GET", "/health/ready");
        Assert.Equal((HttpStatusCode.ServiceUnavailable, "database-away"), (answer.Status, answer.Problem));
        Assert.NotNull(answer.Headers.RetryAfter);
    }

    [Fact]
    public async Task Request_Is503WithoutTheReason()
    {
        var answer = await client.CallAsync("POST", "/api/v1/session", new { name = "tess", password = "whatever it is" });
        Assert.Equal((HttpStatusCode.ServiceUnavailable, "database-away"), (answer.Status, answer.Problem));
        Assert.DoesNotContain("127.0.0.1", answer.Text, StringComparison.Ordinal);
        Assert.DoesNotContain("Npgsql", answer.Text, StringComparison.Ordinal);
    }
}
