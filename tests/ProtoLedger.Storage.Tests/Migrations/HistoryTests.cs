using Npgsql;
using ProtoLedger.Storage.Sessions;
using ProtoLedger.Testing.Databases;

namespace ProtoLedger.Storage.Tests.Migrations;

/// <summary>What the program's own role may not do, table by table as the catalogue lists them.</summary>
public sealed class HistoryTests(DatabaseFixture database) : IClassFixture<DatabaseFixture>
{
    /// <summary>The few tables that change in place; every other one is history.</summary>
    private static readonly string[] Working = ["account", "change_request", "run", "run_job", "token"];

    [Theory]
    [InlineData("UPDATE {0} SET {1} = {1}")]
    [InlineData("DELETE FROM {0}")]
    [InlineData("TRUNCATE {0}")]
    public async Task HistoryTable_ChangedByTheApplicationRole_IsPermissionDenied(string statement)
    {
        await using var source = PostgresSource.Create(database.ConnectionString);
        await using var connection = await source.OpenConnectionAsync();
        var tables = await TablesAsync(connection);
        Assert.Contains("ledger_leaf", tables.Keys);
        Assert.True(tables.Count >= 17, $"Only {tables.Count} tables were found.");
        foreach (var (table, column) in tables.Where(table => !Working.Contains(table.Key)))
        {
            var error = await Assert.ThrowsAsync<PostgresException>(() => RunAsync(connection, string.Format(System.Globalization.CultureInfo.InvariantCulture, statement, table, column)));
            Assert.True(error.SqlState == PostgresErrorCodes.InsufficientPrivilege, $"{table}: {error.Message}");
        }
    }

    [Theory]
    [InlineData("DELETE FROM {0}")]
    [InlineData("TRUNCATE {0}")]
    public async Task WorkingTable_EmptiedByTheApplicationRole_IsPermissionDenied(string statement)
    {
        await using var source = PostgresSource.Create(database.ConnectionString);
        await using var connection = await source.OpenConnectionAsync();
        foreach (var table in Working)
        {
            var error = await Assert.ThrowsAsync<PostgresException>(() => RunAsync(connection, string.Format(System.Globalization.CultureInfo.InvariantCulture, statement, table)));
            Assert.Equal(PostgresErrorCodes.InsufficientPrivilege, error.SqlState);
        }
    }

    [Fact]
    public async Task ApplicationRole_AfterItsConnectionWentBackToThePool_IsStillTheRole()
    {
        await using var source = PostgresSource.Create(database.ConnectionString);
        for (var i = 0; i < 2; i++)
        {
            await using var connection = await source.OpenConnectionAsync();
            await using var command = new NpgsqlCommand("SELECT current_user::text", connection);
            Assert.Equal(PostgresSource.Role, await command.ExecuteScalarAsync());
        }
    }

    [Fact]
    public async Task ResultPartition_MadeForARun_CannotBeChangedEither()
    {
        await using var source = PostgresSource.Create(database.ConnectionString);
        await using var connection = await source.OpenConnectionAsync();
        await RunAsync(connection, "SELECT ensure_run_result_partition(130)");
        var error = await Assert.ThrowsAsync<PostgresException>(() => RunAsync(connection, "DELETE FROM run_result_128"));
        Assert.Equal(PostgresErrorCodes.InsufficientPrivilege, error.SqlState);
    }

    private static async Task<Dictionary<string, string>> TablesAsync(NpgsqlConnection connection)
    {
        const string Query = """
            SELECT c.relname, (SELECT a.attname FROM pg_attribute a WHERE a.attrelid = c.oid AND a.attnum > 0 AND a.attgenerated = '' AND a.attidentity = '' LIMIT 1)
            FROM pg_class c JOIN pg_namespace n ON n.oid = c.relnamespace
            WHERE n.nspname = 'public' AND c.relkind IN ('r', 'p') AND c.relname NOT LIKE 'run\_result\_%'
            """;
        await using var command = new NpgsqlCommand(Query, connection);
        await using var reader = await command.ExecuteReaderAsync();
        var tables = new Dictionary<string, string>();
        while (await reader.ReadAsync())
            tables.Add(reader.GetString(0), reader.GetString(1));
        return tables;
    }

    private static async Task RunAsync(NpgsqlConnection connection, string statement)
    {
#pragma warning disable CA2100 // The names come from the catalogue.
        await using var command = new NpgsqlCommand(statement, connection);
#pragma warning restore CA2100
        await command.ExecuteNonQueryAsync();
    }
}
