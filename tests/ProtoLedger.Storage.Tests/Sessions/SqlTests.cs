using System.Text.RegularExpressions;
using Npgsql;
using ProtoLedger.Storage.Sessions;
using ProtoLedger.Testing.Databases;

namespace ProtoLedger.Storage.Tests.Sessions;

public sealed partial class SqlTests(DatabaseFixture database) : IClassFixture<DatabaseFixture>
{
    public static IEnumerable<TheoryDataRow<string>> Statements() => SqlFolder.All().Select(statement => new TheoryDataRow<string>(statement.Name));

    [Theory]
    [MemberData(nameof(Statements))]
    public async Task Statement_AgainstTheMigratedDatabase_IsPrepared(string name)
    {
        var text = SqlFolder.All().Single(statement => statement.Name == name).Text;
        await using var connection = await database.Source.OpenConnectionAsync();
        if (text.StartsWith("COPY", StringComparison.Ordinal))
        {
            await using var writer = await connection.BeginBinaryImportAsync(text);
            return;
        }

        var names = new List<string>();
        var numbered = Parameter().Replace(text, match =>
        {
            if (!names.Contains(match.Value))
                names.Add(match.Value);
            return "$" + (names.IndexOf(match.Value) + 1);
        });
#pragma warning disable CA2100 // The text is this project's own file.
        await using var prepare = new NpgsqlCommand($"PREPARE statement AS {numbered}", connection) { AllResultTypesAreUnknown = true };
#pragma warning restore CA2100
        await prepare.ExecuteNonQueryAsync();
        await using var count = new NpgsqlCommand("SELECT count(*) FROM pg_prepared_statements WHERE name = 'statement'", connection);
        Assert.Equal(1L, await count.ExecuteScalarAsync());
    }

    [GeneratedRegex(@"(?<![@<])@[a-zA-Z]\w*")]
    private static partial Regex Parameter();
}
