using ProtoLedger.Server;
using ProtoLedger.Server.Features.Documentation;

namespace ProtoLedger.Architecture.Tests;

public sealed class ProblemPageTests
{
    private static string Folder => Path.Combine(Repository.Root, "docs", "problems");

    [Fact]
    public void EveryProblem_HasItsPageAndEveryPageItsProblem()
    {
        var problems = Problems.All.Select(p => p.Name).Order().ToList();
        Assert.True(problems.Count > 15);
        Assert.Equal(problems, Directory.EnumerateFiles(Folder, "*.md").Select(f => Path.GetFileNameWithoutExtension(f)).Order());
        Assert.Equal(problems, ProblemPages.Names.Order());
    }

    [Fact]
    public void EveryPage_NamesTypeStatusAndTitle()
    {
        foreach (var problem in Problems.All)
        {
            var page = File.ReadAllText(Path.Combine(Folder, problem.Name + ".md"));
            Assert.StartsWith($"# {problem.Title}\n", page, StringComparison.Ordinal);
            Assert.Contains($"Type `{problem.Uri}`, status {problem.Status}.", page, StringComparison.Ordinal);
        }
    }

    [Fact]
    public void Problems_AreMadeInOnePlace()
    {
        var elsewhere = Repository.SourcesOf("ProtoLedger.Server")
            .Where(file => Path.GetFileName(file) is not ("Problems.cs" or "Problem.cs"))
            .Where(file => File.ReadAllText(file) is var text
                && (text.Contains("new Problem(", StringComparison.Ordinal) || text.Contains("new ProblemType(", StringComparison.Ordinal)
                    || text.Contains("TypedResults.Problem", StringComparison.Ordinal) || text.Contains("Results.Problem", StringComparison.Ordinal)))
            .Select(Repository.Relative);
        Assert.Empty(elsewhere);
    }
}
