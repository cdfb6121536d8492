using ProtoLedger.Storage.Clusters;

namespace ProtoLedger.Server.Hosting;

/// <summary>Starts the private cluster again when its processes were killed under a running server.</summary>
internal sealed class ClusterGuard(DatabaseAccess database, ILogger<ClusterGuard> logger) : BackgroundService
{
    private static readonly TimeSpan Interval = TimeSpan.FromMilliseconds(500);

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        using var timer = new PeriodicTimer(Interval);
        while (database.Cluster is { IsOwner: true } cluster && await timer.WaitForNextTickAsync(stoppingToken))
        {
            if (cluster.ProcessId is not null)
                continue;
            logger.LogWarning("PostgreSQL is gone; it is started again");
            try
            {
                await cluster.EnsureRunningAsync(stoppingToken);
            }
            catch (PrivateClusterException error)
            {
                logger.LogError(error, "PostgreSQL does not come back; the next attempt follows");
            }
        }
    }
}
