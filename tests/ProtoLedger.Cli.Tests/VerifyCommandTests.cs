using System.CommandLine;

namespace ProtoLedger.Cli.Tests;

public sealed class VerifyCommandTests
{
    [Fact]
    public void Verify_SomethingElse_IsBadAndSaysSo()
    {
        var file = Path.GetTempFileName();
        File.WriteAllText(file, "this is no bundle");
        var (exitCode, output, _) = Run("verify", file);
        File.Delete(file);
        Assert.Equal(1, exitCode);
        Assert.StartsWith("BAD", output, StringComparison.Ordinal);
    }

    [Fact]
    public void Verify_MissingFile_IsWrongUsage()
    {
        var (exitCode, _, error) = Run("verify", "/nowhere/bundle.zip");
        Assert.Equal(2, exitCode);
        Assert.Contains("/nowhere", error, StringComparison.Ordinal);
    }

    [Fact]
    public void Qualify_FamilyThatIsNotBuilt_Returns2AndSaysSo()
    {
        var file = Path.GetTempFileName();
        File.WriteAllText(file, """{"family":"tagging","cases":[]}""");
        var (exitCode, output, _) = Run("qualify", file);
        File.Delete(file);
        Assert.Equal(2, exitCode);
        Assert.Contains("not built", output, StringComparison.Ordinal);
    }

    [Fact]
    public void Qualify_WithExpectedNumbersThatAreWrong_Returns1()
    {
        // Closed form with TR ≫ T1: exp(−TE / T2) = exp(−0.8) = 0.449328964…; the file expects 0.5.
        var file = Path.GetTempFileName();
        File.WriteAllText(
            file,
            """{"family":"spin_echo","cases":[{"id":"a","inputs":{"T1_ms":800,"T2_ms":100,"TR_ms":100000,"TE_ms":80,"flip_deg":90,"refocus_deg":180,"B1":1.0},"expected":{"signal":0.5},"tolerance":{"absolute":1e-6}}]}""");
        var (exitCode, output, _) = Run("qualify", "--json", file);
        File.Delete(file);
        Assert.Equal(1, exitCode);
        Assert.Contains("\"cases\"", output, StringComparison.Ordinal);
    }

    private static (int ExitCode, string Output, string Error) Run(params string[] args)
    {
        using var output = new StringWriter();
        using var error = new StringWriter();
        var exitCode = CommandTree.Create().Parse(args).Invoke(new InvocationConfiguration { Output = output, Error = error });
        return (exitCode, output.ToString(), error.ToString());
    }
}
