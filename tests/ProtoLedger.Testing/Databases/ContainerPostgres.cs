using System.Diagnostics;
using Microsoft.Extensions.Logging.Abstractions;
using Testcontainers.PostgreSql;

namespace ProtoLedger.Testing.Databases;

/// <summary>PostgreSQL in a container, where an engine answers and has or gets the image.</summary>
internal sealed class ContainerPostgres : PostgresForTests
{
    private const string Image = "postgres:15";
    private readonly PostgreSqlContainer container;

    private ContainerPostgres(PostgreSqlContainer container) => this.container = container;

    public override string AdministratorConnectionString => container.GetConnectionString();

    /// <summary>A running container, or null where no engine answers or the image cannot be had.</summary>
    public static async Task<ContainerPostgres?> TryStartAsync()
    {
        var version = await DockerAsync("version", "--format", "{{.Server.APIVersion}}");
        if (version is null || (await DockerAsync("image", "inspect", Image) ?? await DockerAsync("pull", "--quiet", Image)) is null)
            return null;
        // A distribution's engine may speak an older version than the client library asks for. The helper container
        // that cleans up after a killed run comes from a registry, so it is left out; the container is removed below.
        Environment.SetEnvironmentVariable("DOCKER_API_VERSION", Environment.GetEnvironmentVariable("DOCKER_API_VERSION") ?? version.Trim());
        Environment.SetEnvironmentVariable("TESTCONTAINERS_RYUK_DISABLED", Environment.GetEnvironmentVariable("TESTCONTAINERS_RYUK_DISABLED") ?? "true");
        return await StartAsync();
    }

    public override ValueTask DisposeAsync() => container.DisposeAsync();

    // Apart, so that the library reads its settings only after they were made.
    private static async Task<ContainerPostgres?> StartAsync()
    {
        var container = new PostgreSqlBuilder(Image)
            .WithCommand("-c", "fsync=off", "-c", "synchronous_commit=off", "-c", "full_page_writes=off", "-c", "max_connections=200")
            .WithAutoRemove(true)
            .WithLogger(NullLogger.Instance)
            .Build();
        try
        {
            using var patience = new CancellationTokenSource(TimeSpan.FromSeconds(60));
            await container.StartAsync(patience.Token);
            return new ContainerPostgres(container);
        }
        catch (Exception error) when (error is not OutOfMemoryException)
        {
            await Console.Error.WriteLineAsync($"The container engine answers but gives no database ({error.Message}); a private cluster is used.");
            await container.DisposeAsync();
            return null;
        }
    }

    private static async Task<string?> DockerAsync(params string[] arguments)
    {
        try
        {
            using var process = Process.Start(new ProcessStartInfo("docker", arguments) { RedirectStandardOutput = true, RedirectStandardError = true })!;
            using var patience = new CancellationTokenSource(TimeSpan.FromSeconds(30));
            var error = process.StandardError.ReadToEndAsync(patience.Token);
            var output = await process.StandardOutput.ReadToEndAsync(patience.Token);
            await error;
            await process.WaitForExitAsync(patience.Token);
            return process.ExitCode == 0 ? output : null;
        }
        catch (Exception error) when (error is System.ComponentModel.Win32Exception or OperationCanceledException)
        {
            return null; // no client program, or no engine that answers
        }
    }
}
