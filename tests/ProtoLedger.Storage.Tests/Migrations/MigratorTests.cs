using DbUp.Engine;
using Npgsql;
using ProtoLedger.Storage.Migrations;
using ProtoLedger.Testing.Databases;

namespace ProtoLedger.Storage.Tests.Migrations;

public sealed class MigratorTests
{
    [Fact]
    public async Task Migrate_TwoStartersAtOnce_EachScriptIsAppliedOnce()
    {
        var database = await DatabaseFixture.CreateEmptyAsync();
        var applied = await Task.WhenAll(Enumerable.Range(0, 4).Select(_ => Task.Run(() => Migrator.MigrateAsync(database))));
        Assert.Equal(Migrator.Scripts().Select(script => script.Name), applied.SelectMany(names => names).Order());
    }

    [Fact]
    public async Task Migrate_ScriptChangedAfterItWasApplied_IsRefusedByName()
    {
        var database = await DatabaseFixture.CreateEmptyAsync();
        await Migrator.MigrateAsync(database);
        SqlScript[] changed = [.. Migrator.Scripts().Select((script, i) => i == 2 ? new SqlScript(script.Name, script.Contents + " ") : script)];
        var refused = Assert.Throws<MigrationException>(() => Migrator.Apply(database, changed));
        Assert.Contains("0003_create_facts.sql was changed after it was applied", refused.Message, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Migrate_DatabaseOfANewerProgram_IsRefusedByName()
    {
        var database = await DatabaseFixture.CreateEmptyAsync();
        Migrator.Apply(database, [.. Migrator.Scripts(), new SqlScript("9999_add_future.sql", "CREATE TABLE future (id integer)")]);
        var refused = await Assert.ThrowsAsync<MigrationException>(() => Migrator.MigrateAsync(database));
        Assert.Contains("9999_add_future.sql is unknown", refused.Message, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Migrate_ScriptThatFails_LeavesNothingOfItself()
    {
        var database = await DatabaseFixture.CreateEmptyAsync();
        Assert.Throws<MigrationException>(() => Migrator.Apply(database, [new SqlScript("0001_bad.sql", "CREATE TABLE half (id integer); SELECT 1 / 0;")]));
        await using var source = NpgsqlDataSource.Create(database);
        await using var command = source.CreateCommand("SELECT to_regclass('half') IS NULL AND NOT EXISTS (SELECT FROM schema_script)");
        Assert.Equal(true, await command.ExecuteScalarAsync());
    }

    [Fact]
    public void Scripts_Names_AreNumberedWithoutAGap()
    {
        var names = Migrator.Scripts().Select(script => script.Name).ToList();
        Assert.Equal(Enumerable.Range(1, names.Count).Select(i => $"{i:0000}"), names.Select(name => name[..4]));
        Assert.All(names, name => Assert.Matches(@"^\d{4}_(add|create|drop|change)_[a-z_]+\.sql$", name));
    }

    [Fact]
    public void Scripts_FirstLine_SaysWhy() =>
        Assert.All(Migrator.Scripts(), script => Assert.Matches("^-- [A-Z].{20,}", script.Contents.Split('\n')[0]));

    [Fact]
    public async Task Schema_Constraints_AreNamedByTheirKind()
    {
        var database = await DatabaseFixture.CreateEmptyAsync();
        await Migrator.MigrateAsync(database);
        await using var source = NpgsqlDataSource.Create(database);
        await using var command = source.CreateCommand("""
            SELECT conname FROM pg_constraint JOIN pg_class ON pg_class.oid = conrelid JOIN pg_namespace ON pg_namespace.oid = relnamespace
            WHERE nspname = 'public' AND conname !~ CASE contype WHEN 'p' THEN '^pk_' WHEN 'f' THEN '^fk_' WHEN 'u' THEN '^uq_' WHEN 'c' THEN '^ck_' ELSE '' END
            UNION ALL
            SELECT indexrelname FROM pg_stat_user_indexes WHERE indexrelname !~ '^(pk|uq|ix)_'
            """);
        await using var reader = await command.ExecuteReaderAsync();
        Assert.False(await reader.ReadAsync(), reader.HasRows ? reader.GetString(0) : "");
    }
}
