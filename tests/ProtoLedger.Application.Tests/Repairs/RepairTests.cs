using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Repairs;
using ProtoLedger.Application.Tests.Fixtures;
using ProtoLedger.Regression.Evaluation;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.Repairs;

public sealed class RepairTests(Hospital hospital) : IClassFixture<Hospital>
{
    private static readonly ProtocolChoice Stored = new(null, "brain", null);

    [Fact]
    public async Task OfferRepairs_UnknownNames_AreRefusedWithTheirPointer()
    {
        var useCase = hospital.Get<OfferRepairs>();
        Assert.Equal("/scanner", Refused<Invalid>(await useCase.RunAsync(hospital.Technologist, new(Stored, "nowhere", "fluid-dark", null), default)).Errors[0].Pointer);
        Assert.Equal("/expectation", Refused<Invalid>(await useCase.RunAsync(hospital.Technologist, new(Stored, "three", "no-such", null), default)).Errors[0].Pointer);
        Refused<NotFound>(await useCase.RunAsync(hospital.Technologist, new(new(4711, null, null), "three", "fluid-dark", null), default));
    }

    [Fact]
    public async Task OfferRepairs_ProposalThatBreaksFluid_EveryOfferHoldsAndHasACost()
    {
        var draft = await hospital.DraftAsync(6000);
        var submitted = Done(await hospital.Get<SubmitChangeRequest>().RunAsync(hospital.Technologist, new ChangeRequestStep(draft.Id, draft.RowVersion), default));
        var offers = Done(await hospital.Get<OfferRepairs>().RunAsync(hospital.Technologist, new(new(draft.Id, null, null), "three", "fluid-dark", null), default));
        Assert.NotEmpty(offers);
        Assert.All(offers, offer => Assert.Equal(Verdict.Holds, offer.Outcome.Verdict));
        Assert.All(offers, offer => Assert.NotEmpty(offer.Cost.Moved));
        Done(await hospital.Get<WithdrawChangeRequest>().RunAsync(hospital.Technologist, new ReasonedStep(draft.Id, submitted.RowVersion, "only a trial"), default));
    }

    [Fact]
    public async Task CarryOver_ToTheSameScanner_KeepsEverythingAsItIs()
    {
        var key = new ObservableKey(TestStore.Series, "contrastRatio", "csf", "white-matter", ObservableKey.NominalCondition);
        var result = Done(await hospital.Get<CarryProtocolOver>().RunAsync(hospital.Technologist, new(Stored, "three", "three", [key], null), default));
        Assert.True(result.Kept);
        Assert.Empty(result.Settings);
        var refused = Refused<Invalid>(await hospital.Get<CarryProtocolOver>().RunAsync(hospital.Technologist, new(Stored, "three", "three", [key with { Series = "other" }], null), default));
        Assert.Equal("/contrasts", refused.Errors[0].Pointer);
    }
}
