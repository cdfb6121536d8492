using System.Diagnostics;
using System.Text.RegularExpressions;
using ProtoLedger.Testing.Servers;

namespace ProtoLedger.Server.Tests.Documentation;

/// <summary>docs/walkthrough.md does what it says: its own blocks are run one after the other in one shell.</summary>
public sealed partial class WalkthroughTests(DemoServerFixture server) : IClassFixture<DemoServerFixture>
{
    [Fact]
    public async Task EveryBlockOfThePage_Succeeds()
    {
        var blocks = Block().Matches(await File.ReadAllTextAsync(Page())).Select(m => m.Groups[1].Value).ToList();
        Assert.True(blocks.Count > 10);
        var script = Path.GetTempFileName();
        await File.WriteAllTextAsync(script, "set -euo pipefail\n" + string.Join('\n', blocks));
        var start = new ProcessStartInfo("bash", ["-x", script]) { RedirectStandardOutput = true, RedirectStandardError = true };
        start.Environment["SERVER"] = server.Anonymous.BaseAddress!.ToString().TrimEnd('/');
        start.Environment["PASSWORD"] = ServerFixture.Password;
        start.Environment["PASSPHRASE"] = ServerFixture.Passphrase;
        using var process = Process.Start(start)!;
        var error = process.StandardError.ReadToEndAsync();
        var output = await process.StandardOutput.ReadToEndAsync();
        await process.WaitForExitAsync();
        File.Delete(script);
        var trace = await error;
        Assert.True(process.ExitCode == 0, $"{output}\n{trace[^Math.Min(3000, trace.Length)..]}");
    }

    private static string Page() => SourceTree.Of("docs", "walkthrough.md");

    [GeneratedRegex("```bash\n(.*?)```", RegexOptions.Singleline)]
    private static partial Regex Block();
}
