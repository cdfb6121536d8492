using System.CommandLine;

namespace ProtoLedger.Cli.Tests;

/// <summary>The table of deviations in docs/physics.md is what the command prints.</summary>
public sealed class PhysicsTableTests
{
    [Fact]
    public void Table_InTheDocumentation_IsTheOutputOfTheCommand()
    {
        var root = SourceTree.Root;
        var vectors = Path.Combine(root, "tests", "ProtoLedger.Physics.Tests", "Qualification", "Reference");
        string[] files = [.. Directory.GetFiles(vectors, "*.json").Order(StringComparer.Ordinal)];
        using var output = new StringWriter { NewLine = "\n" };

        var exitCode = QualifyCommand.Create().Parse(["--table", .. files]).Invoke(new InvocationConfiguration { Output = output });

        var page = File.ReadAllText(Path.Combine(root, "docs", "physics.md"));
        const string Begin = "<!-- deviations: begin -->\n", End = "<!-- deviations: end -->";
        var start = page.IndexOf(Begin, StringComparison.Ordinal) + Begin.Length;
        Assert.Equal(0, exitCode);
        Assert.Equal(page[start..page.IndexOf(End, StringComparison.Ordinal)], output.ToString());
    }
}
