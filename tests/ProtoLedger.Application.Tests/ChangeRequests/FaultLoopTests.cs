using System.Text;
using Microsoft.Extensions.DependencyInjection;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Importing;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Site;
using ProtoLedger.Application.Tests.Fixtures;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Storage.Migrations;
using ProtoLedger.Storage.Sessions;
using ProtoLedger.Testing.Databases;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.ChangeRequests;

/// <summary>Fails the n-th statement of each command, for n = 1, 2, 3 … until the command gets through: before that nothing may have changed.</summary>
public sealed class FaultLoopTests(Hospital hospital) : IClassFixture<Hospital>
{
    [Fact]
    public async Task EveryCommand_WithItsNthStatementFailing_IsCompleteOrANoOp()
    {
        var (stands, document) = await hospital.EditedAsync(tree => tree["series"]![0]!["readout"]!["RepetitionTime"] = 8000);
        var draft = await LoopAsync(services => services.GetRequiredService<CreateChangeRequest>().RunAsync(
            hospital.As("t.okafor", "technologist", "create"), new NewChangeRequest(DocumentKind.Protocol, "brain", stands, document, "faults"), default));
        await LoopAsync(services => services.GetRequiredService<AddComment>().RunAsync(
            hospital.As("b.rao", "physicist", "comment"), new NewComment(draft.Id, "/series/0/readout/RepetitionTime", "why so short?"), default));
        var submitted = await LoopAsync(services => services.GetRequiredService<SubmitChangeRequest>().RunAsync(
            hospital.As("t.okafor", "technologist", "submit"), new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        var approved = await LoopAsync(services => services.GetRequiredService<ApproveChangeRequest>().RunAsync(
            hospital.As("a.lindqvist", "physicist", "approve"), new Approval(draft.Id, submitted.RowVersion, Passphrase), default));
        Assert.Equal(ChangeRequestState.Approved, approved.State);
        await LoopAsync(services => services.GetRequiredService<MakeEffective>().RunAsync(
            hospital.As("a.lindqvist", "physicist", "effective"), new Effectiveness(draft.Id, approved.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
    }

    [Fact]
    public async Task Import_WithAnyOfItsStatementsFailing_LeavesTheDatabaseEmpty()
    {
        var database = await CreateEmptyAsync();
        await Migrator.MigrateAsync(database);
        var folder = TestStore.Write();
        await using (var services = Wire(database))
            Assert.True((await services.GetRequiredService<PrepareSite>().RunAsync(default)).Succeeded);
        await using var source = Npgsql.NpgsqlDataSource.Create(database);
        var empty = await FingerprintAsync(source);
        for (var n = 1; ; n += 11)
        {
            var faults = new StatementFaults(n);
            await using var services = Wire(database, faults);
            try
            {
                Done(await services.GetRequiredService<ImportStore>().RunAsync(folder, default));
                Assert.False(faults.Fired);
                break;
            }
            catch (IOException)
            {
                Assert.Equal(empty, await FingerprintAsync(source));
            }
        }

        Directory.Delete(folder, recursive: true);
    }

    private static Task<string> CreateEmptyAsync() => DatabaseFixture.CreateEmptyAsync();

    private async Task<T> LoopAsync<T>(Func<IServiceProvider, Task<Outcome<T>>> command)
    {
        var before = await FingerprintAsync(hospital.Source);
        for (var n = 1; ; n++)
        {
            var faults = new StatementFaults(n);
            await using var services = Wire(hospital.ConnectionString, faults);
            try
            {
                var outcome = await command(services);
                Assert.False(faults.Fired, $"Statement {n} failed and the command went on.");
                Assert.True(n > 3, "The loop met no statement.");
                Assert.NotEqual(before, await FingerprintAsync(hospital.Source));
                return Done(outcome);
            }
            catch (IOException)
            {
                Assert.Equal(before, await FingerprintAsync(hospital.Source));
            }
        }
    }

    /// <summary>Rows of every table, and every value of the requests.</summary>
    private static async Task<string> FingerprintAsync(Npgsql.NpgsqlDataSource source)
    {
        var text = new StringBuilder();
        var tables = new List<string>();
        await using (var list = source.CreateCommand("SELECT relname FROM pg_class JOIN pg_namespace n ON n.oid = relnamespace WHERE nspname = 'public' AND relkind IN ('r', 'p') ORDER BY relname"))
        await using (var reader = await list.ExecuteReaderAsync())
            while (await reader.ReadAsync())
                tables.Add(reader.GetString(0));
        foreach (var table in tables)
        {
#pragma warning disable CA2100 // The names come from the catalogue.
            await using var hash = source.CreateCommand($"SELECT coalesce(md5(string_agg(md5(t::text), '' ORDER BY md5(t::text))), '') FROM {table} AS t");
#pragma warning restore CA2100
            text.Append(table).Append(' ').Append(await hash.ExecuteScalarAsync()).Append('\n');
        }

        return text.ToString();
    }
}
