using System.CommandLine;
using System.Diagnostics;
using System.Globalization;
using System.Net;
using System.Net.Sockets;
using ProtoLedger.Cli.KillTesting;
using ProtoLedger.Storage.Clusters;

namespace ProtoLedger.Cli;

/// <summary><c>kill-test --rounds N</c>: kills web server, worker and database in turn under clients that edit, and shows that nothing acknowledged is lost.</summary>
internal static class KillTestCommand
{
    private const string Protocol = "knee";
    private static readonly string[] People = ["t.okafor", "l.marchetti", "h.lindqvist", "a.deshmukh"];

    public static Command Create()
    {
        var rounds = new Option<int>("--rounds") { Description = "How often to kill.", DefaultValueFactory = _ => 6 };
        var clients = new Option<int>("--clients") { Description = "Clients at the same time.", DefaultValueFactory = _ => 8 };
        var seed = new Option<int>("--seed") { Description = "Seed of the moments.", DefaultValueFactory = _ => 1 };
        var server = new Option<FileInfo>("--server") { Description = "The server program.", DefaultValueFactory = _ => new FileInfo(FindServer()) };
        var command = new Command("kill-test", "Kill web server, worker and database in turn under load, on throw-away data. Exit code: 0 nothing was lost, 1 something was.") { rounds, clients, seed, server };
        command.SetAction((result, cancellationToken) => RunAsync(
            result.GetValue(rounds), result.GetValue(clients), result.GetValue(seed), result.GetRequiredValue(server), result.InvocationConfiguration.Output, cancellationToken));
        return command;
    }

    private static async Task<int> RunAsync(int rounds, int clientCount, int seed, FileInfo program, TextWriter output, CancellationToken cancellationToken)
    {
        var folder = Path.Combine(Path.GetTempPath(), $"protoledger-kill-{Environment.ProcessId}");
        var store = Path.Combine(folder, "store");
        SmallStore.Write(Path.Combine(program.DirectoryName!, "protocol-store"), Protocol, store);
        var url = $"http://127.0.0.1:{FreePort()}";
        using var web = new ServerProcess(program.FullName, folder, store, "web", url);
        using var worker = new ServerProcess(program.FullName, folder, store, "worker", $"http://127.0.0.1:{FreePort()}");
        var clients = Enumerable.Range(0, clientCount).Select(i => new Client(url, People[i % People.Length])).ToList();
        try
        {
            await web.StartAsync(cancellationToken);
            await worker.StartAsync(cancellationToken);
            using var stop = CancellationTokenSource.CreateLinkedTokenSource(cancellationToken);
            var work = Task.WhenAll(clients.Select(c => c.WorkAsync(Protocol, stop.Token)));
            var random = new Random(seed);
            var slowest = TimeSpan.Zero;
            for (var round = 0; round < rounds; round++)
            {
                await Task.Delay(random.Next(300, 1500), cancellationToken);
                var (victim, back) = (round % 3) switch
                {
                    0 => ("web server", await RestartAsync(web, cancellationToken)),
                    1 => ("database", await KillDatabaseAsync(folder, url, cancellationToken)),
                    _ => ("worker", await RestartAsync(worker, cancellationToken)),
                };
                slowest = back > slowest ? back : slowest;
                await output.WriteLineAsync(string.Create(CultureInfo.InvariantCulture, $"round {round + 1}: {victim} killed, ready again after {back.TotalSeconds:0.0} s"));
            }

            await stop.CancelAsync();
            await work;
            return await JudgeAsync(clients, folder, slowest, output, cancellationToken);
        }
        finally
        {
            await worker.StopAsync();
            await web.StopAsync();
            foreach (var client in clients)
                client.Dispose();
            Directory.Delete(folder, recursive: true);
        }
    }

    private static async Task<int> JudgeAsync(List<Client> clients, string folder, TimeSpan slowest, TextWriter output, CancellationToken cancellationToken)
    {
        var stored = await clients[0].ListAsync();
        var acknowledged = clients.SelectMany(c => c.Acknowledged).ToList();
        var lost = acknowledged.Count(a => !stored[a.Key].Contains(a.Value));
        var doubled = stored.Count(group => group.Count() > 1);
        Environment.SetEnvironmentVariable("ProtoLedger__DataFolder", folder);
        Environment.SetEnvironmentVariable("ConnectionStrings__ProtoLedger", null);
        var audit = await AuditCommand.Create().Parse([]).InvokeAsync(new InvocationConfiguration { Output = output, Error = output }, cancellationToken);
        await output.WriteLineAsync(string.Create(
            CultureInfo.InvariantCulture,
            $"{acknowledged.Count} acknowledged, {lost} lost, {doubled} twice, {clients.Sum(c => c.Settled)} unknown outcomes settled by their key, slowest return {slowest.TotalSeconds:0.0} s, ledger {(audit == ExitCodes.Good ? "clean" : "NOT CLEAN")}"));
        return lost == 0 && doubled == 0 && acknowledged.Count > 0 && audit == ExitCodes.Good ? ExitCodes.Good : ExitCodes.Bad;
    }

    private static async Task<TimeSpan> RestartAsync(ServerProcess server, CancellationToken cancellationToken)
    {
        server.Kill();
        return await server.StartAsync(cancellationToken);
    }

    /// <summary>Kills the postmaster and its children; the web server starts it again by itself.</summary>
    private static async Task<TimeSpan> KillDatabaseAsync(string folder, string url, CancellationToken cancellationToken)
    {
        PrivateCluster.KillEverything(folder);
        var clock = Stopwatch.StartNew();
        using var http = new HttpClient { BaseAddress = new Uri(url) };
        while (true)
        {
            using var answer = await http.GetAsync(new Uri("/health/ready", UriKind.Relative), cancellationToken);
            if (answer.IsSuccessStatusCode)
                return clock.Elapsed;
            await Task.Delay(50, cancellationToken);
        }
    }

    private static int FreePort()
    {
        using var listener = new TcpListener(IPAddress.Loopback, 0);
        listener.Start();
        return ((IPEndPoint)listener.LocalEndpoint).Port;
    }

    /// <summary>Beside this program, or where the build of the source tree puts it.</summary>
    private static string FindServer()
    {
        var beside = Path.Combine(AppContext.BaseDirectory, "ProtoLedger.Server");
        var configuration = new DirectoryInfo(AppContext.BaseDirectory).Name;
        return File.Exists(beside) ? beside : Path.GetFullPath(Path.Combine(AppContext.BaseDirectory, "..", "..", "ProtoLedger.Server", configuration, "ProtoLedger.Server"));
    }
}
