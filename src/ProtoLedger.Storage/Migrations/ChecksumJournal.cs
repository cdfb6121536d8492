using System.Data;
using System.Security.Cryptography;
using System.Text;
using DbUp.Engine;
using Npgsql;

namespace ProtoLedger.Storage.Migrations;

/// <summary>Remembers which scripts were applied, each with the hash of its text, so that a merged script that was changed is refused.</summary>
internal sealed class ChecksumJournal(string connectionString) : IJournal
{
    private const string Create = """
        CREATE TABLE IF NOT EXISTS schema_script (
            name text NOT NULL,
            sha256 bytea NOT NULL,
            applied_at timestamptz NOT NULL DEFAULT now(),
            CONSTRAINT pk_schema_script PRIMARY KEY (name)
        )
        """;

    /// <summary>Refuses a database that was migrated by changed or unknown scripts.</summary>
    public void Demand(IReadOnlyList<SqlScript> scripts)
    {
        var known = scripts.ToDictionary(script => script.Name, Hash, StringComparer.Ordinal);
        foreach (var (name, applied) in Applied())
        {
            if (!known.TryGetValue(name, out var hash))
                throw new MigrationException($"The database was migrated by a newer program: {name} is unknown to this one.");
            if (!hash.AsSpan().SequenceEqual(applied))
                throw new MigrationException($"Migration {name} was changed after it was applied: its SHA-256 is {Hex(hash)}, applied was {Hex(applied)}.");
        }
    }

    public string[] GetExecutedScripts() => [.. Applied().Select(row => row.Name)];

    public void StoreExecutedScript(SqlScript script, Func<IDbCommand> dbCommandFactory)
    {
        using var command = dbCommandFactory();
        command.CommandText = "INSERT INTO schema_script (name, sha256) VALUES (@name, @sha256)";
        command.Parameters.Add(new NpgsqlParameter("name", script.Name));
        command.Parameters.Add(new NpgsqlParameter("sha256", Hash(script)));
        command.ExecuteNonQuery();
    }

    public void EnsureTableExistsAndIsLatestVersion(Func<IDbCommand> dbCommandFactory)
    {
        using var command = dbCommandFactory();
        command.CommandText = Create;
        command.ExecuteNonQuery();
    }

    private static byte[] Hash(SqlScript script) => SHA256.HashData(Encoding.UTF8.GetBytes(script.Contents));

    private static string Hex(byte[] hash) => Convert.ToHexStringLower(hash);

    private List<(string Name, byte[] Sha256)> Applied()
    {
        using var connection = new NpgsqlConnection(connectionString);
        connection.Open();
        using (var create = new NpgsqlCommand(Create, connection))
            create.ExecuteNonQuery();
        using var command = new NpgsqlCommand("SELECT name, sha256 FROM schema_script ORDER BY name", connection);
        using var reader = command.ExecuteReader();
        var rows = new List<(string, byte[])>();
        while (reader.Read())
            rows.Add((reader.GetString(0), reader.GetFieldValue<byte[]>(1)));
        return rows;
    }
}
