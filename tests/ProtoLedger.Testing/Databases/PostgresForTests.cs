using Npgsql;

namespace ProtoLedger.Testing.Databases;

/// <summary>The PostgreSQL of a test run, one for each test process, found in this order: connection string, container, private cluster.</summary>
internal abstract class PostgresForTests : IAsyncDisposable
{
    private static readonly Lazy<Task<PostgresForTests>> Shared = new(FindAsync);

    /// <summary>Connection string of a superuser or of a role that makes databases and roles.</summary>
    public abstract string AdministratorConnectionString { get; }

    /// <summary>The one of this process; started on first use, stopped when the process ends.</summary>
    public static Task<PostgresForTests> GetAsync() => Shared.Value;

    public abstract ValueTask DisposeAsync();

    /// <summary>The connection string for another database of the same PostgreSQL.</summary>
    public string ConnectionStringFor(string database) =>
        new NpgsqlConnectionStringBuilder(AdministratorConnectionString) { Database = database, MaxPoolSize = 30 }.ConnectionString;

    private static async Task<PostgresForTests> FindAsync()
    {
        PostgresForTests found = Environment.GetEnvironmentVariable("ConnectionStrings__ProtoLedger") is { Length: > 0 } given
            ? new GivenPostgres(given)
            : await ContainerPostgres.TryStartAsync() ?? (PostgresForTests)await ClusterPostgres.StartAsync();
        AppDomain.CurrentDomain.ProcessExit += (_, _) => found.DisposeAsync().AsTask().GetAwaiter().GetResult();
        return found;
    }

    private sealed class GivenPostgres(string connectionString) : PostgresForTests
    {
        public override string AdministratorConnectionString { get; } = connectionString;

        public override ValueTask DisposeAsync() => ValueTask.CompletedTask;
    }
}
