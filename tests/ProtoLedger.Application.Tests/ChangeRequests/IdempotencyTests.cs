using ProtoLedger.Application.ChangeRequests;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Tests.Fixtures;
using ProtoLedger.Protocols.Documents;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.ChangeRequests;

public sealed class IdempotencyTests(Hospital hospital) : IClassFixture<Hospital>
{
    [Fact]
    public async Task Create_RepeatedWithItsKey_GivesTheSameRequestOnce()
    {
        var (stands, document) = await hospital.EditedAsync(tree => tree["series"]![0]!["readout"]!["RepetitionTime"] = 8000);
        var request = new NewChangeRequest(DocumentKind.Protocol, "brain", stands, document, "once");
        var caller = hospital.As("t.okafor", "technologist", "the same key");
        var first = Done(await hospital.Get<CreateChangeRequest>().RunAsync(caller, request, default));
        var second = Done(await hospital.Get<CreateChangeRequest>().RunAsync(caller, request, default));
        Assert.Equal(first.Id, second.Id);
        Assert.Equal(first.CreatedAt, second.CreatedAt);
        Refused<KeyReused>(await hospital.Get<CreateChangeRequest>().RunAsync(caller, request with { Reason = "twice" }, default));
        var foreign = Done(await hospital.Get<CreateChangeRequest>().RunAsync(hospital.As("l.marsh", "lead-technologist", "the same key"), request, default));
        Assert.NotEqual(first.Id, foreign.Id);
    }

    [Fact]
    public async Task Create_SixteenAtOnceWithOneKey_HasOneEffect()
    {
        var (stands, document) = await hospital.EditedAsync(tree => tree["series"]![0]!["readout"]!["RepetitionTime"] = 8100);
        var request = new NewChangeRequest(DocumentKind.Protocol, "brain", stands, document, "sixteen at once");
        var caller = hospital.As("t.okafor", "technologist", "sixteen");
        var outcomes = await Task.WhenAll(Enumerable.Range(0, 16).Select(_ => Task.Run(() => hospital.Get<CreateChangeRequest>().RunAsync(caller, request, default))));
        Assert.All(outcomes.Where(outcome => !outcome.Succeeded), outcome => Assert.IsType<InFlight>(outcome.Refusal));
        Assert.Single(outcomes.Where(outcome => outcome.Succeeded).Select(outcome => outcome.Value!.Id).Distinct());
    }

    [Fact]
    public async Task Create_WithoutAKey_IsRefused()
    {
        var (stands, document) = await hospital.EditedAsync(tree => tree["series"]![0]!["readout"]!["RepetitionTime"] = 8200);
        var outcome = await hospital.Get<CreateChangeRequest>().RunAsync(
            hospital.Technologist with { IdempotencyKey = null }, new NewChangeRequest(DocumentKind.Protocol, "brain", stands, document, "no key"), default);
        Assert.Equal("/Idempotency-Key", Assert.Single(Refused<Invalid>(outcome).Errors).Pointer);
    }
}
