using ProtoLedger.Application.Actors;
using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Documents;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Tests.Fixtures;
using ProtoLedger.Protocols.Documents;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.ChangeRequests;

public sealed class ChangeRequestTests(Hospital hospital) : IClassFixture<Hospital>
{
    [Fact]
    public async Task Approve_BySecondPerson_MakesTheNextVersionAndItsReport()
    {
        var before = Done(await hospital.Get<ReadDocuments>().VersionAsync(hospital.Technologist, Brain, null, default)).Summary.Version;
        var request = await hospital.ReviewedAsync(8500);
        var approved = Done(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(request.Id, request.RowVersion, Passphrase), default));
        Assert.Equal(ChangeRequestState.Approved, approved.State);
        Assert.Equal(before + 1, approved.Version);
        var signature = Assert.Single(approved.Signatures);
        Assert.Equal(("a.lindqvist", "A. Lindqvist", "physicist", "approved"), (signature.Signer, signature.SignerName, signature.Role, signature.Meaning));
        var stored = Done(await hospital.Get<ReadDocuments>().VersionAsync(hospital.Technologist, Brain, before + 1, default));
        Assert.Equal(request.Sha256, stored.Summary.Sha256);
        await hospital.Get<RunWorker>().DrainAsync(default);
    }

    [Fact]
    public async Task Approve_OwnRequest_IsForbidden()
    {
        var draft = await hospital.DraftAsync(8400, hospital.Physicist);
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Physicist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        var refusal = Refused<Forbidden>(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(draft.Id, submitted.RowVersion, Passphrase), default));
        Assert.Contains("authors never approve their own", refusal.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Approve_BeforeItsRunIsFinished_IsNotReady()
    {
        var draft = await hospital.DraftAsync(8300);
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        var refusal = Refused<NotReady>(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(draft.Id, submitted.RowVersion, Passphrase), default));
        Assert.Equal(submitted.RunId, refusal.RunId);
        await hospital.Get<RunWorker>().DrainAsync(default);
    }

    [Fact]
    public async Task Approve_WithAWrongPassphrase_SignsNothing()
    {
        var request = await hospital.ReviewedAsync(8200);
        Refused<CannotSign>(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.SecondPhysicist, new Approval(request.Id, request.RowVersion, "seven owls under the lake"), default));
        var detail = Done(await hospital.Get<ReadChangeRequests>().GetAsync(hospital.Physicist, request.Id, default));
        Assert.Empty(detail.Request.Signatures);
        Assert.Equal(ChangeRequestState.UnderReview, detail.Request.State);
    }

    [Theory]
    [InlineData("v.osei", Roles.Reviewer)]
    [InlineData("k.admin", Roles.Administrator)]
    [InlineData("l.marsh", Roles.LeadTechnologist)]
    public async Task Approve_ByARoleThatTheProtocolDoesNotName_IsForbidden(string name, string role)
    {
        var request = await hospital.ReviewedAsync(8100);
        Refused<Forbidden>(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.As(name, role), new Approval(request.Id, request.RowVersion, Passphrase), default));
    }

    [Fact]
    public async Task Approve_WithAnApiToken_IsForbidden()
    {
        var request = await hospital.ReviewedAsync(8050);
        var token = new Caller(new Actor("a.lindqvist", "A. Lindqvist", [Roles.Physicist], Credential.Token, Scope.All), "token-key");
        Refused<Forbidden>(await hospital.Get<ApproveChangeRequest>().RunAsync(token, new Approval(request.Id, request.RowVersion, Passphrase), default));
    }

    [Fact]
    public async Task Step_WithAnOldRowVersion_IsStaleWithBothVersions()
    {
        var draft = await hospital.DraftAsync(7900);
        Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        var stale = Refused<Stale>(await hospital.Get<DeclineChangeRequest>().RunAsync(hospital.Physicist, new ReasonedStep(draft.Id, draft.RowVersion, "no"), default));
        Assert.Equal((1L, 2L), (stale.Expected, stale.Current));
        await hospital.Get<RunWorker>().DrainAsync(default);
    }

    [Theory]
    [InlineData(null)]
    [InlineData("")]
    [InlineData("  \n ")]
    public async Task Decline_WithoutAReason_IsRefusedWithItsPointer(string? reason)
    {
        var request = await hospital.ReviewedAsync(7800);
        var invalid = Refused<Invalid>(await hospital.Get<DeclineChangeRequest>().RunAsync(hospital.Physicist, new ReasonedStep(request.Id, request.RowVersion, reason), default));
        Assert.Equal("/reason", Assert.Single(invalid.Errors).Pointer);
    }

    [Fact]
    public async Task Submit_ADeclinedRequest_IsIllegalWithItsState()
    {
        var request = await hospital.ReviewedAsync(7700);
        var declined = Done(await hospital.Get<DeclineChangeRequest>().RunAsync(hospital.Physicist, new ReasonedStep(request.Id, request.RowVersion, "fluid turns bright"), default));
        var illegal = Refused<IllegalState>(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(request.Id, declined.RowVersion), default));
        Assert.Equal(ChangeRequestState.Declined, illegal.State);
        Assert.Contains("is \"declined\"", illegal.Detail, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Create_OnAnOlderVersion_NamesBothVersions()
    {
        var (newest, document) = await hospital.EditedAsync(tree => tree["series"]![0]!["readout"]!["RepetitionTime"] = 7650);
        var moved = Refused<BaseMoved>(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Technologist, new NewChangeRequest(DocumentKind.Protocol, "brain", newest - 1, document, "why"), default));
        Assert.Equal((newest - 1, newest), (moved.BaseVersion, moved.NewestVersion));
    }

    [Fact]
    public async Task Create_WithoutAnyChange_IsRefused()
    {
        var (newest, document) = await hospital.EditedAsync(_ => { });
        Refused<Invalid>(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Technologist, new NewChangeRequest(DocumentKind.Protocol, "brain", newest, document, "why"), default));
    }

    [Fact]
    public async Task Create_ImpossibleDocument_PointsIntoTheDocument()
    {
        var (newest, document) = await hospital.EditedAsync(tree => tree["series"]![0]!["readout"]!["RepetitionTime"] = 1000);
        var invalid = Refused<Invalid>(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Technologist, new NewChangeRequest(DocumentKind.Protocol, "brain", newest, document, "why"), default));
        Assert.All(invalid.Errors, error => Assert.StartsWith("/document/series/0", error.Pointer, StringComparison.Ordinal));
    }

    [Fact]
    public async Task Edit_UnderReview_DropsTheSignaturesAndStartsANewRun()
    {
        // Two signatures are needed here, so that one can be there while the request is still under review.
        var (newest, document) = await hospital.EditedAsync(tree => tree["requiredSignatures"] = System.Text.Json.Nodes.JsonNode.Parse(
            """[{"role":"physicist","meaning":"approved","deputies":[]},{"role":"radiologist","meaning":"clinically-accepted","deputies":[]}]"""));
        var draft = Done(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Technologist, new NewChangeRequest(DocumentKind.Protocol, "brain", newest, document, "two must sign"), default));
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        var half = Done(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(draft.Id, submitted.RowVersion, Passphrase), default));
        Assert.Equal(ChangeRequestState.UnderReview, half.State);

        var text = System.Text.Encoding.UTF8.GetString(document).Replace("\"title\":\"Brain\"", "\"title\":\"Brain, adult\"", StringComparison.Ordinal);
        var edited = Done(await hospital.Get<EditChangeRequest>().RunAsync(
            hospital.Technologist, new EditedChangeRequest(draft.Id, half.RowVersion, System.Text.Encoding.UTF8.GetBytes(text), null), default));
        Assert.False(Assert.Single(edited.Signatures).Current);
        Assert.NotEqual(submitted.RunId, edited.RunId);
        Assert.False(edited.ReportReady);

        await hospital.Get<RunWorker>().DrainAsync(default);
        var again = Done(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.SecondPhysicist, new Approval(draft.Id, edited.RowVersion, Passphrase), default));
        Assert.Equal(ChangeRequestState.UnderReview, again.State);
        Assert.Equal([false, true], again.Signatures.Select(signature => signature.Current));
        Done(await hospital.Get<WithdrawChangeRequest>().RunAsync(hospital.Technologist, new ReasonedStep(draft.Id, again.RowVersion, "enough"), default));
    }

    [Theory]
    [InlineData("""[{"role":"radiologist","meaning":"clinically-accepted","deputies":["v.osei"]}]""")]
    [InlineData("""[{"role":"physicist","meaning":"approved","deputies":["v.osei"]}]""")]
    [InlineData("""[{"role":"technologist","meaning":"approved","deputies":[]}]""")]
    public async Task Approve_ProposalThatSoftensItsOwnRule_StillNeedsThePhysicist(string rule)
    {
        var (newest, document) = await hospital.EditedAsync(tree => tree["requiredSignatures"] = System.Text.Json.Nodes.JsonNode.Parse(rule));
        var draft = Done(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Technologist, new NewChangeRequest(DocumentKind.Protocol, "brain", newest, document, "quicker approval"), default));
        Assert.Contains(draft.RequiredSignatures, wanted => wanted is { Role: Roles.Physicist, Meaning: "approved", Deputies.Count: 0 });
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);

        var friend = await hospital.Get<ApproveChangeRequest>().RunAsync(
            hospital.As("v.osei", Roles.Reviewer), new Approval(draft.Id, submitted.RowVersion, Passphrase, "approved"), default);
        Refused<Forbidden>(friend);
        Done(await hospital.Get<WithdrawChangeRequest>().RunAsync(hospital.Technologist, new ReasonedStep(draft.Id, submitted.RowVersion, "enough"), default));
    }

    [Fact]
    public async Task Rebase_AfterAnotherApproval_KeepsBothChanges()
    {
        var mine = await hospital.ReviewedAsync(7600);
        var (newest, document) = await hospital.EditedAsync(tree => tree["series"]![0]!["geometry"]!["PixelBandwidth"] = 260);
        var other = Done(await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Technologist, new NewChangeRequest(DocumentKind.Protocol, "brain", newest, document, "wider"), default));
        other = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(other.Id, other.RowVersion), default));
        await hospital.Get<RunWorker>().DrainAsync(default);
        Done(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(other.Id, other.RowVersion, Passphrase), default));

        var moved = Refused<BaseMoved>(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(mine.Id, mine.RowVersion, Passphrase), default));
        Assert.Equal((newest, newest + 1), (moved.BaseVersion, moved.NewestVersion));
        var rebased = Done(await hospital.Get<RebaseChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(mine.Id, mine.RowVersion), default));
        Assert.Equal(newest + 1, rebased.BaseVersion);
        var detail = Done(await hospital.Get<ReadChangeRequests>().GetAsync(hospital.Technologist, mine.Id, default));
        var series = System.Text.Json.Nodes.JsonNode.Parse(detail.Document)!["series"]![0]!;
        Assert.Equal((7600.0, 260.0), ((double)series["readout"]!["RepetitionTime"]!, (double)series["geometry"]!["PixelBandwidth"]!));
        await hospital.Get<RunWorker>().DrainAsync(default);
    }

    [Fact]
    public async Task Submit_ByThirtyTwoClientsWithOneEntityTag_ExactlyOneWins()
    {
        var draft = await hospital.DraftAsync(7500);
        var outcomes = await Task.WhenAll(Enumerable.Range(0, 32).Select(_ => Task.Run(() =>
            hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(draft.Id, draft.RowVersion), default))));
        Assert.Single(outcomes, outcome => outcome.Succeeded);
        Assert.Equal(31, outcomes.Count(outcome => outcome.Refusal is Stale { Current: 2 }));
        await hospital.Get<RunWorker>().DrainAsync(default);
    }

    [Fact]
    public async Task Effective_NowAndOnOneScanner_AnswersBeforeAndAfter()
    {
        var request = await hospital.ReviewedAsync(7400);
        var approved = Done(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(request.Id, request.RowVersion, Passphrase), default));
        var before = Done(await hospital.Get<ReadDocuments>().EffectiveAsync(hospital.Technologist, "brain", "three", null, default));
        Assert.True(Assert.Single(before.Versions).Interval.Version < approved.Version);
        Done(await hospital.Get<MakeEffective>().RunAsync(hospital.Physicist, new Effectiveness(request.Id, approved.RowVersion, null, ["three"]), default));
        var after = Done(await hospital.Get<ReadDocuments>().EffectiveAsync(hospital.Technologist, "brain", null, null, default));
        Assert.Equal(approved.Version, after.Versions.Single(found => found.Interval.Scanner == "three").Interval.Version);
        Assert.NotEqual(approved.Version, after.Versions.Single(found => found.Interval.Scanner == "one-five").Interval.Version);
        var past = Done(await hospital.Get<ReadDocuments>().EffectiveAsync(
            hospital.Technologist, "brain", "three", new DateTime(2021, 12, 24, 0, 0, 0, DateTimeKind.Utc), default));
        Assert.Equal(1, Assert.Single(past.Versions).Interval.Version);
        await hospital.Get<RunWorker>().DrainAsync(default);
    }

    [Fact]
    public async Task Effective_InThePast_IsRefused()
    {
        var request = await hospital.ReviewedAsync(7300);
        var approved = Done(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(request.Id, request.RowVersion, Passphrase), default));
        var invalid = Refused<Invalid>(await hospital.Get<MakeEffective>().RunAsync(
            hospital.Physicist, new Effectiveness(request.Id, approved.RowVersion, DateTime.UtcNow.AddDays(-1)), default));
        Assert.Equal("/at", Assert.Single(invalid.Errors).Pointer);
        await hospital.Get<RunWorker>().DrainAsync(default);
    }

    [Fact]
    public async Task Provenance_OfAnEditedParameter_SaysWhoWhyAndWhoApproved()
    {
        var request = await hospital.ReviewedAsync(7200);
        var approved = Done(await hospital.Get<ApproveChangeRequest>().RunAsync(hospital.Physicist, new Approval(request.Id, request.RowVersion, Passphrase), default));
        var answer = Done(await hospital.Get<ReadDocuments>().ProvenanceAsync(
            hospital.Technologist, Brain, approved.Version!.Value, "/series/0/readout/RepetitionTime", default));
        var newest = answer.Settings[0];
        Assert.Equal(("t.okafor", "shorter examination", request.Id), (newest.Version.Author, newest.Version.Reason, newest.Version.ChangeRequestId));
        Assert.Equal("a.lindqvist", Assert.Single(newest.Version.Signatures).Signer);
        Assert.Equal(7200, (double)newest.Value!);
        Assert.NotEmpty(newest.PredictedEffect);
        Assert.Equal(9000, (double)answer.Settings[^1].Value!);
        Assert.True(answer.Settings[^1].Version.Imported);
        await hospital.Get<RunWorker>().DrainAsync(default);
    }
}
