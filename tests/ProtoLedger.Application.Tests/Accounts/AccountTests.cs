using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Time.Testing;
using ProtoLedger.Application.Accounts;
using ProtoLedger.Application.Actors;
using ProtoLedger.Application.Outcomes;
using ProtoLedger.Application.Stores;
using ProtoLedger.Application.Tests.Fixtures;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.Accounts;

public sealed class AccountTests(Hospital hospital) : IClassFixture<Hospital>
{
    private const string Good = "forty boats went upstream";

    [Fact]
    public async Task SignIn_WithTheRightPassword_OpensASessionThatEndsWhenIdle()
    {
        var clock = new FakeTimeProvider(DateTimeOffset.UtcNow);
        await using var services = Wire(hospital.ConnectionString, clock: clock);
        var session = Done(await Get<SignIn>(services).RunAsync(new Caller(Actor.Anonymous), new Credentials(" T.Okafor ", Password), default));
        Assert.Equal("t.okafor", (await Get<Authenticate>(services).RunAsync(session.Token, default))!.Name);
        clock.Advance(TimeSpan.FromMinutes(29));
        Assert.NotNull(await Get<Authenticate>(services).RunAsync(session.Token, default));
        clock.Advance(TimeSpan.FromMinutes(31));
        Assert.Null(await Get<Authenticate>(services).RunAsync(session.Token, default));
    }

    [Fact]
    public async Task SignIn_PersonOfTheDemonstrationWhereThereIsNone_IsRefusedAndTheOldSessionEnds()
    {
        var session = Done(await hospital.Get<SignIn>().RunAsync(new Caller(Actor.Anonymous), new Credentials("v.osei", Password), default));
        await using var services = Wire(hospital.ConnectionString, accounts: AccountOptions.Default with { DemoAccounts = false });
        Assert.Null(await Get<Authenticate>(services).RunAsync(session.Token, default));
        Refused<Unauthenticated>(await Get<SignIn>(services).RunAsync(new Caller(Actor.Anonymous), new Credentials("v.osei", Password), default));
        Assert.NotNull(await hospital.Get<Authenticate>().RunAsync(session.Token, default));
    }

    [Fact]
    public async Task Session_UsedAllDay_EndsAtItsAbsoluteLimit()
    {
        var clock = new FakeTimeProvider(DateTimeOffset.UtcNow);
        await using var services = Wire(hospital.ConnectionString, clock: clock);
        var session = Done(await Get<SignIn>(services).RunAsync(new Caller(Actor.Anonymous), new Credentials("v.osei", Password), default));
        for (var i = 0; i < 35; i++)
        {
            clock.Advance(TimeSpan.FromMinutes(20));
            Assert.NotNull(await Get<Authenticate>(services).RunAsync(session.Token, default));
        }

        clock.Advance(TimeSpan.FromMinutes(20));
        Assert.Null(await Get<Authenticate>(services).RunAsync(session.Token, default));
    }

    [Fact]
    public async Task SignIn_FiveTimesWrong_LocksAndSaysUntilWhen()
    {
        var account = await CreateAsync("lock.me");
        for (var i = 0; i < 5; i++)
            Refused<Unauthenticated>(await hospital.Get<SignIn>().RunAsync(new Caller(Actor.Anonymous), new Credentials(account, "wrong"), default));
        var locked = Refused<LockedOut>(await hospital.Get<SignIn>().RunAsync(new Caller(Actor.Anonymous), new Credentials(account, Good), default));
        Assert.True(locked.Until > DateTime.UtcNow);
    }

    [Fact]
    public async Task Disable_EndsEverySessionAtOnce()
    {
        var account = await CreateAsync("leaving.soon");
        var session = Done(await hospital.Get<SignIn>().RunAsync(new Caller(Actor.Anonymous), new Credentials(account, Good), default));
        Assert.NotNull(await hospital.Get<Authenticate>().RunAsync(session.Token, default));
        Done(await hospital.Get<KeepAccounts>().ChangeAsync(Administrator, new AccountChange(account, null, true, null), default));
        Assert.Null(await hospital.Get<Authenticate>().RunAsync(session.Token, default));
        Refused<Unauthenticated>(await hospital.Get<SignIn>().RunAsync(new Caller(Actor.Anonymous), new Credentials(account, Good), default));
    }

    [Fact]
    public async Task RemovedRole_EndsWithTheNextRequest()
    {
        var account = await CreateAsync("changing.hats", Roles.Physicist);
        var session = Done(await hospital.Get<SignIn>().RunAsync(new Caller(Actor.Anonymous), new Credentials(account, Good), default));
        Done(await hospital.Get<KeepAccounts>().ChangeAsync(Administrator, new AccountChange(account, [Roles.Technologist], null, null), default));
        Assert.Equal([Roles.Technologist], (await hospital.Get<Authenticate>().RunAsync(session.Token, default))!.Roles);
    }

    [Fact]
    public async Task Create_NameInUse_IsAConflict()
    {
        await CreateAsync("only.once");
        Refused<Conflict>(await hospital.Get<KeepAccounts>().CreateAsync(Administrator, new NewAccount("only.once", "Another", [], Good), default));
    }

    [Theory]
    [InlineData("short pass")]
    [InlineData("passwordpassword")]
    [InlineData("aaaaaaaaaaaaaaaaaa")]
    [InlineData("bergstrom likes tea")]
    public async Task Create_WeakPassword_IsRefused(string password)
    {
        var invalid = Refused<Invalid>(await hospital.Get<KeepAccounts>().CreateAsync(Administrator, new NewAccount("n.bergstrom", "N. Bergstrom", [], password), default));
        Assert.Equal("/password", Assert.Single(invalid.Errors).Pointer);
    }

    [Fact]
    public async Task Enrol_Again_RevokesTheOldKeyAndTheOldPassphraseSignsNoMore()
    {
        var account = await CreateAsync("new.key", Roles.Physicist);
        var first = Done(await hospital.Get<EnrolSigner>().RunAsync(Administrator, new Enrolment(account, "the first long passphrase"), default));
        var second = Done(await hospital.Get<EnrolSigner>().RunAsync(Administrator, new Enrolment(account, "another long passphrase"), default));
        Assert.NotEqual(first.CertificateSha256, second.CertificateSha256);
        var request = await hospital.ReviewedAsync(8900);
        var caller = hospital.As(account, Roles.Physicist);
        var approve = hospital.Get<ProtoLedger.Application.ChangeRequests.ApproveChangeRequest>();
        Refused<CannotSign>(await approve.RunAsync(caller, new(request.Id, request.RowVersion, "the first long passphrase"), default));
        Done(await approve.RunAsync(hospital.As(account, Roles.Physicist), new(request.Id, request.RowVersion, "another long passphrase"), default));
        await hospital.Get<ProtoLedger.Application.Runs.RunWorker>().DrainAsync(default);
    }

    [Fact]
    public async Task Enrol_Oneself_IsForbidden() =>
        Refused<Forbidden>(await hospital.Get<EnrolSigner>().RunAsync(Administrator, new Enrolment("k.admin", "the first long passphrase"), default));

    [Fact]
    public async Task SecondFactor_CodeUsedTwice_IsRefusedTheSecondTime()
    {
        var account = await CreateAsync("two.factors");
        var caller = hospital.As(account, Roles.Reviewer);
        var started = Done(await hospital.Get<SetSecondFactor>().StartAsync(caller, default));
        var secret = Base32.Decode(started.Secret);
        var code = SecondFactor.Code(secret, SecondFactor.Step(DateTime.UtcNow));
        Done(await hospital.Get<SetSecondFactor>().ConfirmAsync(hospital.As(account, Roles.Reviewer), started.Secret, code, default));
        Refused<Unauthenticated>(await hospital.Get<SignIn>().RunAsync(new Caller(Actor.Anonymous), new Credentials(account, Good), default));
        Refused<Unauthenticated>(await hospital.Get<SignIn>().RunAsync(new Caller(Actor.Anonymous), new Credentials(account, Good, code), default));
        var next = SecondFactor.Code(secret, SecondFactor.Step(DateTime.UtcNow) + 1);
        Done(await hospital.Get<SignIn>().RunAsync(new Caller(Actor.Anonymous), new Credentials(account, Good, next), default));
    }

    [Fact]
    public async Task ApiToken_WithReadScope_ReadsButCannotPropose()
    {
        var account = await CreateAsync("with.token", Roles.Technologist);
        var made = Done(await hospital.Get<KeepTokens>().CreateAsync(hospital.As(account, Roles.Technologist), new NewToken("script", [Scope.Read], 30), default));
        var actor = await hospital.Get<Authenticate>().RunAsync(made.Secret, default);
        Assert.Equal(Credential.Token, actor!.Credential);
        Assert.True(RoleRule.SignedIn.Allows(actor));
        Assert.False(RoleRule.Propose.Allows(actor));
        Assert.False(RoleRule.Sign.Allows(actor));
        Done(await hospital.Get<KeepTokens>().RevokeAsync(hospital.As(account, Roles.Technologist), made.Token.Sha256, default));
        Assert.Null(await hospital.Get<Authenticate>().RunAsync(made.Secret, default));
    }

    [Fact]
    public async Task Denial_IsAnEventOfTheAuditTrail()
    {
        Refused<Forbidden>(await hospital.Get<KeepAccounts>().ListAsync(hospital.Technologist, default));
        var events = Done(await hospital.Get<ProtoLedger.Application.History.ReadAudit>().ListAsync(
            Administrator, new AuditFilter(Actor: "t.okafor", Outcome: "denied"), default));
        Assert.Contains(events, entry => entry.Action == "list-accounts");
    }

    private Caller Administrator => hospital.As("k.admin", Roles.Administrator);

    private static T Get<T>(ServiceProvider services)
        where T : notnull => services.GetRequiredService<T>();

    private async Task<string> CreateAsync(string name, params string[] roles)
    {
        Done(await hospital.Get<KeepAccounts>().CreateAsync(Administrator, new NewAccount(name, name, roles, Good), default));
        return name;
    }
}
