using System.Diagnostics.CodeAnalysis;
using Npgsql;
using ProtoLedger.Storage.Migrations;
using Xunit;

namespace ProtoLedger.Testing.Databases;

/// <summary>A database of one test class, migrated and otherwise empty; taken as a class fixture.</summary>
/// <remarks>It is cloned from a template that is migrated once for each test process, and dropped at the end.</remarks>
public class DatabaseFixture : IAsyncLifetime
{
    private static readonly Lazy<Task<string>> Template = new(MakeTemplateAsync);
    private static readonly SemaphoreSlim OneClone = new(1);
    private PostgresForTests? postgres;
    private string name = "";

    /// <summary>How to reach the database as its owner.</summary>
    public string ConnectionString { get; private set; } = "";

    /// <summary>Connections to the database as its owner.</summary>
    [AllowNull]
    public NpgsqlDataSource Source { get; private set; }

    /// <summary>Makes a further empty database without tables, for tests of the migrations themselves.</summary>
    /// <returns>Its connection string; it is not dropped before the cluster goes.</returns>
    public static async Task<string> CreateEmptyAsync()
    {
        var postgres = await PostgresForTests.GetAsync();
        var name = UniqueName();
        await RunAsync(postgres, $"CREATE DATABASE {name} TEMPLATE template0");
        return postgres.ConnectionStringFor(name);
    }

    /// <inheritdoc/>
    public virtual async ValueTask InitializeAsync()
    {
        var template = await Template.Value;
        postgres = await PostgresForTests.GetAsync();
        name = UniqueName();
        await OneClone.WaitAsync();
        try
        {
            await RunAsync(postgres, $"CREATE DATABASE {name} TEMPLATE {template}");
        }
        finally
        {
            OneClone.Release();
        }

        ConnectionString = postgres.ConnectionStringFor(name);
        Source = NpgsqlDataSource.Create(ConnectionString);
    }

    /// <inheritdoc/>
    public virtual async ValueTask DisposeAsync()
    {
        GC.SuppressFinalize(this);
        if (postgres is null)
            return;
        await Source.DisposeAsync();
        await RunAsync(postgres, $"DROP DATABASE IF EXISTS {name} WITH (FORCE)");
    }

    private static async Task<string> MakeTemplateAsync()
    {
        var postgres = await PostgresForTests.GetAsync();
        var name = UniqueName();
        await RunAsync(postgres, $"CREATE DATABASE {name} TEMPLATE template0");
        await Migrator.MigrateAsync(postgres.ConnectionStringFor(name));
        NpgsqlConnection.ClearAllPools();
        return name;
    }

    private static string UniqueName() => "test_" + Guid.NewGuid().ToString("N");

    [SuppressMessage("Security", "CA2100", Justification = "The names are made here.")]
    private static async Task RunAsync(PostgresForTests postgres, string statement)
    {
        await using var connection = new NpgsqlConnection(postgres.AdministratorConnectionString + ";Pooling=false");
        await connection.OpenAsync();
        await using var command = new NpgsqlCommand(statement, connection);
        await command.ExecuteNonQueryAsync();
    }
}
