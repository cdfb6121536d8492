using Npgsql;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Storage.Sessions;

/// <summary>Waits for the notification that a job was queued. It is a wake-up only: a lost one costs a waiting time, never a job.</summary>
internal sealed class RunSignal(NpgsqlDataSource source) : IRunSignal, IAsyncDisposable
{
    private readonly SemaphoreSlim one = new(1);
    private readonly CancellationTokenSource ended = new();
    private NpgsqlConnection? listening;

    public async Task WaitAsync(TimeSpan limit, CancellationToken cancellationToken)
    {
        // A second waiter in the same process simply sleeps a little: the first one's work feeds both.
        if (!await one.WaitAsync(TimeSpan.FromMilliseconds(Math.Min(200, limit.TotalMilliseconds)), cancellationToken))
            return;
        try
        {
            using var either = CancellationTokenSource.CreateLinkedTokenSource(cancellationToken, ended.Token);
            if (listening is null)
            {
                listening = await source.OpenConnectionAsync(either.Token);
                await using var listen = new NpgsqlCommand("LISTEN protoledger_job", listening);
                await listen.ExecuteNonQueryAsync(either.Token);
                return;
            }

            await listening.WaitAsync(limit, either.Token);
        }
        catch (NpgsqlException)
        {
            await DropAsync();
            await Task.Delay(TimeSpan.FromMilliseconds(200), cancellationToken);
        }
        finally
        {
            one.Release();
        }
    }

    public async ValueTask DisposeAsync()
    {
        // Whoever still waits lets go of the connection first: one that is in use cannot be closed.
        await ended.CancelAsync();
        await one.WaitAsync();
        await DropAsync();
        one.Dispose();
        ended.Dispose();
    }

    private async Task DropAsync()
    {
        if (listening is { } connection)
        {
            listening = null;
            await connection.DisposeAsync();
        }
    }
}
