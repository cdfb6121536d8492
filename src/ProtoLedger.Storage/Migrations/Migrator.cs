using System.Diagnostics.CodeAnalysis;
using System.Reflection;
using DbUp;
using DbUp.Engine;
using DbUp.Engine.Output;
using Npgsql;

namespace ProtoLedger.Storage.Migrations;

/// <summary>Brings a database to the newest schema. Two starters may try at once: an advisory lock lets one work while the other waits.</summary>
public static class Migrator
{
    /// <summary>Any constant will do; it only has to be the same everywhere.</summary>
    private const long AdvisoryLock = 0x70_6c_6d_69_67;

    /// <summary>Applies what is missing, each script in its own transaction.</summary>
    /// <param name="connectionString">Connects as the owner of the database.</param>
    /// <param name="cancellationToken">Stops waiting for the lock.</param>
    /// <returns>Names of the scripts applied now.</returns>
    /// <exception cref="MigrationException">A script failed, was changed after it was applied, or is unknown to this program.</exception>
    public static async Task<IReadOnlyList<string>> MigrateAsync(string connectionString, CancellationToken cancellationToken = default)
    {
        var withoutPool = new NpgsqlConnectionStringBuilder(connectionString) { Pooling = false }.ConnectionString;
        await using var connection = new NpgsqlConnection(withoutPool);
        await connection.OpenAsync(cancellationToken);
        await using (var take = new NpgsqlCommand("SELECT pg_advisory_lock($1)", connection) { CommandTimeout = 0 })
        {
            take.Parameters.Add(new NpgsqlParameter { Value = AdvisoryLock });
            await take.ExecuteNonQueryAsync(cancellationToken);
        }

        // The lock belongs to the connection and goes with it.
        return Apply(withoutPool, Scripts());
    }

    /// <summary>The scripts of this program, in order: name and text.</summary>
    internal static IReadOnlyList<SqlScript> Scripts()
    {
        var assembly = Assembly.GetExecutingAssembly();
        return [.. assembly.GetManifestResourceNames()
            .Where(name => name.StartsWith("migrations/", StringComparison.Ordinal))
            .Order(StringComparer.Ordinal)
            .Select(name => SqlScript.FromStream(name["migrations/".Length..], assembly.GetManifestResourceStream(name)!))];
    }

    /// <summary>Applies the given scripts; they need not be those of this program.</summary>
    internal static IReadOnlyList<string> Apply(string connectionString, IReadOnlyList<SqlScript> scripts)
    {
        var journal = new ChecksumJournal(connectionString);
        journal.Demand(scripts);
        var result = DeployChanges.To
            .PostgresqlDatabase(connectionString)
            .WithScripts(scripts)
            .JournalTo(journal)
            .WithTransactionPerScript()
            .WithVariablesDisabled()
            .LogTo(new NoLog())
            .Build()
            .PerformUpgrade();
        return result.Successful
            ? [.. result.Scripts.Select(script => script.Name)]
            : throw new MigrationException($"Migration {result.ErrorScript?.Name} failed: {result.Error.Message}", result.Error);
    }

    [SuppressMessage("Performance", "CA1812", Justification = "Made above.")]
    private sealed class NoLog : IUpgradeLog
    {
        public void LogTrace(string format, params object[] args)
        {
        }

        public void LogDebug(string format, params object[] args)
        {
        }

        public void LogInformation(string format, params object[] args)
        {
        }

        public void LogWarning(string format, params object[] args)
        {
        }

        public void LogError(string format, params object[] args)
        {
        }

        public void LogError(Exception ex, string format, params object[] args)
        {
        }
    }
}
