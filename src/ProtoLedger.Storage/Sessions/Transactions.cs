using System.Data;
using System.Diagnostics;
using Npgsql;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Stores;

namespace ProtoLedger.Storage.Sessions;

/// <summary>Transactions on PostgreSQL. What failed before its commit was asked for is safe to run again; a commit without an answer is not, and surfaces.</summary>
internal sealed class Transactions(NpgsqlDataSource source, StatementFaults? faults = null) : ITransactions
{
    /// <summary>Pooled connections break once each after a restart of the database, so a few tries are spent on them.</summary>
    private const int Tries = 4;

    /// <summary>A client is told within a few seconds that the database is away; no try starts later than this.</summary>
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(2);

    public async Task<T> ReadAsync<T>(Func<IStores, Task<T>> work, CancellationToken cancellationToken) =>
        await TryAsync(
            IsolationLevel.RepeatableRead,
            async (stores, _) => (await work(stores), false),
            cancellationToken);

    public async Task<Outcome<T>> WriteAsync<T>(Func<IStores, Task<Outcome<T>>> work, CancellationToken cancellationToken) =>
        await TryAsync(
            IsolationLevel.ReadCommitted,
            async (stores, _) =>
            {
                var outcome = await work(stores);
                return (outcome, outcome.Succeeded);
            },
            cancellationToken);

    private async Task<T> TryAsync<T>(
        IsolationLevel isolation, Func<IStores, CancellationToken, Task<(T Result, bool Commit)>> work, CancellationToken cancellationToken)
    {
        var started = Stopwatch.GetTimestamp();
        for (var attempt = 1; ; attempt++)
        {
            var committing = false;
            try
            {
                await using var connection = await source.OpenConnectionAsync(cancellationToken);
                await using var transaction = await connection.BeginTransactionAsync(isolation, cancellationToken);
                var (result, commit) = await work(new PostgresStores(new Session(connection, transaction, faults)), cancellationToken);
                if (commit)
                {
                    faults?.Count();
                    committing = true;
                    await transaction.CommitAsync(cancellationToken);
                }

                return result;
            }
            catch (NpgsqlException exception) when (IsPassing(exception))
            {
                if (committing || attempt == Tries || Stopwatch.GetElapsedTime(started) > Patience)
                    throw new StoreUnavailableException("The database cannot be reached.", exception);
            }
        }
    }

    /// <summary>
    /// True for a broken or refused connection, for a transaction that the database gave up in favour of another, and for a
    /// database that lacks disk, memory or connections (class 53) or cannot read or write (class 58).
    /// </summary>
    private static bool IsPassing(NpgsqlException exception) =>
        exception is not PostgresException postgres
        || postgres.SqlState is PostgresErrorCodes.AdminShutdown or PostgresErrorCodes.CrashShutdown or PostgresErrorCodes.CannotConnectNow
            or PostgresErrorCodes.DeadlockDetected or PostgresErrorCodes.SerializationFailure
        || postgres.SqlState.StartsWith("53", StringComparison.Ordinal)
        || postgres.SqlState.StartsWith("58", StringComparison.Ordinal);
}
