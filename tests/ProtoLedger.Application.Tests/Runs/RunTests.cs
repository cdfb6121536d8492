using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Time.Testing;
using Npgsql;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Stores;
using ProtoLedger.Application.Tests.Fixtures;
using ProtoLedger.Protocols.Documents;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.Runs;

public sealed class RunTests(Hospital hospital) : IClassFixture<Hospital>
{
    [Fact]
    public async Task Run_Summary_CountsWhatAnIndependentQueryCounts()
    {
        var draft = await hospital.DraftAsync(8000);
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        var summary = Done(await hospital.Get<ReadRuns>().GetAsync(hospital.Technologist, submitted.RunId!.Value, default)).Summary;
        Assert.Equal("completed", summary.State);
        Assert.Equal(await CountAsync("SELECT count(*) FROM document WHERE kind = 'protocol'"), summary.Versions);
        Assert.Equal(await CountAsync("SELECT count(*) FROM change_request WHERE kind = 'protocol' AND state = 'under review'"), summary.Proposals);
        Assert.Equal(await CountAsync($"SELECT count(*) FROM run_result WHERE run = {submitted.RunId}"), summary.Results);
        Assert.Equal(0, summary.FailedShards);
        Assert.True(summary.DurationMs > 0);
        Done(await hospital.Get<WithdrawChangeRequest>().RunAsync(hospital.Technologist, new ReasonedStep(draft.Id, submitted.RowVersion, "counted"), default));
    }

    [Fact]
    public async Task Run_AfterEveryStoredResultWasCorrupted_CorrectsAndReportsAll()
    {
        var first = await RunAsync();
        var versions = await CountAsync("SELECT count(*) FROM document WHERE kind = 'protocol'");
        var rows = await CountAsync($"SELECT count(*) FROM run_result WHERE run = {first}");
        await ExecuteAsync($"UPDATE run_result SET nominal = (SELECT array_agg(CASE WHEN value = 'NaN' THEN value ELSE value * 1.01 + 0.001 END ORDER BY i) FROM unnest(nominal) WITH ORDINALITY AS n (value, i)) WHERE run = {first}");
        var second = await RunAsync();
        var summary = Done(await hospital.Get<ReadRuns>().GetAsync(hospital.Technologist, second, default)).Summary;
        Assert.Equal(versions, summary.Moved);
        var findings = Done(await hospital.Get<CompareRuns>().FindingsAsync(hospital.Technologist, second, default));
        Assert.Equal(rows, findings.Altered.Count);
        var third = await RunAsync();
        Assert.Equal(0, Done(await hospital.Get<ReadRuns>().GetAsync(hospital.Technologist, third, default)).Summary.Moved);
        var comparison = Done(await hospital.Get<CompareRuns>().RunAsync(hospital.Technologist, second, third, default));
        Assert.Equal((rows, 0), (comparison.Compared, comparison.Moved.Count));
    }

    [Fact]
    public async Task Run_ForAScannerEdit_MovesExactlyTheVersionsOnThatScanner()
    {
        await RunAsync();
        var scanner = Done(await hospital.Get<ReadDocuments>().VersionAsync(hospital.Physicist, new DocumentKey(DocumentKind.Scanner, "three"), null, default));
        var text = System.Text.Encoding.UTF8.GetString(scanner.Bytes).Replace("\"MagneticFieldStrength\":3", "\"MagneticFieldStrength\":2.97", StringComparison.Ordinal);
        var draft = Done(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Physicist, new NewChangeRequest(DocumentKind.Scanner, "three", 1, System.Text.Encoding.UTF8.GetBytes(text), "measured again"), default));
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Physicist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        var summary = Done(await hospital.Get<ReadRuns>().GetAsync(hospital.Technologist, submitted.RunId!.Value, default)).Summary;
        var expected = await CountAsync("""
            SELECT count(*) FROM document
            WHERE kind = 'protocol' AND convert_from(bytes, 'UTF8')::jsonb -> 'scanners' ? 'three'
            """);
        Assert.True(expected > 0);
        Assert.Equal(expected, summary.Moved);
        Assert.True(Done(await hospital.Get<ReadChangeRequests>().GetAsync(hospital.Physicist, draft.Id, default)).Request.ReportReady);

        // The run was for a proposal: the record itself has not moved.
        Done(await hospital.Get<WithdrawChangeRequest>().RunAsync(hospital.Physicist, new ReasonedStep(draft.Id, submitted.RowVersion, "only a trial"), default));
        var next = await RunAsync();
        Assert.Equal(0, Done(await hospital.Get<ReadRuns>().GetAsync(hospital.Technologist, next, default)).Summary.Moved);
    }

    [Fact]
    public async Task Run_ForACatalogueEdit_MovesExactlyTheVersionsAtThatField()
    {
        await RunAsync();
        var catalogue = Done(await hospital.Get<ReadDocuments>().VersionAsync(hospital.Physicist, new DocumentKey(DocumentKind.Catalogue, "tissues"), null, default));
        var tree = System.Text.Json.Nodes.JsonNode.Parse(catalogue.Bytes)!;
        tree["tissues"]![2]!["fields"]![1]!["T1"]!["mean"] = 4400;
        var draft = Done(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Physicist, new NewChangeRequest(DocumentKind.Catalogue, "tissues", 1, System.Text.Encoding.UTF8.GetBytes(tree.ToJsonString()), "fluid, new source"), default));
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Physicist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        var findings = Done(await hospital.Get<CompareRuns>().FindingsAsync(hospital.Technologist, submitted.RunId!.Value, default));

        // Fluid is a tissue of the brain protocol only, and the edit is at 3 T only.
        var expected = await CountAsync("""
            SELECT count(*) FROM document
            WHERE kind = 'protocol' AND id = 'brain' AND convert_from(bytes, 'UTF8')::jsonb -> 'scanners' ? 'three'
            """);
        Assert.True(expected > 0);
        Assert.Equal(expected, findings.Moved.Select(moved => (moved.Result.Protocol, moved.Result.Version)).Distinct().Count());
        Assert.All(findings.Moved, moved => Assert.Equal(("brain", "three"), (moved.Result.Protocol, moved.Result.Scanner)));
        Done(await hospital.Get<WithdrawChangeRequest>().RunAsync(hospital.Physicist, new ReasonedStep(draft.Id, submitted.RowVersion, "only a trial"), default));
    }

    [Fact]
    public async Task Effective_OfAScannerEdit_RestartsWhatIsUnderReview()
    {
        var waiting = await hospital.ReviewedAsync(8150);
        var scanner = Done(await hospital.Get<ReadDocuments>().VersionAsync(hospital.Physicist, new DocumentKey(DocumentKind.Scanner, "one-five"), null, default));
        var text = System.Text.Encoding.UTF8.GetString(scanner.Bytes).Replace("Room 1", "Room 2", StringComparison.Ordinal);
        var draft = Done(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Physicist, new NewChangeRequest(DocumentKind.Scanner, "one-five", 1, System.Text.Encoding.UTF8.GetBytes(text), "moved"), default));
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Physicist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        var approved = Done(await hospital.Get<ApproveChangeRequest>().RunAsync(
            hospital.SecondPhysicist, new Approval(draft.Id, submitted.RowVersion, Passphrase), default));
        Done(await hospital.Get<MakeEffective>().RunAsync(hospital.Physicist, new Effectiveness(draft.Id, approved.RowVersion), default));
        var restarted = Done(await hospital.Get<ReadChangeRequests>().GetAsync(hospital.Technologist, waiting.Id, default)).Request;
        Assert.True(restarted.RunId > waiting.RunId);
        Assert.False(restarted.ReportReady);
        await hospital.Get<RunWorker>().DrainAsync(default);
        Assert.True(Done(await hospital.Get<ReadChangeRequests>().GetAsync(hospital.Technologist, waiting.Id, default)).Request.ReportReady);
        Done(await hospital.Get<WithdrawChangeRequest>().RunAsync(hospital.Technologist, new ReasonedStep(waiting.Id, restarted.RowVersion, "enough"), default));
    }

    [Fact]
    public async Task Approve_AfterConditionsDatedAheadCameIntoForce_AsksForANewReport()
    {
        var key = new DocumentKey(DocumentKind.Conditions, "brain");
        var stored = Done(await hospital.Get<ReadDocuments>().VersionAsync(hospital.Physicist, key, null, default));
        var tree = System.Text.Json.Nodes.JsonNode.Parse(stored.Bytes)!;
        tree["title"] = "Brain, from another hour on";
        var draft = Done(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Physicist, new NewChangeRequest(key.Kind, key.Id, stored.Summary.Version, System.Text.Encoding.UTF8.GetBytes(tree.ToJsonString()), "renamed"), default));
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Physicist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        var approved = Done(await hospital.Get<ApproveChangeRequest>().RunAsync(
            hospital.SecondPhysicist, new Approval(draft.Id, submitted.RowVersion, Passphrase), default));
        var start = DateTime.UtcNow.AddHours(1);
        Done(await hospital.Get<MakeEffective>().RunAsync(hospital.Physicist, new Effectiveness(draft.Id, approved.RowVersion, start), default));
        var waiting = await hospital.ReviewedAsync(8250);

        await using var later = Wire(hospital.ConnectionString, clock: new FakeTimeProvider(DateTimeOffset.UtcNow.AddHours(2)));
        var refused = Refused<Outcomes.Conflict>(await later.GetRequiredService<ApproveChangeRequest>().RunAsync(
            hospital.Physicist, new Approval(waiting.Id, waiting.RowVersion, Passphrase), default));
        Assert.Contains("came into force", refused.Detail, StringComparison.Ordinal);
        Done(await hospital.Get<WithdrawChangeRequest>().RunAsync(hospital.Technologist, new ReasonedStep(waiting.Id, waiting.RowVersion, "enough"), default));
    }

    [Fact]
    public async Task Claim_AfterItsLeaseRanOut_FencesTheFirstWorkerOut()
    {
        Done(await hospital.Get<EnqueueRun>().RunAsync(hospital.Physicist, RunCause.Manual, default));
        var transactions = hospital.Get<ITransactions>();
        var slow = (await transactions.WriteAsync<RunJob?>(
            async stores => Outcomes.Outcome.Done(await stores.Runs.ClaimAsync("slow", TimeSpan.FromMilliseconds(1), default)), default)).Value!;
        await Task.Delay(50);
        var quick = (await transactions.WriteAsync<RunJob?>(
            async stores => Outcomes.Outcome.Done(await stores.Runs.ClaimAsync("quick", TimeSpan.FromSeconds(30), default)), default)).Value!;
        Assert.Equal((slow.Id, slow.Epoch + 1), (quick.Id, quick.Epoch));
        var late = await transactions.WriteAsync<bool>(async stores => await stores.Runs.FinishJobAsync(slow, null, 0, default), default);
        Assert.False(late.Value);
        await transactions.WriteAsync<bool>(
            async stores =>
            {
                await stores.Runs.GiveBackAsync(quick, "for the worker of this test", default);
                return true;
            },
            default);
        await Task.Delay(2200);
        await hospital.Get<RunWorker>().DrainAsync(default);
    }

    private async Task<long> RunAsync()
    {
        var run = Done(await hospital.Get<EnqueueRun>().RunAsync(hospital.Physicist, RunCause.Manual, default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        return run;
    }

    private async Task<int> CountAsync(string query)
    {
#pragma warning disable CA2100 // Made in this file.
        await using var command = hospital.Source.CreateCommand(query);
#pragma warning restore CA2100
        return (int)(long)(await command.ExecuteScalarAsync())!;
    }

    private async Task ExecuteAsync(string statement)
    {
#pragma warning disable CA2100 // Made in this file.
        await using var command = hospital.Source.CreateCommand(statement);
#pragma warning restore CA2100
        await command.ExecuteNonQueryAsync();
    }
}
