using Microsoft.Extensions.DependencyInjection;
using ProtoLedger.Application;
using ProtoLedger.Application.Site;
using ProtoLedger.Storage.Clusters;
using ProtoLedger.Storage.Migrations;
using ProtoLedger.Storage.Sessions;

namespace ProtoLedger.Cli;

/// <summary>The installation that a command works on: the same environment variables as the server's, with the same defaults.</summary>
internal sealed class Installation : IAsyncDisposable
{
    private readonly ServiceProvider services;
    private readonly PrivateCluster? cluster;

    private Installation(ServiceProvider services, PrivateCluster? cluster) => (this.services, this.cluster) = (services, cluster);

    /// <summary>Opens the database, starting or joining the private cluster where no connection string is given, and migrates it.</summary>
    /// <exception cref="PrivateClusterException">There is no database and none can be started.</exception>
    public static async Task<Installation> OpenAsync(CancellationToken cancellationToken)
    {
        var folder = Setting("ProtoLedger__DataFolder") ?? PrivateClusterOptions.DefaultDataFolder();
        var connectionString = Setting("ConnectionStrings__ProtoLedger");
        var cluster = connectionString is null ? await PrivateCluster.StartAsync(new PrivateClusterOptions(folder), cancellationToken) : null;
        if (cluster is not null)
        {
            await cluster.EnsureDatabaseAsync("protoledger", cancellationToken);
            connectionString = cluster.ConnectionString();
        }

        await Migrator.MigrateAsync(connectionString!, cancellationToken);
        var key = SealingKeyFile.Read(Setting("ProtoLedger__SealingKeyFile") ?? Path.Combine(folder, SealingKeyFile.UsualName));
        var site = new SiteOptions(Setting("ProtoLedger__SiteName") ?? SiteOptions.UsualName, Setting("ProtoLedger__Origin") ?? SiteOptions.UsualOrigin, key);
        var services = new ServiceCollection()
            .AddSingleton(TimeProvider.System)
            .AddProtoLedgerStorage(connectionString!)
            .AddProtoLedgerApplication(site)
            .BuildServiceProvider();
        return new Installation(services, cluster);
    }

    /// <summary>Runs a command on the installation; what cannot be opened is said in one line.</summary>
    public static async Task<int> RunAsync(Func<Installation, Task<int>> command, TextWriter error, CancellationToken cancellationToken)
    {
        try
        {
            await using var installation = await OpenAsync(cancellationToken);
            await installation.Get<PrepareSite>().RunAsync(cancellationToken);
            return await command(installation);
        }
        catch (Exception refused) when (refused is PrivateClusterException or MigrationException or InvalidDataException or IOException or InvalidOperationException)
        {
            await error.WriteLineAsync(refused.Message);
            return ExitCodes.Usage;
        }
    }

    /// <summary>A use case.</summary>
    public T Get<T>()
        where T : notnull => services.GetRequiredService<T>();

    public async ValueTask DisposeAsync()
    {
        await services.DisposeAsync();
        if (cluster is not null)
            await cluster.DisposeAsync();
    }

    private static string? Setting(string name) => Environment.GetEnvironmentVariable(name) is { Length: > 0 } value ? value : null;
}
