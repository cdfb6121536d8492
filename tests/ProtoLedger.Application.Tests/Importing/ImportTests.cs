using Microsoft.Extensions.DependencyInjection;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Importing;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Site;
using ProtoLedger.Application.Stores;
using ProtoLedger.Application.Tests.Fixtures;
using ProtoLedger.Storage.Migrations;
using ProtoLedger.Testing.Databases;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.Importing;

public sealed class ImportTests(Hospital hospital) : IClassFixture<Hospital>
{
    [Fact]
    public async Task Import_History_KeepsStatedDatesAndIsNotSigned()
    {
        var versions = Done(await hospital.Get<ReadDocuments>().VersionsAsync(hospital.Technologist, Brain, default));
        Assert.Equal(3, versions.Count);
        Assert.All(versions, version => Assert.True(version.Imported && version.Signatures.Count == 0));
        Assert.Equal(new DateTime(2022, 3, 1, 8, 0, 0, DateTimeKind.Utc), versions[1].StatedTime);
        Assert.Equal(("t.okafor", "shorter echo spacing", "binder 3"), (versions[1].Author, versions[1].Reason, versions[1].Source));
        Assert.True(versions[1].CreatedAt > DateTime.UtcNow.AddHours(-1));
        Assert.Equal(2, versions[1].Effective.Count);
        Assert.All(versions[1].Effective, interval => Assert.Equal(new DateTime(2023, 3, 1, 8, 0, 0, DateTimeKind.Utc), interval.Until));
    }

    [Fact]
    public async Task Import_DeclinedProposal_IsADeclinedRequestMarkedImported()
    {
        var requests = Done(await hospital.Get<ReadChangeRequests>().ListAsync(hospital.Technologist, new ChangeRequestFilter(ChangeRequestState.Declined), default));
        var request = Assert.Single(requests);
        Assert.True(request.Imported);
        Assert.Equal(("a.lindqvist", "fluid turned bright"), (request.DecidedBy, request.DecisionReason));
    }

    [Fact]
    public async Task Import_IntoADatabaseWithDocuments_IsRefused()
    {
        var folder = TestStore.Write();
        Refused<Conflict>(await hospital.Get<ImportStore>().RunAsync(folder, default));
        Directory.Delete(folder, recursive: true);
    }

    [Theory]
    [InlineData("protocols/brain/v0002.yaml", "RepetitionTime: 9000", "RepetitionTime: soon", "protocols/brain/v0002.yaml:16:")]
    [InlineData("protocols/brain/v0003.yaml", "scanners: [three, one-five]", "scanners: [three, seven]", "protocols/brain/v0003.yaml")]
    [InlineData("history.yaml", "version: 3, baseVersion: 2", "version: 5, baseVersion: 2", "history.yaml:")]
    [InlineData("scanners/three/v0001.yaml", "id: three", "id: four", "scanners/three/v0001.yaml")]
    public async Task Import_StoreWithAFault_NamesFileAndLineAndStoresNothing(string file, string old, string now, string place)
    {
        var database = await DatabaseFixture.CreateEmptyAsync();
        await Migrator.MigrateAsync(database);
        await using var services = Wire(database);
        Done(await services.GetRequiredService<PrepareSite>().RunAsync(default));
        var folder = TestStore.Write();
        var path = Path.Combine(folder, file);
        await File.WriteAllTextAsync(path, (await File.ReadAllTextAsync(path)).Replace(old, now, StringComparison.Ordinal));
        var invalid = Refused<Invalid>(await services.GetRequiredService<ImportStore>().RunAsync(folder, default));
        Assert.Contains(invalid.Errors, error => error.Pointer.StartsWith(place, StringComparison.Ordinal));
        Assert.Equal(0, await services.GetRequiredService<ITransactions>().ReadAsync(stores => stores.Documents.CountAsync(default), default));
        Directory.Delete(folder, recursive: true);
    }

    [Fact]
    public async Task Import_FileThatNoHistorySpeaksOf_IsRefused()
    {
        var folder = TestStore.Write();
        await File.WriteAllTextAsync(Path.Combine(folder, "protocols/knee/v0002.yaml"), TestStore.Knee);
        var invalid = Refused<Invalid>(await hospital.Get<ImportStore>().RunAsync(folder, default));
        Assert.StartsWith("protocols/knee/v0002.yaml", Assert.Single(invalid.Errors).Pointer, StringComparison.Ordinal);
        Directory.Delete(folder, recursive: true);
    }
}
