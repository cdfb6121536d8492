using System.Diagnostics.CodeAnalysis;
using System.Text.Json.Nodes;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Logging;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Importing;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Site;
using ProtoLedger.Protocols.Documents;
using ProtoLedger.Storage.Sessions;
using ProtoLedger.Testing.Databases;

namespace ProtoLedger.Application.Tests.Fixtures;

/// <summary>An invented hospital with the small store imported, its people enrolled and its first run done; one database a test class.</summary>
public sealed class Hospital : DatabaseFixture
{
    internal const string Password = "a lamp on the windowsill";
    internal const string Passphrase = "seven owls over the lake";
    internal static readonly DocumentKey Brain = new(DocumentKind.Protocol, "brain");
    private int keys;

    /// <summary>The wired use cases.</summary>
    [AllowNull]
    internal ServiceProvider Services { get; private set; }

    internal ImportResult Imported { get; private set; } = null!;

    /// <summary>A caller with one role and a new idempotency key.</summary>
    internal Caller As(string name, string role, string? key = null) =>
        new(new Actor(name, name, [role]), key ?? $"key-{Interlocked.Increment(ref keys)}");

    internal Caller Technologist => As("t.okafor", Roles.Technologist);

    internal Caller Physicist => As("a.lindqvist", Roles.Physicist);

    internal Caller SecondPhysicist => As("b.rao", Roles.Physicist);

    internal T Get<T>()
        where T : notnull => Services.GetRequiredService<T>();

    /// <inheritdoc/>
    public override async ValueTask InitializeAsync()
    {
        await base.InitializeAsync();
        Services = Wire(ConnectionString);
        Assert.True((await Get<PrepareSite>().RunAsync(default)).Succeeded);
        var folder = TestStore.Write();
        Imported = Done(await Get<ImportStore>().RunAsync(folder, default));
        Directory.Delete(folder, recursive: true);
        await Get<PrepareDemo>().RunAsync(Imported.People, Password, Passphrase, default);
        await Get<RunWorker>().DrainAsync(default);
    }

    /// <inheritdoc/>
    public override async ValueTask DisposeAsync()
    {
        GC.SuppressFinalize(this);
        await Services.DisposeAsync();
        await base.DisposeAsync();
    }

    /// <summary>Wires the use cases to a database.</summary>
    internal static ServiceProvider Wire(
        string connectionString, StatementFaults? faults = null, TimeProvider? clock = null, AccountOptions? accounts = null) =>
        new ServiceCollection()
            .AddSingleton(clock ?? TimeProvider.System)
            .AddLogging(logging => logging.AddConsole().SetMinimumLevel(LogLevel.Error))
            .AddProtoLedgerApplication(new SiteOptions("Test hospital", "test.example/log", new byte[32]), accounts)
            .AddProtoLedgerStorage(connectionString, faults)
            .BuildServiceProvider();

    /// <summary>The newest brain protocol with an edit.</summary>
    internal async Task<(int Base, byte[] Document)> EditedAsync(Action<JsonNode> edit)
    {
        var newest = Done(await Get<ReadDocuments>().VersionAsync(Technologist, Brain, null, default));
        var tree = JsonNode.Parse(newest.Bytes)!;
        edit(tree);
        return (newest.Summary.Version, System.Text.Encoding.UTF8.GetBytes(tree.ToJsonString()));
    }

    /// <summary>A draft by the technologist that sets the repetition time of the first series.</summary>
    internal async Task<ChangeRequestView> DraftAsync(double repetitionTime = 8000, Caller? author = null)
    {
        var (stands, document) = await EditedAsync(tree => tree["series"]![0]!["readout"]!["RepetitionTime"] = repetitionTime);
        return Done(await Get<CreateChangeRequest>().RunAsync(
            author ?? Technologist, new NewChangeRequest(DocumentKind.Protocol, "brain", stands, document, "shorter examination"), default));
    }

    /// <summary>A request under review with its report.</summary>
    internal async Task<ChangeRequestView> ReviewedAsync(double repetitionTime = 8000)
    {
        var draft = await DraftAsync(repetitionTime);
        var submitted = Done(await Get<SubmitChangeRequest>().RunAsync(Technologist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await Get<RunWorker>().DrainAsync(default);
        return submitted;
    }

    /// <summary>The value of a success.</summary>
    internal static T Done<T>(Outcome<T> outcome)
    {
        Assert.True(outcome.Succeeded, outcome.Refusal is Invalid invalid ? string.Join('\n', invalid.Errors) : outcome.Refusal?.ToString());
        return outcome.Value;
    }

    /// <summary>The refusal of the expected kind.</summary>
    internal static T Refused<T>(object outcome)
        where T : Refusal => Assert.IsType<T>(outcome.GetType().GetProperty("Refusal")!.GetValue(outcome));
}
