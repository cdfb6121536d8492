using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Time.Testing;
using ProtoLedger.Application.Runs;
using ProtoLedger.Application.Tests.Fixtures;
using static ProtoLedger.Application.Tests.Fixtures.Hospital;

namespace ProtoLedger.Application.Tests.Runs;

public sealed class NightlySweepTests(Hospital hospital) : IClassFixture<Hospital>
{
    [Fact]
    public async Task Sweep_OfTwoWorkers_QueuesOneRunANight()
    {
        var clock = new FakeTimeProvider(new DateTimeOffset(2026, 5, 4, 12, 0, 0, TimeSpan.Zero));
        await using var first = Wire(hospital.ConnectionString, clock: clock);
        await using var second = Wire(hospital.ConnectionString, clock: clock);
        NightlySweep[] sweeps = [first.GetRequiredService<NightlySweep>(), second.GetRequiredService<NightlySweep>()];
        Assert.False(await sweeps[0].RunWhenDueAsync(default));
        clock.Advance(TimeSpan.FromHours(13));
        Assert.False(await sweeps[0].RunWhenDueAsync(default));
        clock.Advance(TimeSpan.FromHours(1));
        foreach (var sweep in sweeps)
            Assert.True(await sweep.RunWhenDueAsync(default));
        Assert.False(await sweeps[1].RunWhenDueAsync(default));
        Assert.Equal(1, await NightlyAsync());
        clock.Advance(TimeSpan.FromDays(1));
        Assert.True(await sweeps[1].RunWhenDueAsync(default));
        Assert.Equal(2, await NightlyAsync());
    }

    private async Task<int> NightlyAsync() =>
        Done(await hospital.Get<ReadRuns>().ListAsync(hospital.Technologist, null, 200, default)).Count(run => run.Cause == RunCause.Nightly);
}
