using System.Diagnostics;

namespace ProtoLedger.Storage.Clusters;

/// <summary>One run of a program of the system.</summary>
/// <param name="ExitCode">0 for success.</param>
/// <param name="Output">What it wrote, both streams.</param>
internal sealed record Command(int ExitCode, string Output)
{
    /// <summary>Runs a program to its end. The environment's locale is neutral so that nothing depends on the machine's language.</summary>
    public static async Task<Command> RunAsync(string program, IEnumerable<string> arguments, CancellationToken cancellationToken)
    {
        var start = new ProcessStartInfo(program, arguments) { RedirectStandardOutput = true, RedirectStandardError = true, WorkingDirectory = "/" };
        start.Environment["LC_ALL"] = "C";
        using var process = Process.Start(start) ?? throw new PrivateClusterException($"{program} did not start.");
        var output = process.StandardOutput.ReadToEndAsync(cancellationToken);
        var error = process.StandardError.ReadToEndAsync(cancellationToken);
        await process.WaitForExitAsync(cancellationToken);
        return new Command(process.ExitCode, await output + await error);
    }
}
