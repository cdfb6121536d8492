using Npgsql;

namespace ProtoLedger.Storage.Sessions;

/// <summary>Connections of the program at work: in the application role, in UTC, with dead peers noticed.</summary>
internal static class PostgresSource
{
    internal const string Role = "protoledger_application";

    /// <summary>A pool for the given database.</summary>
    /// <param name="connectionString">Connects as the owner or as a member of the application role.</param>
    public static NpgsqlDataSource Create(string connectionString)
    {
        var builder = new NpgsqlConnectionStringBuilder(connectionString)
        {
            ApplicationName = "protoledger",
            Timezone = "UTC",
            KeepAlive = 15,
            Timeout = 5,
        };

        // As a start-up option the role also outlives the reset of a connection that goes back to the pool.
        builder.Options = $"{builder.Options} -c role={Role}".Trim();
        return NpgsqlDataSource.Create(builder.ConnectionString);
    }
}
