using System.Globalization;
using ProtoLedger.Storage.Clusters;

namespace ProtoLedger.Testing.Databases;

/// <summary>A throw-away private cluster in the folder for temporary files.</summary>
internal sealed class ClusterPostgres : PostgresForTests
{
    private const string Prefix = "protoledger-tests-";
    private readonly PrivateCluster cluster;
    private readonly string folder;

    private ClusterPostgres(PrivateCluster cluster, string folder) => (this.cluster, this.folder) = (cluster, folder);

    public override string AdministratorConnectionString => cluster.ConnectionString("postgres");

    public static async Task<ClusterPostgres> StartAsync()
    {
        await SweepAsync();
        var folder = Path.Combine(Path.GetTempPath(), Prefix + Environment.ProcessId.ToString(CultureInfo.InvariantCulture));
        return new ClusterPostgres(await PrivateCluster.StartAsync(new PrivateClusterOptions(folder, Durable: false), CancellationToken.None), folder);
    }

    public override async ValueTask DisposeAsync()
    {
        await cluster.DisposeAsync();
        Directory.Delete(folder, recursive: true);
    }

    /// <summary>Ends and removes clusters of test processes that were killed.</summary>
    private static async Task SweepAsync()
    {
        foreach (var left in Directory.EnumerateDirectories(Path.GetTempPath(), Prefix + "*"))
        {
            if (!int.TryParse(Path.GetFileName(left)[Prefix.Length..], NumberStyles.None, CultureInfo.InvariantCulture, out var id) || IsAlive(id))
                continue;
            try
            {
                var cluster = await PrivateCluster.StartAsync(new PrivateClusterOptions(left, Durable: false), CancellationToken.None);
                await cluster.DisposeAsync();
                Directory.Delete(left, recursive: true);
            }
            catch (Exception error) when (error is PrivateClusterException or IOException or UnauthorizedAccessException)
            {
                // another test process sweeps it at this moment, or it belongs to another account
            }
        }
    }

    private static bool IsAlive(int processId)
    {
        try
        {
            using var process = System.Diagnostics.Process.GetProcessById(processId);
            return true;
        }
        catch (ArgumentException)
        {
            return false;
        }
    }
}
