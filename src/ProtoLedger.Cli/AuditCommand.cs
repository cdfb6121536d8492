using System.CommandLine;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.History;

namespace ProtoLedger.Cli;

/// <summary><c>audit [--checkpoint FILE]</c>: recomputes the ledger from its leaves and compares every table with it.</summary>
internal static class AuditCommand
{
    public static Command Create()
    {
        var checkpoint = new Option<FileInfo?>("--checkpoint") { Description = "A checkpoint that you kept from earlier." };
        var command = new Command("audit", "Recompute the ledger and compare the tables with it. Exit code: 0 clean, 1 a record differs, 2 wrong usage.") { checkpoint };
        command.SetAction((result, cancellationToken) => Installation.RunAsync(
            installation => RunAsync(installation, result.GetValue(checkpoint), result.InvocationConfiguration.Output, result.InvocationConfiguration.Error, cancellationToken),
            result.InvocationConfiguration.Error,
            cancellationToken));
        return command;
    }

    private static async Task<int> RunAsync(Installation installation, FileInfo? checkpoint, TextWriter output, TextWriter error, CancellationToken cancellationToken)
    {
        var outside = checkpoint is null ? null : await File.ReadAllBytesAsync(checkpoint.FullName, cancellationToken);
        var outcome = await installation.Get<AuditLedger>().RunAsync(Caller.System, outside, cancellationToken);
        if (!outcome.Succeeded)
        {
            await error.WriteLineAsync(outcome.Refusal.Detail);
            return ExitCodes.Usage;
        }

        var report = outcome.Value;
        await output.WriteLineAsync(report.Clean ? $"CLEAN: {report.Size} leaves, root {report.Root}" : $"NOT CLEAN: the first record that differs is {report.First!.Record}");
        foreach (var fault in report.Faults)
            await output.WriteLineAsync($"  wrong:   {fault.Words}");
        foreach (var words in report.Holds)
            await output.WriteLineAsync($"  holds:   {words}");
        foreach (var words in report.Unknown)
            await output.WriteLineAsync($"  unknown: {words}");
        return report.Clean ? ExitCodes.Good : ExitCodes.Bad;
    }
}
