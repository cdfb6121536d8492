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
            await app.StartAsync(stop.Token);
            app.Services.GetRequiredService<Readiness>().MarkStarted();
            await Console.Out.WriteLineAsync($"ready {app.Urls.First()}");
            await app.WaitForShutdownAsync(stop.Token);
            return 0;
        }
        catch (OperationCanceledException) when (stop.IsCancellationRequested)
        {
            return 0;
        }
        catch (Exception error) when (error is PrivateClusterException or OptionsValidationException or MigrationException)
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
