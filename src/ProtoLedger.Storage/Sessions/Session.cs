using Dapper;
using Npgsql;

namespace ProtoLedger.Storage.Sessions;

/// <summary>One transaction on one connection; every statement of the stores goes through here.</summary>
internal sealed class Session(NpgsqlConnection connection, NpgsqlTransaction transaction, StatementFaults? faults)
{
    /// <summary>The connection, for binary copy.</summary>
    public NpgsqlConnection Connection
    {
        get
        {
            faults?.Count();
            return connection;
        }
    }

    /// <summary>Runs a statement; gives the rows it touched.</summary>
    public Task<int> ExecuteAsync(string sql, object? arguments, CancellationToken cancellationToken) =>
        connection.ExecuteAsync(Command(sql, arguments, cancellationToken));

    /// <summary>Rows.</summary>
    public async Task<IReadOnlyList<T>> QueryAsync<T>(string sql, object? arguments, CancellationToken cancellationToken) =>
        (await connection.QueryAsync<T>(Command(sql, arguments, cancellationToken))).AsList();

    /// <summary>The one row, or the default.</summary>
    public Task<T?> FindAsync<T>(string sql, object? arguments, CancellationToken cancellationToken) =>
        connection.QuerySingleOrDefaultAsync<T>(Command(sql, arguments, cancellationToken));

    /// <summary>The one value.</summary>
    public Task<T> ValueAsync<T>(string sql, object? arguments, CancellationToken cancellationToken) =>
        connection.QuerySingleAsync<T>(Command(sql, arguments, cancellationToken));

    private CommandDefinition Command(string sql, object? arguments, CancellationToken cancellationToken)
    {
        faults?.Count();
        return new CommandDefinition(sql, arguments, transaction, cancellationToken: cancellationToken);
    }
}
