using Npgsql;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Storage.Sessions;
using ProtoLedger.Testing.Databases;

namespace ProtoLedger.Storage.Tests.Sessions;

public sealed class TransactionsTests(DatabaseFixture database) : IClassFixture<DatabaseFixture>
{
    [Fact]
    public async Task Read_OnConnectionsThatWereTerminated_GoesOnWithNewOnes()
    {
        await using var source = PostgresSource.Create(database.ConnectionString);
        var transactions = new Transactions(source);
        await Task.WhenAll(Enumerable.Range(0, 3).Select(_ => transactions.ReadAsync(stores => stores.Documents.CountAsync(default), default)));
        await using (var kill = database.Source.CreateCommand(
            "SELECT count(pg_terminate_backend(pid)) FROM pg_stat_activity WHERE datname = current_database() AND application_name = 'protoledger' AND pid <> pg_backend_pid()"))
            await kill.ExecuteScalarAsync();
        for (var i = 0; i < 3; i++)
            Assert.Equal(0, await transactions.ReadAsync(stores => stores.Documents.CountAsync(default), default));
    }

    [Fact]
    public async Task Write_ThatRefuses_LeavesNothing()
    {
        await using var source = PostgresSource.Create(database.ConnectionString);
        var transactions = new Transactions(source);
        var outcome = await transactions.WriteAsync<bool>(
            async stores =>
            {
                await stores.Ledger.AddBlobAsync("left behind"u8.ToArray(), default);
                return new Conflict("no");
            },
            default);
        Assert.IsType<Conflict>(outcome.Refusal);
        var hash = System.Security.Cryptography.SHA256.HashData("left behind"u8);
        Assert.Null(await transactions.ReadAsync(stores => stores.Ledger.FindBlobAsync(hash, default), default));
    }

    [Fact]
    public async Task Read_WithNoDatabase_IsUnavailable()
    {
        await using var source = PostgresSource.Create("Host=127.0.0.1;Port=1;Username=nobody;Database=none");
        await Assert.ThrowsAsync<StoreUnavailableException>(() => new Transactions(source).ReadAsync(stores => stores.Documents.CountAsync(default), default));
    }

    [Fact]
    public async Task Read_OfAnEarlierSnapshot_DoesNotSeeLaterWrites()
    {
        await using var source = PostgresSource.Create(database.ConnectionString);
        var transactions = new Transactions(source);
        var hash = System.Security.Cryptography.SHA256.HashData("later"u8);
        var (before, after) = await transactions.ReadAsync(
            async stores =>
            {
                var first = await stores.Ledger.FindBlobAsync(hash, default);
                await transactions.WriteAsync<bool>(
                    async others =>
                    {
                        await others.Ledger.AddBlobAsync("later"u8.ToArray(), default);
                        return true;
                    },
                    default);
                return (first, await stores.Ledger.FindBlobAsync(hash, default));
            },
            default);
        Assert.Null(before);
        Assert.Null(after);
    }
}
