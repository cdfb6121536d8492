using System.Text.RegularExpressions;

namespace ProtoLedger.Architecture.Tests;

/// <summary>The page on electronic-record rules names only tests that exist, and every row says how it is shown.</summary>
public sealed partial class CompliancePageTests
{
    private static string Page => File.ReadAllText(Path.Combine(Repository.Root, "docs", "compliance.md"));

    [Fact]
    public void EveryTestNamedOnThePage_Exists()
    {
        var sources = string.Concat(Directory.EnumerateFiles(Path.Combine(Repository.Root, "tests"), "*Tests.cs", SearchOption.AllDirectories)
            .Where(f => !f.Contains($"{Path.DirectorySeparatorChar}artifacts{Path.DirectorySeparatorChar}", StringComparison.Ordinal))
            .Select(File.ReadAllText));
        var names = TestName().Matches(Page).Select(m => m.Groups[1].Value).Distinct().ToList();
        Assert.True(names.Count > 30, $"{names.Count} tests named");
        Assert.All(names, name => Assert.Contains($" {name}(", sources, StringComparison.Ordinal));
    }

    [Fact]
    public void EveryRule_HasARowThatSaysHowItIsShown()
    {
        var rows = Page.Split('\n').Where(line => line.StartsWith("| R", StringComparison.Ordinal)).ToList();
        Assert.Equal(Enumerable.Range(1, 22).Select(i => $"R{i}"), rows.Select(r => r.Split('|')[1].Trim()));
        Assert.All(rows, row => Assert.True(TestName().IsMatch(row) || row.Contains("organisational", StringComparison.Ordinal), row));
    }

    [GeneratedRegex("`([A-Z][A-Za-z0-9]*_[A-Za-z0-9_]+)`")]
    private static partial Regex TestName();
}
