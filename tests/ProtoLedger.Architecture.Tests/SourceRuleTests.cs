using System.Text.RegularExpressions;

namespace ProtoLedger.Architecture.Tests;

public sealed partial class SourceRuleTests
{
    private static readonly string[] Pure = ["ProtoLedger.Physics", "ProtoLedger.Protocols", "ProtoLedger.Regression", "ProtoLedger.Reports", "ProtoLedger.Ledger"];

    public static TheoryData<string> PureProjects => [.. Pure];

    [Fact]
    public void Sql_StandsOnlyInStorage()
    {
        var found = Repository.Projects.Where(p => p != "ProtoLedger.Storage")
            .SelectMany(Repository.SourcesOf)
            .Where(file => SqlStatement().IsMatch(WithoutComments(File.ReadAllText(file))))
            .Select(Repository.Relative);
        Assert.Empty(found);
    }

    [Fact]
    public void SqlStatement_IsRecognised()
    {
        Assert.Matches(SqlStatement(), "var x = \"SELECT name FROM account\";");
        Assert.Matches(SqlStatement(), "\"\"\"\nUPDATE account\nSET disabled = true\n\"\"\"");
        Assert.DoesNotMatch(SqlStatement(), "/// Select the file from the list");
    }

    [Theory]
    [MemberData(nameof(PureProjects))]
    public void PureProject_UsesNoClockFileNetworkOrUnseededChance(string project)
    {
        var found = Repository.SourcesOf(project)
            .SelectMany(file => Impure().Matches(WithoutComments(File.ReadAllText(file))).Select(m => $"{Repository.Relative(file)}: {m.Value}"))
            .Where(use => !IsKeyMaterial(use));
        Assert.Empty(found);
    }

    [Fact]
    public void Clock_IsReadThroughTimeProviderAlone()
    {
        var found = new[] { "ProtoLedger.Application", "ProtoLedger.Storage" }
            .SelectMany(Repository.SourcesOf)
            .SelectMany(file => ClockUse().Matches(WithoutComments(File.ReadAllText(file))).Select(m => $"{Repository.Relative(file)}: {m.Value}"));
        Assert.Empty(found);
    }

    [Fact]
    public void Dapper_LiteralReplacement_IsNotUsed()
    {
        var files = Repository.SourcesOf("ProtoLedger.Storage")
            .Concat(Directory.EnumerateFiles(Path.Combine(Repository.Root, "src", "ProtoLedger.Storage"), "*.sql", SearchOption.AllDirectories));
        Assert.Empty(files.Where(file => LiteralReplacement().IsMatch(File.ReadAllText(file))).Select(Repository.Relative));
    }

    [Fact]
    public void Sources_LeaveNothingUnfinished()
    {
        var found = Repository.Projects.SelectMany(Repository.SourcesOf)
            .Where(file => Unfinished().IsMatch(File.ReadAllText(file))).Select(Repository.Relative);
        Assert.Empty(found);
    }

    /// <summary>Keys, salts and serial numbers must be unpredictable; everything else that is drawn has a seed.</summary>
    private static bool IsKeyMaterial(string use) =>
        use.Contains("RandomNumberGenerator", StringComparison.Ordinal)
        && (use.Contains("/Signatures/", StringComparison.Ordinal) || use.Contains("/Checkpoints/", StringComparison.Ordinal));

    private static string WithoutComments(string source) => Comment().Replace(source, "");

    [GeneratedRegex(@"//[^\n]*")]
    private static partial Regex Comment();

    [GeneratedRegex("\"[^\"]*\\b(SELECT\\s[^\"]+\\sFROM|INSERT\\s+INTO|UPDATE\\s+\\w+\\s+SET|DELETE\\s+FROM|CREATE\\s+(TABLE|DATABASE|ROLE)|ALTER\\s+TABLE)\\s", RegexOptions.Singleline)]
    private static partial Regex SqlStatement();

    [GeneratedRegex(@"\b(DateTime(Offset)?\.(Utc)?Now|DateTime\.Today|Stopwatch|Environment\.TickCount\w*|File\.\w+|Directory\.\w+|FileStream|HttpClient|Socket\b|Random\.Shared|new Random\(\)|RandomNumberGenerator\.\w+|Guid\.NewGuid|Environment\.GetEnvironmentVariable)")]
    private static partial Regex Impure();

    [GeneratedRegex(@"\b(DateTime(Offset)?\.(Utc)?Now|DateTime\.Today)\b")]
    private static partial Regex ClockUse();

    [GeneratedRegex(@"\{=\w+\}")]
    private static partial Regex LiteralReplacement();

    [GeneratedRegex(@"\b(TO" + @"DO|FIX" + @"ME|NotImplemented" + @"Exception)\b")]
    private static partial Regex Unfinished();
}
