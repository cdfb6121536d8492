using Npgsql;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Storage.Sessions;

/// <summary>Waits for the notification that a job was queued. It is a wake-up only: a lost one costs a waiting time, never a job.</summary>
internal sealed class RunSignal(NpgsqlDataSource source) : IRunSignal, IAsyncDisposable
{
    private readonly SemaphoreSlim one = new(1);
    private NpgsqlConnection? listening;

    public async Task WaitAsync(TimeSpan limit, CancellationToken cancellationToken)
    {
        // A second waiter in the same process simply sleeps a little: the first one's work feeds both.
        if (!await one.WaitAsync(TimeSpan.FromMilliseconds(Math.Min(200, limit.TotalMilliseconds)), cancellationToken))
            return;
        try
        {
            if (listening is null)
            {
                listening = await source.OpenConnectionAsync(cancellationToken);
                await using var listen = new NpgsqlCommand("LISTEN protoledger_job", listening);
                await listen.ExecuteNonQueryAsync(cancellationToken);
                return;
            }

            await listening.WaitAsync(limit, cancellationToken);
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
        await DropAsync();
        one.Dispose();
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
