using Microsoft.Extensions.DependencyInjection;
using Npgsql;
using ProtoLedger.Application.Stores;

namespace ProtoLedger.Storage.Sessions;

/// <summary>Wires PostgreSQL to the interfaces of the use cases.</summary>
public static class StorageServices
{
    /// <summary>Adds the stores on a migrated database.</summary>
    /// <param name="services">Services.</param>
    /// <param name="connectionString">Connects as the owner or as a member of the application role; the program works in that role either way.</param>
    /// <param name="faults">Breaks the n-th statement, for tests; null otherwise.</param>
    public static IServiceCollection AddProtoLedgerStorage(
        this IServiceCollection services, string connectionString, StatementFaults? faults = null)
    {
        ArgumentNullException.ThrowIfNull(services);
        Dapper.DefaultTypeMap.MatchNamesWithUnderscores = true;
        services.AddSingleton<NpgsqlDataSource>(_ => PostgresSource.Create(connectionString));
        services.AddSingleton<ITransactions>(provider => new Transactions(provider.GetRequiredService<NpgsqlDataSource>(), faults));
        services.AddSingleton<IRunSignal, RunSignal>();
        return services;
    }
}
