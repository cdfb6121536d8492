using ProtoLedger.Application.Runs;

namespace ProtoLedger.Server.Hosting;

/// <summary>Carries out regression runs in this process.</summary>
internal sealed class RunService(RunWorker worker, ServerOptions options) : BackgroundService
{
    protected override Task ExecuteAsync(CancellationToken stoppingToken) => worker.RunAsync(options.Workers, stoppingToken);
}
