using System.Runtime.InteropServices;
using Microsoft.Extensions.Options;
using ProtoLedger.Storage.Clusters;
using ProtoLedger.Storage.Migrations;

namespace ProtoLedger.Server.Hosting;

/// <summary>From the command line to the end of the process.</summary>
internal static class ServerProgram
{
    public static async Task<int> RunAsync(string[] args)
    {
        using var stop = new CancellationTokenSource();
        using var terminate = PosixSignalRegistration.Create(PosixSignal.SIGTERM, OnSignal);
        using var interrupt = PosixSignalRegistration.Create(PosixSignal.SIGINT, OnSignal);
        try
        {
            var builder = ServerApplication.CreateBuilder(args);
            var options = ServerApplication.ReadOptions(builder);
            await using var database = await DatabaseAccess.OpenAsync(builder.Configuration, options, stop.Token);
            await Migrator.MigrateAsync(database.ConnectionString, stop.Token);
            await using var app = ServerApplication.Build(builder, options, database);
            var start = app.Services.GetRequiredService<FirstStart>();
            var signIn = await start.FillAsync(stop.Token);
            await app.StartAsync(stop.Token);
            if (options.Works)
                await start.FinishRunsAsync(stop.Token);
            app.Services.GetRequiredService<Readiness>().MarkStarted();
            foreach (var line in options.ServesWeb ? signIn : [])
                await Console.Out.WriteLineAsync(line);
            await Console.Out.WriteLineAsync($"ready {app.Urls.First()}");
            await app.WaitForShutdownAsync(stop.Token);
            return 0;
        }
        catch (OperationCanceledException) when (stop.IsCancellationRequested)
        {
            return 0;
        }
        catch (Exception error) when (error is PrivateClusterException or OptionsValidationException or MigrationException or StartupException or InvalidDataException)
        {
            await Console.Error.WriteLineAsync(error.Message);
            return 1;
        }

        void OnSignal(PosixSignalContext context)
        {
            context.Cancel = true;
            stop.Cancel();
        }
    }
}
