using System.Reflection;
using System.Xml.Linq;

namespace ProtoLedger.Architecture.Tests;

public sealed class ArrowTests
{
    /// <summary>What each project may refer to directly or through another; nothing else.</summary>
    private static readonly Dictionary<string, string[]> Allowed = new()
    {
        ["Physics"] = [],
        ["Ledger"] = [],
        ["Protocols"] = ["Physics"],
        ["Regression"] = ["Protocols", "Physics"],
        ["Reports"] = ["Regression", "Protocols", "Physics"],
        ["Application"] = ["Reports", "Regression", "Protocols", "Physics", "Ledger"],
        ["Storage"] = ["Application", "Reports", "Regression", "Protocols", "Physics", "Ledger"],
        ["Server"] = ["Application", "Storage", "Reports", "Regression", "Protocols", "Physics", "Ledger"],
        ["Cli"] = ["Application", "Storage", "Reports", "Regression", "Protocols", "Physics", "Ledger"],
    };

    public static TheoryData<string> Projects => [.. Allowed.Keys];

    [Fact]
    public void EveryProject_HasItsArrows() =>
        Assert.Equal(Allowed.Keys.Order(), Repository.Projects.Select(p => p["ProtoLedger.".Length..]).Order());

    [Theory]
    [MemberData(nameof(Projects))]
    public void Assembly_RefersOnlyAlongTheArrows(string project)
    {
        var name = project == "Cli" ? "protoledger" : $"ProtoLedger.{project}";
        var referred = Assembly.Load(name).GetReferencedAssemblies()
            .Select(a => a.Name!).Where(n => n.StartsWith("ProtoLedger.", StringComparison.Ordinal)).Select(n => n["ProtoLedger.".Length..]);
        Assert.Empty(referred.Except(Allowed[project]));
    }

    [Theory]
    [MemberData(nameof(Projects))]
    public void ProjectFile_RefersOnlyAlongTheArrows(string project)
    {
        var file = Path.Combine(Repository.Root, "src", $"ProtoLedger.{project}", $"ProtoLedger.{project}.csproj");
        var referred = XDocument.Load(file).Descendants("ProjectReference")
            .Select(r => Path.GetFileNameWithoutExtension(r.Attribute("Include")!.Value)["ProtoLedger.".Length..]);
        Assert.Empty(referred.Except(Allowed[project]));
    }

    [Fact]
    public void PureProjects_UseNoDatabaseAndNoWebLibrary()
    {
        foreach (var project in new[] { "Physics", "Protocols", "Regression", "Reports", "Ledger", "Application" })
        {
            var foreign = Assembly.Load($"ProtoLedger.{project}").GetReferencedAssemblies().Select(a => a.Name!)
                .Where(n => n is "Npgsql" or "Dapper" || n.StartsWith("Microsoft.AspNetCore", StringComparison.Ordinal) || n == "System.Net.Http");
            Assert.Empty(foreign);
        }
    }
}
