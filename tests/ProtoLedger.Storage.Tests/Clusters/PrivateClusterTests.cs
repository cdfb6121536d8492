using System.Diagnostics;
using System.Globalization;
using Npgsql;
using ProtoLedger.Storage.Clusters;

namespace ProtoLedger.Storage.Tests.Clusters;

public sealed class PrivateClusterTests : IAsyncLifetime
{
    private readonly string folder = Path.Combine(Path.GetTempPath(), "protoledger-cluster-" + Guid.NewGuid().ToString("N")[..8]);

    private PrivateClusterOptions Options => new(folder);

    public ValueTask InitializeAsync() => ValueTask.CompletedTask;

    public ValueTask DisposeAsync()
    {
        Directory.Delete(folder, recursive: true);
        return ValueTask.CompletedTask;
    }

    [Fact]
    public async Task Start_AfterStop_KeepsTheDataAndLeavesNoProcess()
    {
        int first;
        await using (var cluster = await PrivateCluster.StartAsync(Options, CancellationToken.None))
        {
            first = cluster.ProcessId!.Value;
            await cluster.EnsureDatabaseAsync("protoledger", CancellationToken.None);
            await RunAsync(cluster, "CREATE TABLE kept (value int)");
            await RunAsync(cluster, "INSERT INTO kept VALUES (7)");
        }

        Assert.True(SpinWait.SpinUntil(() => !IsWorking(first), TimeSpan.FromSeconds(5)));
        await using var again = await PrivateCluster.StartAsync(Options, CancellationToken.None);
        Assert.Equal(7, await RunAsync(again, "SELECT value FROM kept"));
    }

    [Fact]
    public async Task Start_AfterPostmasterAndChildrenWereKilled_RecoversEveryCommit()
    {
        await using (var cluster = await PrivateCluster.StartAsync(Options, CancellationToken.None))
        {
            await cluster.EnsureDatabaseAsync("protoledger", CancellationToken.None);
            await RunAsync(cluster, "CREATE TABLE kept (value int)");
            await RunAsync(cluster, "INSERT INTO kept VALUES (8)");
            foreach (var id in ProcessesOf(cluster.ProcessId!.Value))
                Process.GetProcessById(id).Kill();
        }

        Assert.True(File.Exists(Directory.EnumerateFiles(folder, "postmaster.pid", SearchOption.AllDirectories).Single()));
        await using var again = await PrivateCluster.StartAsync(Options, CancellationToken.None);
        Assert.Equal(8, await RunAsync(again, "SELECT value FROM kept"));
    }

    [Fact]
    public async Task Start_WhenOnlyThePostmasterWasKilled_WaitsForItsChildren()
    {
        await using (var cluster = await PrivateCluster.StartAsync(Options, CancellationToken.None))
        {
            await cluster.EnsureDatabaseAsync("protoledger", CancellationToken.None);
            await RunAsync(cluster, "CREATE TABLE kept (value int)");
            var busy = RunAsync(cluster, "SELECT count(*) FROM generate_series(1, 20000000)");
            await Task.Delay(200);
            Process.GetProcessById(cluster.ProcessId!.Value).Kill();
            await Task.WhenAny(busy, Task.Delay(50));
            _ = busy.ContinueWith(t => t.Exception, TaskScheduler.Default);
        }

        await using var again = await PrivateCluster.StartAsync(Options, CancellationToken.None);
        Assert.Equal(0L, await RunAsync(again, "SELECT count(*) FROM kept"));
    }

    [Fact]
    public async Task Start_WhenTheLockNamesAForeignProcess_IgnoresTheLock()
    {
        await using (await PrivateCluster.StartAsync(Options, CancellationToken.None))
        {
        }

        var data = Directory.EnumerateDirectories(folder, "postgresql-*").Single();
        using var foreign = Process.Start("sleep", "60");
        var lines = new[] { foreign.Id.ToString(CultureInfo.InvariantCulture), data, "0", "5432", folder, "", "0 0", "ready" };
        await File.WriteAllLinesAsync(Path.Combine(data, "postmaster.pid"), lines);
        try
        {
            await using var cluster = await PrivateCluster.StartAsync(Options, CancellationToken.None);
            Assert.NotEqual(foreign.Id, cluster.ProcessId);
            Assert.False(foreign.HasExited);
        }
        finally
        {
            foreign.Kill();
        }
    }

    [Fact]
    public async Task Start_OnARunningCluster_JoinsAndLeavesItRunning()
    {
        await using var owner = await PrivateCluster.StartAsync(Options, CancellationToken.None);
        await using (var guest = await PrivateCluster.StartAsync(Options, CancellationToken.None))
        {
            Assert.False(guest.IsOwner);
            Assert.Equal(owner.ProcessId, guest.ProcessId);
        }

        Assert.NotNull(owner.ProcessId);
    }

    [Fact]
    public async Task Start_OnDataOfAnotherMajorVersion_NamesBoth()
    {
        Directory.CreateDirectory(Path.Combine(folder, "postgresql-9"));
        var error = await Assert.ThrowsAsync<PrivateClusterException>(() => PrivateCluster.StartAsync(Options, CancellationToken.None));
        Assert.Contains("postgresql-9", error.Message, StringComparison.Ordinal);
        Assert.DoesNotContain('\n', error.Message);
    }

    // An ended process whose parent has not asked for its result has no command line any more.
    private static bool IsWorking(int id) =>
        File.Exists($"/proc/{id}/cmdline") && File.ReadAllText($"/proc/{id}/cmdline").Length > 0;

    private static List<int> ProcessesOf(int postmaster) =>
        [postmaster, .. Directory.EnumerateDirectories("/proc")
            .Select(d => int.TryParse(Path.GetFileName(d), out var id) ? id : 0)
            .Where(id => id > 0 && ParentOf(id) == postmaster)];

    private static int ParentOf(int id)
    {
        try
        {
            return int.Parse(File.ReadAllText($"/proc/{id}/stat").Split(") ")[1].Split(' ')[1], CultureInfo.InvariantCulture);
        }
        catch (IOException)
        {
            return 0;
        }
    }

    private static async Task<object?> RunAsync(PrivateCluster cluster, string statement)
    {
        await using var connection = new NpgsqlConnection(cluster.ConnectionString() + ";Pooling=false");
        await connection.OpenAsync();
#pragma warning disable CA2100 // statements of this file
        await using var command = new NpgsqlCommand(statement, connection);
#pragma warning restore CA2100
        return await command.ExecuteScalarAsync();
    }
}
