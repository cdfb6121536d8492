using System.Diagnostics;
using System.Globalization;

namespace ProtoLedger.Cli.KillTesting;

/// <summary>A server program that is started, killed and started again.</summary>
internal sealed class ServerProcess(string program, string folder, string store, string role, string url) : IDisposable
{
    private Process? process;

    /// <summary>Password of every demo person of the test.</summary>
    public const string Password = "kill-test demonstration";

    /// <summary>Starts it and waits for its line <c>ready</c>.</summary>
    /// <returns>How long that took.</returns>
    public async Task<TimeSpan> StartAsync(CancellationToken cancellationToken)
    {
        var clock = Stopwatch.StartNew();
        var start = new ProcessStartInfo(program, ["--role", role, "--urls", url, "--store", store]) { RedirectStandardOutput = true };
        start.Environment["ProtoLedger__DataFolder"] = folder;
        start.Environment["ProtoLedger__DemoPassword"] = Password;
        start.Environment.Remove("ConnectionStrings__ProtoLedger");
        process = Process.Start(start) ?? throw new InvalidOperationException($"{program} did not start.");
        while (await process.StandardOutput.ReadLineAsync(cancellationToken) is { } line)
        {
            if (!line.StartsWith("ready ", StringComparison.Ordinal))
                continue;
            _ = process.StandardOutput.ReadToEndAsync(CancellationToken.None); // so that a full pipe never stops it
            return clock.Elapsed;
        }

        throw new InvalidOperationException($"The {role} server ended before it was ready.");
    }

    /// <summary>Ends it as a power cut would.</summary>
    public void Kill()
    {
        process?.Kill();
        process?.WaitForExit();
    }

    /// <summary>Asks it to end, and waits until it and what it started are gone.</summary>
    public async Task StopAsync()
    {
        if (process is null or { HasExited: true })
            return;
        using var term = Process.Start("kill", ["-TERM", process.Id.ToString(CultureInfo.InvariantCulture)]);
        await process.WaitForExitAsync();
    }

    public void Dispose() => process?.Dispose();
}
