using ProtoLedger.Storage.Clusters;

namespace ProtoLedger.Server.Hosting;

/// <summary>Where the data are: the database that was given, or a private cluster that this process starts.</summary>
internal sealed class DatabaseAccess : IAsyncDisposable
{
    private const string Name = "ProtoLedger";

    private DatabaseAccess(string connectionString, PrivateCluster? cluster) => (ConnectionString, Cluster) = (connectionString, cluster);

    public string ConnectionString { get; }

    /// <summary>The private cluster, or null where a connection string was given.</summary>
    public PrivateCluster? Cluster { get; }

    /// <summary>Opens the way to the database.</summary>
    /// <exception cref="PrivateClusterException">No database was given and none can be started here.</exception>
    public static async Task<DatabaseAccess> OpenAsync(IConfiguration configuration, ServerOptions options, CancellationToken cancellationToken)
    {
        if (configuration.GetConnectionString(Name) is { Length: > 0 } given)
            return new DatabaseAccess(given, null);
        var cluster = await PrivateCluster.StartAsync(new PrivateClusterOptions(options.DataFolder), cancellationToken);
        try
        {
            await cluster.EnsureDatabaseAsync("protoledger", cancellationToken);
            return new DatabaseAccess(cluster.ConnectionString(), cluster);
        }
        catch
        {
            await cluster.DisposeAsync();
            throw;
        }
    }

    public ValueTask DisposeAsync() => Cluster?.DisposeAsync() ?? ValueTask.CompletedTask;
}
