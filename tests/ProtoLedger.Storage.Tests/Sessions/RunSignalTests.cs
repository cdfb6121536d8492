using ProtoLedger.Storage.Sessions;
using ProtoLedger.Testing.Databases;

namespace ProtoLedger.Storage.Tests.Sessions;

public sealed class RunSignalTests(DatabaseFixture database) : IClassFixture<DatabaseFixture>
{
    [Fact]
    public async Task Dispose_WhileSomebodyWaits_EndsTheWait()
    {
        await using var source = PostgresSource.Create(database.ConnectionString);
        var signal = new RunSignal(source);
        await signal.WaitAsync(TimeSpan.FromSeconds(1), default);
        var waiting = signal.WaitAsync(TimeSpan.FromMinutes(5), default);
        await Task.Delay(100);
        await signal.DisposeAsync();
        await Assert.ThrowsAnyAsync<OperationCanceledException>(() => waiting);
    }
}
