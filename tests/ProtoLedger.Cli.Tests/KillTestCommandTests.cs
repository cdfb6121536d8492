using System.CommandLine;

namespace ProtoLedger.Cli.Tests;

/// <summary>Web server, worker and database killed in turn under eight clients: nothing acknowledged is lost.</summary>
public sealed class KillTestCommandTests
{
    [Fact]
    public async Task KillTest_SixRounds_LosesNothing()
    {
        using var output = new StringWriter();
        var exitCode = await CommandTree.Create().Parse(["kill-test", "--rounds", "6"]).InvokeAsync(new InvocationConfiguration { Output = output, Error = output });
        Assert.True(exitCode == 0, output.ToString());
        Assert.Contains(" 0 lost, 0 twice", output.ToString(), StringComparison.Ordinal);
    }
}
