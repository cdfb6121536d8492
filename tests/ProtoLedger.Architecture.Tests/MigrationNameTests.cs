using System.Globalization;
using System.Text.RegularExpressions;

namespace ProtoLedger.Architecture.Tests;

public sealed partial class MigrationNameTests
{
    private static List<string> Scripts =>
        [.. Directory.EnumerateFiles(Path.Combine(Repository.Root, "migrations")).Select(f => Path.GetFileName(f)!).Order(StringComparer.Ordinal)];

    [Fact]
    public void Migrations_AreNumberedWithoutGap()
    {
        var numbers = Scripts.Select(name => int.Parse(name[..4], CultureInfo.InvariantCulture)).ToList();
        Assert.NotEmpty(numbers);
        Assert.Equal(Enumerable.Range(1, numbers.Count), numbers);
    }

    [Fact]
    public void Migrations_AreNamedVerbFirst() => Assert.All(Scripts, name => Assert.Matches(Name(), name));

    [Fact]
    public void Migrations_SayWhyInTheFirstLine() =>
        Assert.All(Scripts, name => Assert.StartsWith("-- ", File.ReadLines(Path.Combine(Repository.Root, "migrations", name)).First(), StringComparison.Ordinal));

    [GeneratedRegex(@"^\d{4}_(create|add|change|drop|rename|split|move|grant|revoke|index|fill|widen|allow|keep|partition|record)_[a-z0-9_]+\.sql$")]
    private static partial Regex Name();
}
